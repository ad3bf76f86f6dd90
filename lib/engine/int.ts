/**
 * Integers of any size, kept as a `number` while they are safe (|n| < 2⁵³) and as a `bigint` beyond.
 *
 * The form is canonical, so two integers are equal exactly when `===` says so. Sums and products of safe
 * integers are exact in a double whenever the result is safe, and a result that is not safe shows itself by
 * its size; so no rounding can pass unseen. The gain over plain bigint is about tenfold on the small
 * coordinates that ordinary drawings give.
 */

export type Int = number | bigint;

const MAX = Number.MAX_SAFE_INTEGER;
const BIG_MAX = BigInt(MAX);
const BIG_MIN = -BIG_MAX;

/** Canonical form of a bigint. */
export function small(x: bigint): Int {
  return x <= BIG_MAX && x >= BIG_MIN ? Number(x) : x;
}

export function add(a: Int, b: Int): Int {
  if (typeof a === 'number' && typeof b === 'number') {
    const r = a + b;
    if (r <= MAX && r >= -MAX) return r;
  }
  return small(BigInt(a) + BigInt(b));
}

export function sub(a: Int, b: Int): Int {
  if (typeof a === 'number' && typeof b === 'number') {
    const r = a - b;
    if (r <= MAX && r >= -MAX) return r;
  }
  return small(BigInt(a) - BigInt(b));
}

export function mul(a: Int, b: Int): Int {
  if (typeof a === 'number' && typeof b === 'number') {
    const r = a * b;
    if (r <= MAX && r >= -MAX) return r;
  } else if (a === 0 || b === 0) return 0;
  return small(BigInt(a) * BigInt(b));
}

export function neg(a: Int): Int {
  return typeof a === 'number' ? 0 - a : -a;
}

export function abs(a: Int): Int {
  return a < 0 ? neg(a) : a;
}

/** a/b where b divides a exactly. */
export function quotient(a: Int, b: Int): Int {
  if (typeof a === 'number' && typeof b === 'number') return a / b;
  return small(BigInt(a) / BigInt(b));
}

/** Whether b divides a. */
export function divides(b: Int, a: Int): boolean {
  if (typeof a === 'number' && typeof b === 'number') return a % b === 0;
  return BigInt(a) % BigInt(b) === 0n;
}

/** Greatest common divisor, not negative. Euclid; falls into word arithmetic as soon as both fit. */
export function gcd(a: Int, b: Int): Int {
  let x = abs(a);
  let y = abs(b);
  if (typeof x === 'number' && typeof y === 'number') return gcdWord(x, y);
  if (x === 0) return y;
  if (y === 0) return x;
  while (typeof x !== 'number' || typeof y !== 'number') {
    if (y === 0) return x;
    const r: Int = small(BigInt(x) % BigInt(y));
    x = y;
    y = r;
  }
  return gcdWord(x, y);
}

function gcdWord(a: number, b: number): number {
  let x = a;
  let y = b;
  while (y !== 0) {
    const r = x % y;
    x = y;
    y = r;
  }
  return x;
}

/** The residue of a modulo a word-size m, between 0 and m−1. */
export function residue(a: Int, m: number, big: bigint): number {
  const r = typeof a === 'number' ? a % m : Number(a % big);
  return r < 0 ? r + m : r;
}

/** Upper estimate of the size in words of 53 bits; exact enough to charge work by. */
export function words(a: Int): number {
  if (typeof a === 'number') return 1;
  return sizeInWords(a);
}

const STEP = [1n << 128n, 1n << 512n, 1n << 2048n, 1n << 8192n, 1n << 32768n, 1n << 131072n];
const WORDS = [3, 10, 39, 155, 620, 2474];

function sizeInWords(a: bigint): number {
  const x = a < 0n ? -a : a;
  for (let i = 0; i < STEP.length; i++) {
    if (x < (STEP[i] as bigint)) return WORDS[i] as number;
  }
  return 9900;
}
