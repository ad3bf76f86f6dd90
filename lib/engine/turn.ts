/**
 * Cosines of rational parts of a turn.
 *
 * n parts can be had by square roots exactly when n is a power of two times distinct Fermat primes (Gauss 1801, Wantzel 1837).
 * For a Fermat prime p the sums of the p-th roots of unity over the cosets of index 2^l in the units modulo p (Gaussian periods)
 * split level by level: two sibling periods have the sum of their parent, and a product that is an integer combination
 * of the parent's level, so they are the roots of a quadratic. Odd composites by Bézout and the addition theorem,
 * even n by the half-angle.
 */

import { addEl, integerEl, mulEl, negEl, scaleEl, subEl } from './element';
import { sqrtReal } from './real-root';
import type { Cx } from './complex';
import { totient } from './cosine-polynomial';
import { OverLimit } from './limits';
import type { El, Field } from './tower';

const FERMAT = [3n, 5n, 17n, 257n, 65537n];

/** Divisions with the factor 257 are built in square roots up to this degree of their cosine; all with 65537 lie above it. */
const BUILT_DEGREE = 1024;

/** cos(2πk/n), n > 0. */
export function cosineOf(f: Field, k: bigint, n: bigint): El {
  const g = gcd(k < 0n ? -k : k, n);
  const d = n / g;
  let u = mod(k / g, d);
  if (2n * u > d) u = d - u;
  let cache = f.caches.get('cosines') as Map<string, El> | undefined;
  if (cache === undefined) f.caches.set('cosines', (cache = new Map()));
  const key = `${u}/${d}`;
  let c = cache.get(key);
  if (c === undefined) {
    c = makeCosine(f, u, d);
    cache.set(key, c);
  }
  return c;
}

/** sin(2πk/n) = cos of the complement. */
function sineOf(f: Field, k: bigint, n: bigint): El {
  return cosineOf(f, 4n * k - n, 4n * n);
}

/** Whether n is a power of two times distinct Fermat primes. */
export function isConstructibleDivision(n: bigint): boolean {
  let rest = n;
  while (rest % 2n === 0n) rest /= 2n;
  for (const p of FERMAT) if (rest % p === 0n) rest /= p;
  return rest === 1n;
}

/**
 * A rational multiple of cos(2πk/n) as a number that builds its tower only when it is asked for more than its degree and
 * polynomial. Where the square roots would be too long, it never does: its digits and order come from enclosures.
 */
export class Cosine implements Cx {
  readonly im: El;
  /** The angle in lowest terms, 0 ≤ k/n ≤ 1/2. */
  readonly k: bigint;
  readonly n: bigint;

  /**
   * n in lowest terms is a constructible division; the scale is 1 unless the square roots are too long; `made` is the
   * element where it has been built already.
   */
  constructor(
    private readonly f: Field,
    k: bigint,
    n: bigint,
    readonly scale: { readonly n: bigint; readonly d: bigint } = { n: 1n, d: 1n },
    private made: El | null = null,
  ) {
    this.im = f.zero;
    const g = gcd(k < 0n ? -k : k, n);
    this.n = n / g;
    const u = mod(k / g, this.n);
    this.k = 2n * u > this.n ? this.n - u : u;
  }

  /** Degree of the cosine where that is above 1. */
  get degree(): number {
    return Number(totient(this.n) / 2n);
  }

  /** Whether the square roots are too long to be built. Such a cosine is irrational. */
  get isTooLong(): boolean {
    return (this.n % 257n === 0n || this.n % 65537n === 0n) && this.degree > BUILT_DEGREE;
  }

  /** The multiple of a cosine that is too long by n/d ≠ 0. */
  times(n: bigint, d: bigint): Cosine {
    const [top, bottom] = [this.scale.n * n, this.scale.d * d];
    const g = gcd(top < 0n ? -top : top, bottom);
    return new Cosine(this.f, this.k, this.n, { n: top / g, d: bottom / g });
  }

  /** The element, or null while it has not been asked for. */
  get known(): El | null {
    return this.made;
  }

  get re(): El {
    if (this.isTooLong) {
      throw new OverLimit(
        'degree',
        BUILT_DEGREE,
        this.degree,
        `The cosine of ${this.k}/${this.n} of a turn takes square roots too long to be written out or reckoned with (degree ${this.degree}, the limit is ${BUILT_DEGREE}); the division page gives its chain of quadratics, and its digits and rational multiples are to be had here.`,
      );
    }
    this.made ??= cosineOf(this.f, this.k, this.n);
    return this.made;
  }
}

/** 0 ≤ k ≤ n/2, lowest terms. */
function makeCosine(f: Field, k: bigint, n: bigint): El {
  if (n === 1n) return integerEl(f, 1);
  if (n === 2n) return integerEl(f, -1);
  if (n === 4n) return integerEl(f, 0);
  if (n % 4n === 2n) return negEl(cosineOf(f, (k + n / 2n) / 2n, n / 2n));
  if (n % 4n === 0n) {
    f.budget.charge(50);
    const twice = cosineOf(f, k, n / 2n);
    const c = sqrtReal(scaleEl(addEl(integerEl(f, 1), twice), 1, 2));
    return 4n * k < n ? c : negEl(c);
  }
  const p = FERMAT.find((q) => n % q === 0n);
  const rest = p === undefined ? n : n / p;
  if (p === undefined || rest % p === 0n)
    throw new RangeError('The division is not constructible.');
  if (rest === 1n) return scaleEl(new Periods(f, Number(p)).twiceCosine(Number(k)), 1, 2);
  // k/n = a/p + b/rest.
  const a = mod(k * inverse(rest, p), p);
  const b = mod(k * inverse(p, rest), rest);
  return subEl(
    mulEl(cosineOf(f, a, p), cosineOf(f, b, rest)),
    mulEl(sineOf(f, a, p), sineOf(f, b, rest)),
  );
}

function mod(a: bigint, n: bigint): bigint {
  const r = a % n;
  return r < 0n ? r + n : r;
}

function gcd(a: bigint, b: bigint): bigint {
  return b === 0n ? a : gcd(b, a % b);
}

function inverse(a: bigint, n: bigint): bigint {
  for (let x = 1n; x < n; x++) if ((a * x) % n === 1n) return x;
  return 0n;
}

/** Gaussian periods of a Fermat prime p with the primitive root 3 (2 for p = 3). η(l, j) sums ζ^(3^(j + 2^l·m)). */
class Periods {
  private readonly powers: number[] = [];
  private readonly known = new Map<string, El>();
  private readonly cosines: bigint[];

  constructor(
    private readonly f: Field,
    private readonly p: number,
  ) {
    const g = p === 3 ? 2 : 3;
    for (let i = 0, x = 1; i < p - 1; i++, x = (x * g) % p) this.powers.push(x);
    this.cosines = fixedCosines(p);
  }

  /** 2cos(2πk/p): the period of two terms that contains ζ^k. */
  twiceCosine(k: number): El {
    const l = Math.log2((this.p - 1) / 2);
    const j = this.powers.indexOf(k) % ((this.p - 1) / 2);
    return this.period(l, j);
  }

  private period(l: number, j: number): El {
    if (l === 0) return integerEl(this.f, -1);
    const key = `${l}/${j}`;
    let e = this.known.get(key);
    if (e === undefined) {
      const half = 1 << (l - 1);
      const parent = this.period(l - 1, j % half);
      const product = this.product(l - 1, j % half);
      const root = sqrtReal(subEl(mulEl(parent, parent), scaleEl(product, 4)));
      const larger = scaleEl(addEl(parent, root), 1, 2);
      const first = this.value(l, j % half) > this.value(l, (j % half) + half);
      this.known.set(`${l}/${j % half}`, first ? larger : subEl(parent, larger));
      this.known.set(`${l}/${(j % half) + half}`, first ? subEl(parent, larger) : larger);
      e = this.known.get(key);
      if (e === undefined) throw new Error('a period was not made');
    }
    return e;
  }

  /** η(l+1, j)·η(l+1, j+2^l) in the periods of level l; siblings with equal coefficients are taken as their parent. */
  private product(l: number, j: number): El {
    const step = 1 << (l + 1);
    const counts = new Array<number>(this.p).fill(0);
    const a: number[] = [];
    const b: number[] = [];
    for (let i = j; i < this.p - 1; i += step) a.push(this.powers[i] as number);
    for (let i = j + step / 2; i < this.p - 1; i += step) b.push(this.powers[i] as number);
    for (const x of a)
      for (const y of b) counts[(x + y) % this.p] = (counts[(x + y) % this.p] as number) + 1;
    let coefs: number[] = [];
    for (let i = 0; i < 1 << l; i++) coefs.push(counts[this.powers[i] as number] as number);
    let sum = integerEl(this.f, counts[0] as number);
    for (let level = l; ; level--) {
      const half = coefs.length >> 1;
      const up: number[] = [];
      for (let i = 0; i < half; i++) {
        const c = coefs[i] as number;
        if (c === coefs[i + half]) {
          up.push(c);
          continue;
        }
        up.push(0);
        for (const [m, v] of [
          [i, c],
          [i + half, coefs[i + half] as number],
        ] as const) {
          if (v !== 0) sum = addEl(sum, scaleEl(this.period(level, m), v));
        }
      }
      if (half === 0) return addEl(sum, scaleEl(this.period(0, 0), coefs[0] as number));
      coefs = up;
    }
  }

  /** The period as a fixed-point integer, to tell two siblings apart. */
  private value(l: number, j: number): bigint {
    let s = 0n;
    for (let i = j; i < this.p - 1; i += 1 << l)
      s += this.cosines[this.powers[i] as number] as bigint;
    return s;
  }
}

/** 40 decimals of 2π, rounded (DLMF 3.12.1). */
const TWO_PI = 62831853071795864769252867665590057683943n;
const SCALE = 10n ** 40n;

/**
 * cos(2πk/p) · 10⁴⁰ for all k, by Taylor's series and the recurrence c(k+1) = 2c(1)c(k) − c(k−1). The error stays below
 * 10⁻³⁴; siblings differ by more than 10⁻⁶, so their order is certain.
 */
function fixedCosines(p: number): bigint[] {
  const x = TWO_PI / BigInt(p);
  let term = SCALE;
  let c = SCALE;
  for (let i = 1n; term !== 0n; i += 2n) {
    term = -(((term * x) / SCALE) * x) / SCALE / (i * (i + 1n));
    c += term;
  }
  const out = [SCALE, c];
  for (let k = 2; k < p; k++) {
    out.push((2n * c * (out[k - 1] as bigint)) / SCALE - (out[k - 2] as bigint));
  }
  return out;
}
