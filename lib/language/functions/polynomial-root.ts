import type { Engine, Num } from '../../engine/index';
import { fail } from '../failure';
import type { Polynomial } from '../polynomial';

/**
 * The root of a polynomial that lies nearest to a place. Every root counts, real or not, and the answer is exact
 * whatever the degree up to the limit. Two roots equally near: `domain`.
 */
export function nearestRoot(engine: Engine, polynomial: Polynomial, near: Num): Num {
  if (polynomial.length < 2)
    fail('domain', 'root needs a polynomial in which x occurs, as in `root(x^2 - 2, 1)`.');
  const rational = integerCoefficients(engine, polynomial);
  if (rational !== null) return engine.nearestRoot(rational, near);
  const solved = polynomial.every(
    (coefficient) => engine.reach(coefficient).kind === 'constructible',
  )
    ? solveBySquareRoots(engine, polynomial)
    : null;
  return solved === null
    ? engine.nearestRootOf([...polynomial].reverse(), near)
    : nearestOf(engine, solved, near);
}

function nearestOf(engine: Engine, roots: readonly Num[], near: Num): Num {
  const gap = (root: Num): Num => {
    const difference = engine.sub(root, near);
    return engine.mul(difference, engine.conj(difference));
  };
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

/** All roots where linear and quadratic equations give them, in x or in x^(2^k); else null. */
function solveBySquareRoots(engine: Engine, polynomial: Polynomial): Num[] | null {
  const lowest = polynomial.findIndex((coefficient) => !engine.isZero(coefficient));
  const roots = rootsOfReduced(engine, polynomial.slice(lowest));
  return roots !== null && lowest > 0 ? [engine.integer(0n), ...roots] : roots;
}

/** Roots of a polynomial whose constant term is not 0. */
function rootsOfReduced(engine: Engine, polynomial: Polynomial): Num[] | null {
  const degree = polynomial.length - 1;
  if (degree === 0) return [];
  const [c, b, a] = polynomial as [Num, Num, Num | undefined];
  if (a === undefined) return [engine.neg(engine.div(c, b))];
  if (degree === 2) return rootsOfQuadratic(engine, a, b, c);
  if (polynomial.some((coefficient, power) => power % 2 === 1 && !engine.isZero(coefficient)))
    return null;
  const squares = rootsOfReduced(
    engine,
    polynomial.filter((_, power) => power % 2 === 0),
  );
  if (squares === null) return null;
  return squares.flatMap((square) => {
    const root = engine.sqrt(square);
    return [root, engine.neg(root)];
  });
}

function rootsOfQuadratic(engine: Engine, a: Num, b: Num, c: Num): Num[] {
  const discriminant = engine.sub(
    engine.mul(b, b),
    engine.mul(engine.integer(4n), engine.mul(a, c)),
  );
  const root = engine.sqrt(discriminant);
  const double = engine.mul(engine.integer(2n), a);
  return [
    engine.div(engine.sub(root, b), double),
    engine.div(engine.neg(engine.add(root, b)), double),
  ];
}
