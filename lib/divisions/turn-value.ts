import { type Enclosure } from './decimals';
import { cosineFixed } from './fixed-point';

export interface Fraction {
  n: bigint;
  d: bigint;
}

/** factor · cos(2πk/n) in an enclosure; exactly where that cosine is rational. */
export function encloseCosine(k: bigint, n: bigint, factor: Fraction): (bits: number) => Enclosure {
  const exact = rationalCosine(k, n);
  if (exact !== null) {
    const value = factor.n * exact.n;
    return () => ({ low: value, high: value, scale: factor.d * exact.d });
  }
  return (bits) => {
    const c = cosineFixed(k, n, bits);
    const ends = [factor.n * (c - 1n), factor.n * (c + 1n)] as const;
    const [low, high] = factor.n < 0n ? [ends[1], ends[0]] : ends;
    return { low, high, scale: factor.d << BigInt(bits) };
  };
}

/** factor · sin(2πk/n): the cosine of the complement. */
export function encloseSine(k: bigint, n: bigint, factor: Fraction): (bits: number) => Enclosure {
  return encloseCosine(4n * k - n, 4n * n, factor);
}

/** cos(2πk/n) where it is rational: 0, ±1/2 and ±1 are the only such values (Niven 1956). */
export function rationalCosine(k: bigint, n: bigint): Fraction | null {
  const u = ((k % n) + n) % n;
  if (u === 0n) return { n: 1n, d: 1n };
  if (2n * u === n) return { n: -1n, d: 1n };
  if (4n * u === n || 4n * u === 3n * n) return { n: 0n, d: 1n };
  if (6n * u === n || 6n * u === 5n * n) return { n: 1n, d: 2n };
  if (3n * u === n || 3n * u === 2n * n) return { n: -1n, d: 2n };
  return null;
}
