/**
 * Recombination of many lifted factors by lattice reduction (van Hoeij 2002, with the logarithmic
 * derivatives of Belabas, van Hoeij, Klüners & Steel 2009 as knapsack data).
 *
 * A set S of lifted factors belongs to a true factor G exactly when Σ_{i∈S} f·g_i′/g_i is, modulo p^k, the
 * small polynomial f·G′/G. Rows of the lattice stand for integer combinations of the lifted factors, with
 * one more column per coefficient looked at; the indicator vectors of the true factors are short in it, so
 * that everything beyond the last short Gram–Schmidt vector can be cut off. When the remaining rows span
 * what the indicator vectors of a partition span, the candidates are divided out. That proves them
 * irreducible: finer factors would need more dimensions than the lattice still has.
 */
import type { Charge } from './factor';
import { derivativeBound, factorBound } from './factor-bound';
import { divideByMonic, liftFactors, symmetricMod } from './hensel';
import { derivativeOf, divideExactly, multiplyPoly, type IntegerPoly } from './integer-poly';
import { reduceLattice, type Row } from './lattice';
import type { ModPoly } from './mod-poly';
import { candidateOf } from './recombine-subsets';

/** Bits of information that one column brings in; small enough to keep the reductions cheap. */
const BITS_PER_COLUMN = 24;

interface Lifted {
  readonly factors: readonly IntegerPoly[];
  readonly modulus: bigint;
  /** f·g_i′/g_i modulo `modulus`, one row per factor. */
  readonly derivatives: readonly IntegerPoly[];
}

function lift(f: IntegerPoly, modFactors: readonly ModPoly[], p: number, bound: bigint): Lifted {
  const { factors, modulus } = liftFactors(f, modFactors, p, bound);
  const derivatives = factors.map((g) => {
    const { quotient } = divideByMonic(f, g, modulus);
    return symmetricMod(multiplyPoly(quotient, derivativeOf(g)), modulus);
  });
  return { factors, modulus, derivatives };
}

function nearestQuotient(a: bigint, b: bigint): bigint {
  const half = b / 2n;
  return a >= 0n ? (a + half) / b : -((-a + half) / b);
}

/** Adds a column for coefficient `index`; the cut p^b is the largest that leaves about 24 bits. */
function withColumn(rows: Row[], lifted: Lifted, index: number, cut: bigint, r: number): Row[] {
  const reduced = lifted.modulus / cut;
  const data = lifted.derivatives.map((d) => nearestQuotient(d[index] ?? 0n, cut));
  const widened = rows.map((row) => {
    let entry = 0n;
    for (let i = 0; i < r; i++) entry += (row[i] as bigint) * (data[i] as bigint);
    return [...row, symmetricMod([entry], reduced)[0] ?? 0n];
  });
  const width = (rows[0]?.length ?? r) + 1;
  const modulusRow: Row = new Array<bigint>(width).fill(0n);
  modulusRow[width - 1] = reduced;
  // The modulus first: it is the shortest vector that the new column has to be measured against.
  return [modulusRow, ...widened];
}

/** Classes of columns that no row tells apart; they are the partition when there are as many as rows. */
function classesOf(rows: readonly Row[], r: number): number[][] {
  const classes = new Map<string, number[]>();
  for (let i = 0; i < r; i++) {
    const key = rows.map((row) => String(row[i])).join();
    const members = classes.get(key);
    if (members) members.push(i);
    else classes.set(key, [i]);
  }
  return [...classes.values()];
}

function divideOut(
  f: IntegerPoly,
  lifted: Lifted,
  classes: readonly number[][],
): IntegerPoly[] | null {
  const found: IntegerPoly[] = [];
  let rest = f;
  for (const members of classes) {
    const chosen = members.map((i) => lifted.factors[i] as IntegerPoly);
    const candidate = candidateOf(f, chosen, lifted.modulus);
    const quotient = candidate.length > 1 ? divideExactly(rest, candidate) : null;
    if (quotient === null) return null;
    found.push(candidate);
    rest = quotient;
  }
  return rest.length === 1 ? found : null;
}

export function recombineByLattice(
  f: IntegerPoly,
  modFactors: readonly ModPoly[],
  p: number,
  charge: Charge,
): IntegerPoly[] {
  const r = modFactors.length;
  const derivativeLimit = derivativeBound(f);
  const room = 1n << BigInt(BITS_PER_COLUMN);
  let bound = 2n * factorBound(f) + 1n;
  if (bound < derivativeLimit * room * BigInt(p)) bound = derivativeLimit * room * BigInt(p);
  for (;;) {
    const lifted = lift(f, modFactors, p, bound);
    let cut = lifted.modulus;
    while (lifted.modulus / cut < room) cut /= BigInt(p);
    let rows: Row[] = Array.from({ length: r }, (_, i) =>
      Array.from({ length: r }, (_unused, j) => (i === j ? 1n : 0n)),
    );
    // Half a unit of rounding per factor, and less than one unit of true value since cut ≥ derivativeLimit.
    const columnSquare = (BigInt(r) / 2n + 2n) ** 2n;
    for (let used = 0; used < f.length - 1; used++) {
      // Coefficients from both ends: those of the middle are the largest and tell least.
      const index = used % 2 === 0 ? used / 2 : f.length - 2 - (used - 1) / 2;
      rows = withColumn(rows, lifted, index, cut, r);
      charge(rows.length ** 3 * 4);
      const d = reduceLattice(rows);
      const limit = BigInt(r) + BigInt(used + 1) * columnSquare;
      let kept = rows.length;
      while (kept > 1 && (d[kept] as bigint) > limit * (d[kept - 1] as bigint)) kept--;
      rows = rows.slice(0, kept);
      const classes = classesOf(rows, r);
      if (classes.length > kept) continue;
      const found = classes.length === 1 ? [f] : divideOut(f, lifted, classes);
      if (found !== null) return found;
    }
    bound = lifted.modulus * lifted.modulus;
  }
}
