import { boundsOfPi, type Engine, type Num } from '../engine/index';
import { fail } from './failure';

/**
 * A finite sum of c·π^k with algebraic coefficients c and exponents k that are halves of integers, negative ones
 * included. Since π and with it √π is transcendental (Lindemann 1882) these powers are independent over the algebraic numbers: two sums are
 * equal exactly when all their coefficients are, and a sum is algebraic exactly when only k = 0 occurs. Zero
 * coefficients are never kept, so the empty map is 0. Immutable.
 */
export type PiSum = ReadonlyMap<number, Num>;

const LARGEST_EXPONENT = 100;

export function fromNum(engine: Engine, value: Num): PiSum {
  return engine.isZero(value) ? new Map() : new Map([[0, value]]);
}

export function pi(engine: Engine): PiSum {
  return new Map([[1, engine.integer(1n)]]);
}

/** The value as an algebraic number, or null when a power of π is in it. */
export function asAlgebraic(engine: Engine, value: PiSum): Num | null {
  if (value.size === 0) return engine.integer(0n);
  return value.size === 1 ? (value.get(0) ?? null) : null;
}

export function addSums(engine: Engine, a: PiSum, b: PiSum): PiSum {
  const sum = new Map(a);
  for (const [exponent, coefficient] of b) {
    const before = sum.get(exponent);
    store(
      engine,
      sum,
      exponent,
      before === undefined ? coefficient : engine.add(before, coefficient),
    );
  }
  return sum;
}

export function mapSum(engine: Engine, a: PiSum, change: (coefficient: Num) => Num): PiSum {
  const changed = new Map<number, Num>();
  for (const [exponent, coefficient] of a) store(engine, changed, exponent, change(coefficient));
  return changed;
}

export function negateSum(engine: Engine, a: PiSum): PiSum {
  return mapSum(engine, a, (coefficient) => engine.neg(coefficient));
}

export function multiplySums(engine: Engine, a: PiSum, b: PiSum): PiSum {
  const product = new Map<number, Num>();
  for (const [i, x] of a) {
    for (const [j, y] of b) {
      checkExponent(i + j);
      const term = engine.mul(x, y);
      const before = product.get(i + j);
      store(engine, product, i + j, before === undefined ? term : engine.add(before, term));
    }
  }
  return product;
}

/** Division by a sum of several powers of π has no value of this form: `not-exact`. */
export function divideSums(engine: Engine, a: PiSum, b: PiSum): PiSum {
  if (b.size === 0)
    fail('division-by-zero', 'The divisor is exactly 0; a value other than 0 was expected.');
  const [divisor] = b;
  if (b.size > 1 || divisor === undefined) {
    fail(
      'not-exact',
      'The divisor is a sum with different powers of π; only division by a single multiple of a power of π is exact here.',
    );
  }
  const [exponent, coefficient] = divisor;
  const quotient = new Map<number, Num>();
  for (const [i, x] of a) {
    checkExponent(i - exponent);
    store(engine, quotient, i - exponent, engine.div(x, coefficient));
  }
  return quotient;
}

/** √ of c·π^k with a whole k, the principal root; of other sums with π in them there is no value of this form. */
export function sqrtSum(engine: Engine, a: PiSum): PiSum {
  if (a.size === 0) return a;
  const [term] = a;
  if (a.size > 1 || term === undefined || !Number.isInteger(term[0])) {
    fail(
      'not-exact',
      'The square root of this value with π in it is not a multiple of a power of π with a whole or half exponent, so it has no exact form here.',
    );
  }
  return new Map([[term[0] / 2, engine.sqrt(term[1])]]);
}

export function powSum(engine: Engine, a: PiSum, exponent: bigint): PiSum {
  const algebraic = asAlgebraic(engine, a);
  if (algebraic !== null) return fromNum(engine, engine.pow(algebraic, exponent));
  if (exponent < 0n)
    return divideSums(engine, new Map([[0, engine.integer(1n)]]), powSum(engine, a, -exponent));
  if (exponent > BigInt(LARGEST_EXPONENT)) checkExponent(LARGEST_EXPONENT + 1);
  const [term] = a;
  if (a.size === 1 && term !== undefined) {
    checkExponent(term[0] * Number(exponent));
    return new Map([[term[0] * Number(exponent), engine.pow(term[1], exponent)]]);
  }
  let result: PiSum = new Map([[0, engine.integer(1n)]]);
  let square = a;
  for (let left = exponent; left > 0n; left >>= 1n) {
    if (left & 1n) result = multiplySums(engine, result, square);
    if (left > 1n) square = multiplySums(engine, square, square);
  }
  return result;
}

function store(engine: Engine, sum: Map<number, Num>, exponent: number, coefficient: Num): void {
  if (engine.isZero(coefficient)) sum.delete(exponent);
  else sum.set(exponent, coefficient);
}

function checkExponent(exponent: number): void {
  if (Math.abs(exponent) > LARGEST_EXPONENT) {
    fail(
      'limit-size',
      `The exponent of π would be ${Math.abs(exponent)} or more; the limit is ${LARGEST_EXPONENT}.`,
    );
  }
}

/** Two algebraic numbers around a real sum, closer to each other the more bits are asked for. */
export interface Enclosure {
  readonly low: Num;
  readonly high: Num;
}

/**
 * Encloses a real sum between algebraic numbers by putting rational bounds in place of π, term by term.
 * Accepts real coefficients only. The width goes to 0 as `bits` grows.
 */
export function enclose(engine: Engine, sum: PiSum, bits: number): Enclosure {
  const one = 1n << BigInt(bits);
  const bound = (numerator: bigint): Num => engine.rational(numerator, one);
  let low = engine.integer(0n);
  let high = low;
  for (const [exponent, coefficient] of sum) {
    const power = boundsOfPower(exponent, bits);
    const positive = engine.sign(coefficient) >= 0;
    low = engine.add(low, engine.mul(coefficient, bound(positive ? power.low : power.high)));
    high = engine.add(high, engine.mul(coefficient, bound(positive ? power.high : power.low)));
  }
  return { low, high };
}

/** π^exponent between low/2^bits and high/2^bits, each product rounded outwards to that many bits. */
function boundsOfPower(exponent: number, bits: number): { low: bigint; high: bigint } {
  const shift = BigInt(bits);
  const one = 1n << shift;
  const base = boundsOfPi(bits);
  let [low, high] = [one, one];
  for (let step = 0; step < Math.floor(Math.abs(exponent)); step += 1) {
    low = (low * base.low) >> shift;
    high = ((high * base.high) >> shift) + 1n;
  }
  if (!Number.isInteger(exponent)) {
    low = (low * rootBelow(base.low << shift)) >> shift;
    high = ((high * (rootBelow(base.high << shift) + 1n)) >> shift) + 1n;
  }
  return exponent >= 0 ? { low, high } : { low: (one * one) / high, high: (one * one) / low + 1n };
}

/** The largest whole number whose square is at most n > 0, by Newton's iteration from above. */
function rootBelow(n: bigint): bigint {
  let root = 1n << BigInt((n.toString(2).length >> 1) + 1);
  for (;;) {
    const next = (root + n / root) >> 1n;
    if (next >= root) return root;
    root = next;
  }
}

const MOST_BITS = 1 << 17;

/**
 * Asks a question of ever narrower enclosures until it is answered. The questions put here (a sign, rounded digits,
 * a whole part) always have an answer, as the value is transcendental: it is never 0 and never a tie.
 */
export function decideByEnclosures<T>(
  engine: Engine,
  sum: PiSum,
  startBits: number,
  ask: (enclosure: Enclosure) => T | null,
): T {
  for (let bits = startBits; bits <= MOST_BITS; bits *= 2) {
    const answer = ask(enclose(engine, sum, bits));
    if (answer !== null) return answer;
  }
  return fail(
    'limit-digits',
    `π would be needed to more than ${MOST_BITS} binary digits, which is the limit.`,
  );
}

/** Exact sign of a real sum. */
export function signOfSum(engine: Engine, sum: PiSum): -1 | 0 | 1 {
  const algebraic = asAlgebraic(engine, sum);
  if (algebraic !== null) return engine.sign(algebraic);
  return decideByEnclosures(engine, sum, 64, ({ low, high }) => {
    const sign = engine.sign(low);
    return sign === engine.sign(high) && sign !== 0 ? sign : null;
  });
}
