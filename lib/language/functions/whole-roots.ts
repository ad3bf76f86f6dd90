/** The whole number whose power with this index is n, or null. Accepts index ≥ 1; n negative only with an odd index. */
export function wholeRoot(n: bigint, index: number): bigint | null {
  if (n < 0n) {
    if (index % 2 === 0) return null;
    const root = wholeRoot(-n, index);
    return root === null ? null : -root;
  }
  const exponent = BigInt(index);
  const root = greatest(
    (candidate) => candidate ** exponent <= n,
    1n << BigInt(Math.floor(n.toString(2).length / index) + 1),
  );
  return root ** exponent === n ? root : null;
}

/** The greatest candidate from 0 up to the bound that satisfies a test which holds up to some point and then never. */
function greatest(holds: (candidate: bigint) => boolean, bound: bigint): bigint {
  let low = 0n;
  let high = bound;
  while (low < high) {
    const middle = (low + high + 1n) / 2n;
    if (holds(middle)) low = middle;
    else high = middle - 1n;
  }
  return low;
}

/**
 * The whole roots of t³ + p t + q.
 * For p ≥ 0 the cubic rises throughout. Otherwise it rises, falls and rises again with its turns at ±√(-p/3); on each
 * of the three stretches a bisection finds the only candidate. Every candidate is put into the cubic.
 */
export function wholeRootsOfCubic(p: bigint, q: bigint): bigint[] {
  const value = (t: bigint): bigint => t * t * t + p * t + q;
  const bound = 2n + (p < 0n ? -p : p) + (q < 0n ? -q : q);
  const turn = p >= 0n ? 0n : greatest((t) => 3n * t * t <= -p, bound);
  const stretches: [bigint, bigint, 1n | -1n][] =
    p >= 0n
      ? [[-bound, bound, 1n]]
      : [
          [-bound, -turn - 1n, 1n],
          [-turn, turn, -1n],
          [turn + 1n, bound, 1n],
        ];
  const roots: bigint[] = [];
  for (const [from, to, direction] of stretches) {
    const steps = greatest((step) => direction * value(from + step) <= 0n, to - from);
    if (value(from + steps) === 0n) roots.push(from + steps);
  }
  return roots;
}
