/**
 * The minimal polynomial of a value whose tower is much larger than its degree, as happens with nests of complex roots.
 *
 * The powers of y = den·x are written in coordinates until one depends on those before it modulo a prime; the earlier ones are
 * then independent. The relation has integer coefficients, because y is an algebraic integer: they are lifted
 * p-adically from the inverse modulo p (Dixon 1982), and the relation is checked exactly.
 */

import { residue, type Int } from './int';
import { mulCx, real, type Cx } from './complex';
import { integerEl, isZeroEl, toSparse } from './element';
import { OverLimit } from './limits';
import { mulMod, powMod, wordPrime } from './residues';
import type { El } from './tower';

/** Monic minimal polynomial of y, highest power first; y must be integral. `degree` when it would be longer than allowed. */
export function relationOf(y: Cx): bigint[] {
  const f = y.re.t.field;
  const p = wordPrime(0);
  const elimination = new Elimination(p);
  const powers: Map<string, Int>[] = [];
  let power: Cx = real(integerEl(f, 1));
  for (let j = 0; ; j++) {
    f.budget.within('degree', j);
    const row = coordinates(power);
    f.budget.charge(row.size * (j + 1));
    if (!elimination.add(row)) {
      const lower = lift(powers, row, elimination, p);
      if (lower !== null) return [1n, ...lower.reverse().map((c) => -c)];
      throw new OverLimit('steps', f.budget.limits.steps, f.budget.limits.steps + 1);
    }
    powers.push(row);
    power = mulCx(power, y);
  }
}

/** Coordinates by the product of roots (and i) they belong to. Powers of an integral number have integer ones up to their denominators, which are 1. */
function coordinates(x: Cx): Map<string, Int> {
  const out = new Map<string, Int>();
  const take = (e: El, prefix: string): void => {
    if (isZeroEl(e)) return;
    const s = toSparse(e);
    const ids = e.t.gens.map((g) => g.id);
    (s.m as readonly bigint[]).forEach((m, j) => {
      let key = prefix;
      for (let i = 0, rest = m; rest !== 0n; i++, rest >>= 1n) if (rest & 1n) key += `,${ids[i]}`;
      out.set(key, s.c[j] as Int);
    });
  };
  take(x.re, '');
  take(x.im, 'i');
  return out;
}

/** Row reduction modulo p; remembers which column each row was reduced at. */
class Elimination {
  readonly pivots: string[] = [];
  private readonly rows: Map<string, number>[] = [];
  private readonly big: bigint;

  constructor(private readonly p: number) {
    this.big = BigInt(p);
  }

  /** False when the row depends on those before it. */
  add(row: ReadonlyMap<string, Int>): boolean {
    const { p } = this;
    const inv = 1 / p;
    const r = new Map<string, number>();
    for (const [key, c] of row) r.set(key, residue(c, p, this.big));
    this.rows.forEach((other, i) => {
      const c = r.get(this.pivots[i] as string) ?? 0;
      if (c === 0) return;
      for (const [key, v] of other) {
        const w = (r.get(key) ?? 0) - mulMod(c, v, p, inv);
        r.set(key, w < 0 ? w + p : w);
      }
    });
    for (const [key, v] of r) {
      if (v === 0) continue;
      const scale = powMod(v, p - 2, p, inv);
      for (const [k, w] of r) r.set(k, mulMod(w, scale, p, inv));
      this.pivots.push(key);
      this.rows.push(r);
      return true;
    }
    return false;
  }
}

/** Integers c with row = Σ c_j·powers[j], or null. */
function lift(
  powers: readonly Map<string, Int>[],
  row: ReadonlyMap<string, Int>,
  elimination: Elimination,
  p: number,
): bigint[] | null {
  const n = powers.length;
  const columns = elimination.pivots;
  const big = BigInt(p);
  const matrix = columns.map((key) => powers.map((q) => BigInt(q.get(key) ?? 0)));
  const inverse = invert(
    matrix.map((r) => r.map((c) => residue(c, p, big))),
    p,
  );
  if (inverse === null) return null;
  let rest = columns.map((key) => BigInt(row.get(key) ?? 0));
  const out = new Array<bigint>(n).fill(0n);
  let scale = 1n;
  for (let digit = 0; digit < 4000 && rest.some((c) => c !== 0n); digit++) {
    const low = rest.map((c) => residue(c, p, big));
    const x = inverse.map((r) => {
      let sum = 0;
      for (let j = 0; j < n; j++)
        sum = (sum + mulMod(r[j] as number, low[j] as number, p, 1 / p)) % p;
      return BigInt(sum > p / 2 ? sum - p : sum);
    });
    x.forEach((c, j) => (out[j] = (out[j] as bigint) + c * scale));
    rest = rest.map((c, i) => {
      let v = c;
      (matrix[i] as bigint[]).forEach((m, j) => (v -= m * (x[j] as bigint)));
      return v / big;
    });
    scale *= big;
  }
  return holds(powers, row, out) ? out : null;
}

function holds(
  powers: readonly Map<string, Int>[],
  row: ReadonlyMap<string, Int>,
  c: readonly bigint[],
): boolean {
  const sum = new Map<string, bigint>();
  for (const [key, v] of row) sum.set(key, BigInt(v));
  powers.forEach((q, j) => {
    for (const [key, v] of q) sum.set(key, (sum.get(key) ?? 0n) - (c[j] as bigint) * BigInt(v));
  });
  return [...sum.values()].every((v) => v === 0n);
}

/** Inverse of a square matrix modulo p (Gauss and Jordan), or null. */
function invert(matrix: number[][], p: number): number[][] | null {
  const n = matrix.length;
  const inv = 1 / p;
  const a = matrix.map((r, i) => [...r, ...r.map((_, j) => (i === j ? 1 : 0))]);
  for (let c = 0; c < n; c++) {
    const at = a.findIndex((r, i) => i >= c && r[c] !== 0);
    if (at < 0) return null;
    [a[c], a[at]] = [a[at] as number[], a[c] as number[]];
    const pivot = a[c] as number[];
    const scale = powMod(pivot[c] as number, p - 2, p, inv);
    for (let j = 0; j < 2 * n; j++) pivot[j] = mulMod(pivot[j] as number, scale, p, inv);
    for (const r of a) {
      const q = r[c] as number;
      if (r === pivot || q === 0) continue;
      for (let j = 0; j < 2 * n; j++) {
        const v = (r[j] as number) - mulMod(q, pivot[j] as number, p, inv);
        r[j] = v < 0 ? v + p : v;
      }
    }
  }
  return a.map((r) => r.slice(n));
}
