import type { Engine, Num } from '../../engine/index';
import { fail } from '../failure';
import type { Polynomial } from '../polynomial';

/**
 * The root of a polynomial that lies nearest to a place. With rational coefficients every root counts, real or not,
 * and the answer is exact whatever the degree up to the limit. With other real coefficients the real roots that linear
 * and quadratic equations give are covered, also in x^(2^k). Two roots equally near: `domain`.
 */
export function nearestRoot(engine: Engine, polynomial: Polynomial, near: Num): Num {
  const rational = integerCoefficients(engine, polynomial);
  if (rational !== null && polynomial.length > 1) return engine.nearestRoot(rational, near);
  if (!engine.isReal(near) || !polynomial.every((coefficient) => engine.isReal(coefficient))) {
    fail(
      'domain',
      'root needs rational coefficients, or real ones and a real place near the root.',
    );
  }
  if (polynomial.length < 2)
    fail('domain', 'root needs a polynomial in which x occurs, as in `root(x^2 - 2, 1)`.');
  const roots = realRoots(engine, polynomial);
  if (roots.length === 0) fail('domain', 'This polynomial has no real root.');
  const gap = (root: Num): Num => engine.abs(engine.sub(root, near));
  let [best] = roots as [Num, ...Num[]];
  let tie = false;
  for (const root of roots.slice(1)) {
    if (engine.equal(root, best)) continue;
    const order = engine.compare(gap(root), gap(best));
    if (order < 0) best = root;
    tie = order === 0 || (tie && order > 0);
  }
  if (tie)
    fail(
      'domain',
      'Two roots of this polynomial lie equally near; a place nearer to one of them was expected.',
    );
  if (!engine.isZero(evaluate(engine, polynomial, best)))
    throw new Error('A root that was found does not satisfy its polynomial.');
  return best;
}

/** Whole coefficients of a multiple of the polynomial, highest power first, or null when one is irrational. */
function integerCoefficients(engine: Engine, polynomial: Polynomial): bigint[] | null {
  const fractions = polynomial.map((coefficient) => engine.asRational(coefficient));
  const common = fractions.reduce((product, fraction) => product * (fraction?.d ?? 1n), 1n);
  const whole: bigint[] = [];
  for (const fraction of fractions) {
    if (fraction === null) return null;
    whole.push((fraction.n * common) / fraction.d);
  }
  return whole.reverse();
}

function realRoots(engine: Engine, polynomial: Polynomial): Num[] {
  const lowest = polynomial.findIndex((coefficient) => !engine.isZero(coefficient));
  const reduced = polynomial.slice(lowest);
  const zero = lowest > 0 ? [engine.integer(0n)] : [];
  return [...zero, ...rootsOfReduced(engine, reduced)];
}

/** Roots of a polynomial whose constant term is not 0. */
function rootsOfReduced(engine: Engine, polynomial: Polynomial): Num[] {
  const degree = polynomial.length - 1;
  if (degree === 0) return [];
  const [c, b, a] = polynomial as [Num, Num, Num | undefined];
  if (a === undefined) return [engine.neg(engine.div(c, b))];
  if (degree === 2) return rootsOfQuadratic(engine, a, b, c);
  if (polynomial.some((coefficient, power) => power % 2 === 1 && !engine.isZero(coefficient))) {
    fail(
      'not-exact',
      `A root of a polynomial of degree ${degree} has an exact form here only when square roots alone solve it: degree 2, or such a polynomial in x^2.`,
    );
  }
  const inSquares = polynomial.filter((_, power) => power % 2 === 0);
  return rootsOfReduced(engine, inSquares).flatMap((square) => {
    if (engine.sign(square) < 0) return [];
    const root = engine.sqrt(square);
    return [root, engine.neg(root)];
  });
}

function rootsOfQuadratic(engine: Engine, a: Num, b: Num, c: Num): Num[] {
  const discriminant = engine.sub(
    engine.mul(b, b),
    engine.mul(engine.integer(4n), engine.mul(a, c)),
  );
  if (engine.sign(discriminant) < 0) return [];
  const root = engine.sqrt(discriminant);
  const double = engine.mul(engine.integer(2n), a);
  return [
    engine.div(engine.sub(root, b), double),
    engine.div(engine.neg(engine.add(root, b)), double),
  ];
}

function evaluate(engine: Engine, polynomial: Polynomial, x: Num): Num {
  return polynomial.reduceRight<Num>(
    (total, coefficient) => engine.add(engine.mul(total, x), coefficient),
    engine.integer(0n),
  );
}
