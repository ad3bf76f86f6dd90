/** Recombination of few lifted factors by trying subsets, smallest first (Zassenhaus 1969). */
import type { Charge } from './factor';
import { factorBound } from './factor-bound';
import { liftFactors, symmetricMod } from './hensel';
import {
  divideExactly,
  leadingOf,
  multiplyPoly,
  primitivePart,
  type IntegerPoly,
} from './integer-poly';
import type { ModPoly } from './mod-poly';

/** All k-element subsets of 0 … n−1 in lexicographic order. */
function* subsets(n: number, k: number): Generator<number[]> {
  const chosen = Array.from({ length: k }, (_, index) => index);
  while (chosen.length === 0 || (chosen[k - 1] as number) < n) {
    yield [...chosen];
    let at = k - 1;
    while (at >= 0 && chosen[at] === n - k + at) at--;
    if (at < 0) return;
    chosen[at] = (chosen[at] as number) + 1;
    for (let j = at + 1; j < k; j++) chosen[j] = (chosen[j - 1] as number) + 1;
  }
}

/** The primitive polynomial whose image is lc(f) times the product of the chosen monic factors. */
export function candidateOf(
  f: IntegerPoly,
  chosen: readonly IntegerPoly[],
  modulus: bigint,
): IntegerPoly {
  const product = chosen.reduce<IntegerPoly>(
    (sofar, factor) => symmetricMod(multiplyPoly(sofar, factor), modulus),
    symmetricMod([leadingOf(f)], modulus),
  );
  return primitivePart(product);
}

/**
 * The constant term decides most trials without a division: lc(f)·∏ g_i(0) must divide lc(f)·f(0).
 */
function constantFits(f: IntegerPoly, chosen: readonly IntegerPoly[], modulus: bigint): boolean {
  const lead = leadingOf(f);
  const product = chosen.reduce((sofar, g) => (sofar * (g[0] ?? 0n)) % modulus, lead % modulus);
  const constant = symmetricMod([product], modulus)[0] ?? 0n;
  return constant !== 0n && ((f[0] as bigint) * lead) % constant === 0n;
}

export function recombineBySubsets(
  f: IntegerPoly,
  modFactors: readonly ModPoly[],
  p: number,
  charge: Charge,
): IntegerPoly[] {
  const lifted = liftFactors(f, modFactors, p, 2n * factorBound(f) + 1n);
  const found: IntegerPoly[] = [];
  let rest = f;
  let factors = lifted.factors;
  let size = 1;
  while (2 * size <= factors.length) {
    let hit: number[] | null = null;
    for (const subset of subsets(factors.length, size)) {
      charge(f.length);
      const chosen = subset.map((index) => factors[index] as IntegerPoly);
      if (!constantFits(rest, chosen, lifted.modulus)) continue;
      const candidate = candidateOf(rest, chosen, lifted.modulus);
      charge(f.length * f.length);
      const quotient = divideExactly(rest, candidate);
      if (quotient === null) continue;
      found.push(candidate);
      rest = quotient;
      hit = subset;
      break;
    }
    if (hit === null) size++;
    else factors = factors.filter((_, index) => !hit.includes(index));
  }
  return rest.length > 1 ? [...found, primitivePart(rest)] : found;
}
