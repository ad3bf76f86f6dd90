import { bitLength } from '../integers';

/** Largest r with r^e ≤ n for n ≥ 0, by bisection on its bits. */
export function wholeRoot(n: bigint, index: number): bigint {
  let root = 0n;
  for (let bit = BigInt(Math.floor(bitLength(n) / index)); bit >= 0n; bit--) {
    const tried = root | (1n << bit);
    if (tried ** BigInt(index) <= n) root = tried;
  }
  return root;
}
