/**
 * The field of p^D elements, p an odd prime below 2^15, as F_p[y] modulo an irreducible polynomial, and the roots in it
 * of polynomials over F_p.
 */
import { isIrreducibleMod } from '../polynomials/factor-mod';
import {
  bezoutMod,
  multiplyMod,
  powerModPoly,
  restMod,
  subtractMod,
  type ModPoly,
} from '../polynomials/mod-poly';

/** A polynomial over the field, constant term first, without leading zeros. */
type Poly = ModPoly[];

/** A monic irreducible polynomial of the degree, by trial in a fixed order: one in about `degree` is irreducible. */
export function irreducibleOfDegree(degree: number, p: number): ModPoly {
  for (let n = 1; ; n++) {
    const trial = new Array<number>(degree + 1).fill(0);
    trial[degree] = 1;
    for (let k = 0, rest = n; rest > 0 && k < degree; k++, rest = Math.floor(rest / p)) {
      trial[k] = rest % p;
    }
    if (degree > 1) trial[1] = ((trial[1] ?? 0) + 1) % p;
    if (isIrreducibleMod(trial, p)) return trial;
  }
}

export class ResidueField {
  readonly degree: number;
  /** y^(p·k) for k below the degree. */
  private readonly images: ModPoly[];

  constructor(
    readonly modulus: ModPoly,
    readonly p: number,
  ) {
    this.degree = modulus.length - 1;
    const y = powerModPoly(restMod([0, 1], modulus, p), BigInt(p), modulus, p);
    this.images = [[1]];
    for (let k = 1; k < this.degree; k++) {
      this.images.push(this.multiply(this.images[k - 1] as ModPoly, y));
    }
  }

  get generator(): ModPoly {
    return restMod([0, 1], this.modulus, this.p);
  }

  multiply(a: ModPoly, b: ModPoly): ModPoly {
    return restMod(multiplyMod(a, b, this.p), this.modulus, this.p);
  }

  inverse(a: ModPoly): ModPoly {
    return restMod(bezoutMod(a, this.modulus, this.p).s, this.modulus, this.p);
  }

  /** a^p. */
  frobenius(a: ModPoly): ModPoly {
    return this.combine(a, this.images);
  }

  /** Σ weights_k · elements_k for weights in F_p. */
  private combine(weights: readonly number[], elements: readonly ModPoly[]): ModPoly {
    const sum = new Array<number>(this.degree).fill(0);
    weights.forEach((w, k) => {
      if (w === 0) return;
      elements[k]?.forEach((c, j) => {
        sum[j] = ((sum[j] as number) + w * c) % this.p;
      });
    });
    let length = sum.length;
    while (length > 0 && sum[length - 1] === 0) length--;
    return sum.slice(0, length);
  }

  private trim(f: Poly): Poly {
    let length = f.length;
    while (length > 0 && (f[length - 1] as ModPoly).length === 0) length--;
    return f.slice(0, length);
  }

  private rest(f: Poly, monic: Poly): Poly {
    const rest = [...f];
    const n = monic.length - 1;
    for (let k = rest.length - 1; k >= n; k--) {
      const q = rest[k] as ModPoly;
      if (q.length === 0) continue;
      for (let j = 0; j < n; j++) {
        const product = this.multiply(q, monic[j] as ModPoly);
        rest[k - n + j] = subtractMod(rest[k - n + j] as ModPoly, product, this.p);
      }
    }
    return this.trim(rest.slice(0, n));
  }

  private quotient(f: Poly, monic: Poly): Poly {
    const rest = [...f];
    const n = monic.length - 1;
    const quotient: Poly = [];
    for (let k = rest.length - 1; k >= n; k--) {
      const q = rest[k] as ModPoly;
      quotient[k - n] = q;
      for (let j = 0; j < n; j++) {
        const product = this.multiply(q, monic[j] as ModPoly);
        rest[k - n + j] = subtractMod(rest[k - n + j] as ModPoly, product, this.p);
      }
    }
    return quotient;
  }

  private product(f: Poly, g: Poly, modulo: Poly): Poly {
    const { p } = this;
    const sums = Array.from({ length: f.length + g.length - 1 }, () =>
      new Array<number>(2 * this.degree - 1).fill(0),
    );
    f.forEach((a, i) => {
      g.forEach((b, j) => {
        const sum = sums[i + j] as number[];
        for (let k = 0; k < a.length; k++) {
          const c = a[k] as number;
          for (let l = 0; l < b.length; l++) {
            sum[k + l] = ((sum[k + l] as number) + c * (b[l] as number)) % p;
          }
        }
      });
    });
    const reduced = sums.map((sum) => {
      let length = sum.length;
      while (length > 0 && sum[length - 1] === 0) length--;
      return restMod(sum.slice(0, length), this.modulus, p);
    });
    return this.rest(reduced, modulo);
  }

  private monic(f: Poly): Poly {
    const inverse = this.inverse(f[f.length - 1] as ModPoly);
    return f.map((c) => this.multiply(c, inverse));
  }

  private gcd(f: Poly, g: Poly): Poly {
    let a = f;
    let b = g;
    while (b.length > 0) {
      b = this.monic(b);
      [a, b] = [b, this.rest(a, b)];
    }
    return a;
  }

  /**
   * A root of f, irreducible over F_p of a degree that divides the field's. The trace of δ·x takes values in F_p at all roots;
   * quadratic characters of it split f (Berlekamp 1970). Trials run in a fixed order: some δ of a basis tells two roots
   * apart, and some shift of their traces has different characters, so that the search ends.
   */
  rootOf(f: ModPoly): ModPoly {
    const { p } = this;
    const x = restMod([0, 1], f, p);
    const powers: ModPoly[] = [x];
    const step = powerModPoly(x, BigInt(p), f, p);
    // x^(p^i) by substitution of x^p in the one before.
    for (let i = 1; i < f.length - 1; i++) {
      let value: ModPoly = [];
      const before = powers[i - 1] as ModPoly;
      for (let k = before.length - 1; k >= 0; k--) {
        value = restMod(multiplyMod(value, step, p), f, p);
        value = subtractMod(value, [(p - (before[k] as number)) % p], p);
      }
      powers.push(value);
    }
    let part: Poly = f.map((c) => (c === 0 ? [] : [c]));
    for (let trial = 0; part.length > 2; trial++) {
      const delta = new Array<number>((trial + 1) % this.degree).fill(0);
      delta.push(1);
      const shift = Math.floor(trial / this.degree);
      const trace = this.rest(this.traceOf(delta, powers, shift), part);
      if (trace.length === 0) continue;
      const power = this.power(trace, (p - 1) / 2, part);
      const minusOne = [...power];
      minusOne[0] = subtractMod(minusOne[0] ?? [], [1], p);
      const common = this.gcd(part, this.trim(minusOne));
      if (common.length < 2 || common.length === part.length) continue;
      const other = this.quotient(part, common);
      part = common.length <= other.length ? common : other;
    }
    return subtractMod([], part[0] as ModPoly, p);
  }

  private traceOf(delta: ModPoly, powers: readonly ModPoly[], shift: number): Poly {
    let conjugate = restMod(delta, this.modulus, this.p);
    const columns: ModPoly[] = powers.map(() => []);
    for (let i = 0; i < this.degree; i++) {
      (powers[i % powers.length] as ModPoly).forEach((c, k) => {
        columns[k] = this.combine([1, c], [columns[k] as ModPoly, conjugate]);
      });
      conjugate = this.frobenius(conjugate);
    }
    columns[0] = this.combine([1, 1], [columns[0] as ModPoly, shift === 0 ? [] : [shift]]);
    return this.trim(columns);
  }

  private power(base: Poly, e: number, modulo: Poly): Poly {
    let result: Poly = [[1]];
    for (const bit of e.toString(2)) {
      result = this.product(result, result, modulo);
      if (bit === '1') result = this.product(result, base, modulo);
    }
    return result;
  }
}
