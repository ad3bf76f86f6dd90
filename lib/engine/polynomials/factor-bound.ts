import { ceilingRoot, degreeOf, leadingOf, normSquared, type IntegerPoly } from './integer-poly';

const absolute = (n: bigint): bigint => (n < 0n ? -n : n);

/**
 * A bound for the coefficients of lc(f)·g, g a monic factor of f over the rationals scaled to lc(f)·g ∈ Z[x]:
 * |lc(f)|·2^n·‖f‖₂ (Mignotte 1974; n the degree of f).
 */
export function factorBound(f: IntegerPoly): bigint {
  return (absolute(leadingOf(f)) << BigInt(degreeOf(f))) * ceilingRoot(normSquared(f));
}

/**
 * A bound for the coefficients of f·g′/g for every factor g of f: with f = g·h they are those of g′·h, and
 * ‖g′‖₁·‖h‖₁ ≤ n·‖g‖₁·‖h‖₁ ≤ n·2^n·M(f) ≤ n·2^n·‖f‖₂, M the Mahler measure (Landau's inequality).
 */
export function derivativeBound(f: IntegerPoly): bigint {
  const n = degreeOf(f);
  return (BigInt(n) << BigInt(n)) * ceilingRoot(normSquared(f));
}
