/** Whole numbers: size, square roots, and splitting n = s²·r with the prime factors of r. */

/** Number of bits of |n|; 0 for 0. */
export function bitLength(n: bigint): number {
  const x = n < 0n ? -n : n;
  if (x === 0n) return 0;
  const hex = x.toString(16);
  return (hex.length - 1) * 4 + (32 - Math.clz32(parseInt(hex[0] as string, 16)));
}

/** ⌊√n⌋ for n ≥ 0. Newton from above with the precision doubled at each level (Zimmermann's recursion). */
export function isqrt(n: bigint): bigint {
  if (n < 0n) throw new RangeError('isqrt of a negative number');
  if (n < 0x10000000000000n) return BigInt(Math.floor(Math.sqrt(Number(n))));
  const bits = bitLength(n);
  if (bits <= 1000) return isqrtNewton(n, bits);
  const shift = BigInt(bits >> 2) & ~1n;
  const high = isqrt(n >> (shift << 1n));
  // One Newton step from a root that is right in its upper half; it can only be too large afterwards.
  let x = ((high << shift) + n / (high << shift)) >> 1n;
  while (x * x > n) x -= 1n;
  while ((x + 1n) * (x + 1n) <= n) x += 1n;
  return x;
}

function isqrtNewton(n: bigint, bits: number): bigint {
  const drop = BigInt((bits - 50) & ~1);
  let x = (BigInt(Math.ceil(Math.sqrt(Number(n >> drop)))) + 1n) << (drop >> 1n);
  for (;;) {
    const y = (x + n / x) >> 1n;
    if (y >= x) return x;
    x = y;
  }
}

/** √n when n is a perfect square, else null. Squares are first looked for modulo 64 and 45045. */
export function exactRoot(n: bigint): bigint | null {
  if (n < 0n) return null;
  if (!SQUARE_MOD_64[Number(n & 63n)]) return null;
  const m = Number(n % 45045n);
  if (
    !isResidue(m, 9) ||
    !isResidue(m, 5) ||
    !isResidue(m, 7) ||
    !isResidue(m, 11) ||
    !isResidue(m, 13)
  ) {
    return null;
  }
  const r = isqrt(n);
  return r * r === n ? r : null;
}

const SQUARE_MOD_64 = squaresModulo(64);
const SQUARES = new Map([9, 5, 7, 11, 13].map((m) => [m, squaresModulo(m)]));

function squaresModulo(m: number): boolean[] {
  const table = new Array<boolean>(m).fill(false);
  for (let i = 0; i < m; i++) table[(i * i) % m] = true;
  return table;
}

function isResidue(n: number, m: number): boolean {
  return (SQUARES.get(m) as boolean[])[n % m] as boolean;
}

/** Primes below 4096, for trial division. */
export const SMALL_PRIMES: readonly number[] = (() => {
  const composite = new Uint8Array(4096);
  const out: number[] = [];
  for (let i = 2; i < 4096; i++) {
    if (composite[i]) continue;
    out.push(i);
    for (let j = i * i; j < 4096; j += i) composite[j] = 1;
  }
  return out;
})();

/** n = square²·∏ factors, n > 0. Factors are distinct, and prime except for cofactors too hard to split (`complete` false). */
export interface SquareSplit {
  square: bigint;
  factors: bigint[];
  complete: boolean;
}

/**
 * Splits the square part off n > 0.
 * Trial division by the primes below 4096, then Pollard's rho in Brent's form with fixed starts and a bounded number
 * of steps; a cofactor that resists is kept whole when it is not a perfect square, and refined by gcd when it
 * meets another number. Cost: bounded by `rhoSteps` multiplications of the cofactor's size.
 */
export function splitSquare(n: bigint, rhoSteps = 12_000): SquareSplit {
  const exponents = new Map<bigint, number>();
  let rest = n;
  if (rest <= BigInt(Number.MAX_SAFE_INTEGER)) {
    let w = Number(rest);
    for (const p of SMALL_PRIMES) {
      if (p * p > w) break;
      while (w % p === 0) {
        exponents.set(BigInt(p), (exponents.get(BigInt(p)) ?? 0) + 1);
        w /= p;
      }
    }
    w = stripToCubeRoot(w, exponents);
    rest = BigInt(w);
  } else {
    rest = stripSmall(rest, exponents);
  }
  let complete = true;
  const todo: bigint[] = [];
  if (rest > 1n && rest <= BigInt(Number.MAX_SAFE_INTEGER)) {
    // No prime up to the cube root divides: rest is a prime, the square of one, or the product of two different ones.
    const r = exactRoot(rest);
    if (r !== null) exponents.set(r, 2);
    else {
      exponents.set(rest, 1);
      complete = rest < 16777216n || isProbablePrime(rest);
    }
  } else if (rest > 1n) todo.push(rest);
  let steps = rhoSteps;
  while (todo.length > 0) {
    const m = todo.pop() as bigint;
    const r = exactRoot(m);
    if (r !== null) {
      todo.push(r, r);
      continue;
    }
    if (m < 16777216n || isProbablePrime(m)) {
      exponents.set(m, (exponents.get(m) ?? 0) + 1);
      continue;
    }
    const size = bitLength(m);
    const found = size > 220 ? { factor: null, used: 0 } : findFactor(m, steps);
    steps -= found.used;
    if (found.factor === null) {
      complete = false;
      exponents.set(m, (exponents.get(m) ?? 0) + 1);
    } else {
      todo.push(found.factor, m / found.factor);
    }
  }
  let square = 1n;
  const factors: bigint[] = [];
  for (const [p, e] of exponents) {
    if (e > 1) square *= p ** BigInt(e >> 1);
    if (e & 1) factors.push(p);
  }
  factors.sort((a, b) => (a < b ? -1 : 1));
  return { square, factors, complete };
}

/** Goes on dividing from 4097 up to the cube root of what is left. */
function stripToCubeRoot(n: number, exponents: Map<bigint, number>): number {
  let w = n;
  for (let p = 4097, step = 4; p * p * p <= w; p += step, step = 6 - step) {
    while (w % p === 0) {
      exponents.set(BigInt(p), (exponents.get(BigInt(p)) ?? 0) + 1);
      w /= p;
    }
  }
  return w;
}

/** Divides out the small primes, many at a time, so that a number of thousands of digits is read a few dozen times only. */
function stripSmall(n: bigint, exponents: Map<bigint, number>): bigint {
  let rest = n;
  for (const { product, primes } of PRIME_BLOCKS) {
    const r = Number(rest % product);
    for (const p of primes) {
      if (r % p !== 0) continue;
      const big = BigInt(p);
      while (rest % big === 0n) {
        exponents.set(big, (exponents.get(big) ?? 0) + 1);
        rest /= big;
      }
    }
  }
  return rest;
}

const PRIME_BLOCKS = (() => {
  const blocks: { product: bigint; primes: number[] }[] = [];
  let product = 1;
  let primes: number[] = [];
  for (const p of SMALL_PRIMES) {
    if (product * p > Number.MAX_SAFE_INTEGER) {
      blocks.push({ product: BigInt(product), primes });
      product = 1;
      primes = [];
    }
    product *= p;
    primes.push(p);
  }
  blocks.push({ product: BigInt(product), primes });
  return blocks;
})();

function powMod(b: bigint, e: bigint, m: bigint): bigint {
  let r = 1n;
  let x = b % m;
  for (let k = e; k > 0n; k >>= 1n) {
    if (k & 1n) r = (r * x) % m;
    x = (x * x) % m;
  }
  return r;
}

const BASES = [2n, 3n, 5n, 7n, 11n, 13n, 17n, 19n, 23n, 29n, 31n, 37n];

/**
 * Miller–Rabin to the first twelve prime bases: a proof below 3·10²⁴ (Sorenson and Webster 2015). Above, a composite
 * taken for a prime does no harm: the engine only needs that a factor is not a square and that distinct ones are coprime.
 */
export function isProbablePrime(n: bigint): boolean {
  if (n < 2n) return false;
  for (const p of BASES) {
    if (n === p) return true;
    if (n % p === 0n) return false;
  }
  if (bitLength(n) > 3000) return false;
  let d = n - 1n;
  let s = 0;
  while ((d & 1n) === 0n) {
    d >>= 1n;
    s++;
  }
  for (const a of BASES) {
    let x = powMod(a, d, n);
    if (x === 1n || x === n - 1n) continue;
    let composite = true;
    for (let i = 1; i < s && composite; i++) {
      x = (x * x) % n;
      if (x === n - 1n) composite = false;
    }
    if (composite) return false;
  }
  return true;
}

function findFactor(n: bigint, limit: number): { factor: bigint | null; used: number } {
  let used = 0;
  for (let c = 1n; used < limit && c < 8n; c++) {
    let y = 2n;
    let x = y;
    let q = 1n;
    let g = 1n;
    let ys = y;
    for (let r = 1; g === 1n && used < limit; r *= 2) {
      x = y;
      for (let i = 0; i < r; i++) y = (y * y + c) % n;
      for (let k = 0; k < r && g === 1n && used < limit; k += 128) {
        ys = y;
        for (let i = Math.min(128, r - k); i > 0; i--) {
          y = (y * y + c) % n;
          q = (q * (x > y ? x - y : y - x)) % n;
        }
        used += Math.min(128, r - k) + 1;
        g = bigGcd(q, n);
      }
      used += r;
    }
    if (g === n) {
      g = 1n;
      while (g === 1n) {
        ys = (ys * ys + c) % n;
        g = bigGcd(x > ys ? x - ys : ys - x, n);
      }
    }
    if (g !== 1n && g !== n) return { factor: g, used };
  }
  return { factor: null, used };
}

/** Greatest common divisor of two non-negative bigints. */
export function bigGcd(a: bigint, b: bigint): bigint {
  let x = a;
  let y = b;
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

const gcdSmall = (a: number, b: number): number => (b === 0 ? a : gcdSmall(b, a % b));

/** Least common multiple of positive safe integers; 1 for none. */
export const leastCommonMultiple = (numbers: readonly number[]): number =>
  numbers.reduce((a, b) => (a / gcdSmall(a, b)) * b, 1);
