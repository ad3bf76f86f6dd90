import type { Engine } from '../../engine/index';
import { fail } from '../failure';
import {
  type PiSum,
  addSums,
  divideSums,
  fromNum,
  mapSum,
  multiplySums,
  negateSum,
  sqrtSum,
} from '../pi-sum';
import {
  type UnknownPolynomial,
  algebraicCoefficients,
  commonDivisor,
  exactQuotient,
} from './coefficient-polynomial';

/**
 * The roots of a polynomial of positive degree with exact coefficients, each once, in no order.
 * Linear and quadratic polynomials are solved whatever their coefficients are, and with them every polynomial that
 * is one of these in u^2, u^4, …; of others all roots are given when the coefficients are algebraic. A degree that
 * the engine cannot solve ends in its named limit. Cost: a square root for each halving, else that of isolating roots.
 */
export function rootsOf(engine: Engine, polynomial: UnknownPolynomial): PiSum[] {
  const lowest = polynomial.findIndex((coefficient) => coefficient.size > 0);
  const zero: PiSum[] = lowest > 0 ? [new Map()] : [];
  const reduced = withoutRepeats(engine, polynomial.slice(lowest));
  return [...zero, ...rootsOfReduced(engine, reduced)];
}

/** Without repeated roots: divided by the greatest common divisor with the derivative. */
function withoutRepeats(engine: Engine, polynomial: UnknownPolynomial): UnknownPolynomial {
  if (polynomial.length < 4) return polynomial;
  const derivative = polynomial
    .slice(1)
    .map((coefficient, power) =>
      mapSum(engine, coefficient, (factor) =>
        engine.mul(factor, engine.integer(BigInt(power) + 1n)),
      ),
    );
  const common = commonDivisor(engine, polynomial, derivative);
  return common.length > 1 ? exactQuotient(engine, polynomial, common) : polynomial;
}

/** Roots of a polynomial whose constant term is not 0. */
function rootsOfReduced(engine: Engine, polynomial: UnknownPolynomial): PiSum[] {
  const degree = polynomial.length - 1;
  const [c, b, a] = polynomial;
  if (degree === 0 || c === undefined || b === undefined) return [];
  if (degree === 1) return [divideSums(engine, negateSum(engine, c), b)];
  if (degree === 2 && a !== undefined) return rootsOfQuadratic(engine, a, b, c);
  if (polynomial.every((coefficient, power) => power % 2 === 0 || coefficient.size === 0)) {
    const inSquares = polynomial.filter((_, power) => power % 2 === 0);
    return rootsOfReduced(engine, inSquares).flatMap((square) => {
      const root = sqrtSum(engine, square);
      return [root, negateSum(engine, root)];
    });
  }
  const coefficients = algebraicCoefficients(engine, polynomial);
  if (coefficients === null) {
    return fail(
      'not-exact',
      `The equation leads to a polynomial of degree ${degree} with π in its coefficients, which has no exact solution here; degree 1 or 2 was expected.`,
    );
  }
  return engine.roots([...coefficients].reverse()).map((root) => fromNum(engine, root));
}

function rootsOfQuadratic(engine: Engine, a: PiSum, b: PiSum, c: PiSum): PiSum[] {
  const times = (factor: bigint, value: PiSum): PiSum =>
    mapSum(engine, value, (coefficient) => engine.mul(coefficient, engine.integer(factor)));
  const discriminant = addSums(
    engine,
    multiplySums(engine, b, b),
    times(-4n, multiplySums(engine, a, c)),
  );
  const divisor = times(2n, a);
  const opposite = negateSum(engine, b);
  if (discriminant.size === 0) return [divideSums(engine, opposite, divisor)];
  const root = sqrtSum(engine, discriminant);
  return [negateSum(engine, root), root].map((signed) =>
    divideSums(engine, addSums(engine, opposite, signed), divisor),
  );
}
