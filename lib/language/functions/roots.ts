import type { Engine, Num } from '../../engine/index';
import { fail } from '../failure';
import { LANGUAGE_LIMITS } from '../limits';
import { fromNum } from '../pi-sum';
import {
  type NumberValue,
  type Value,
  describe,
  isRealValue,
  needAlgebraic,
  needNumber,
  number,
  power,
  signOf,
  squareRoot,
} from '../values';
import { asAlgebraic } from '../pi-sum';
import { wholeRootsOfCubic, wholeRoot } from './whole-roots';

/**
 * The real cube root of a real value, where it has a form in square roots.
 * Complete for rational values and for values of degree 2; for other values an exact form is not searched for and
 * the sentence says so. A dimension must be a multiple of three.
 */
export function cubeRoot(engine: Engine, value: Value): NumberValue {
  const { plain, radicand } = needReal(engine, value, 'cbrt');
  if (plain.length % 3 !== 0) {
    fail(
      'unit-mismatch',
      `A cube root divides the dimension by three and this is ${describe(plain)}; a volume or a plain number was expected.`,
    );
  }
  return number(fromNum(engine, realCubeRoot(engine, radicand)), plain.length / 3);
}

function needReal(
  engine: Engine,
  value: Value,
  name: string,
): { plain: NumberValue; radicand: Num } {
  const plain = needNumber(value, `${name} needs a number`);
  if (!isRealValue(engine, plain))
    fail('domain', `${name} needs a real number, and this one is not real.`);
  const radicand = asAlgebraic(engine, plain.sum);
  return {
    plain,
    radicand:
      radicand ?? fail('not-exact', `${name} of a value with π in it has no exact form here.`),
  };
}

function realCubeRoot(engine: Engine, radicand: Num): Num {
  const rational = engine.asRational(radicand);
  if (rational !== null) {
    const n = wholeRoot(rational.n, 3);
    const d = wholeRoot(rational.d, 3);
    if (n !== null && d !== null) return engine.rational(n, d);
    return fail(
      'not-exact',
      'This cube root has degree 3, which is no power of two, so straightedge and compass cannot reach it and there is no exact form in square roots.',
    );
  }
  if (engine.degree(radicand) !== 2) {
    return fail(
      'not-exact',
      'A form in square roots is looked for only in cube roots of values of degree 1 or 2, and this value has a higher degree.',
    );
  }
  return (
    cubeRootOfQuadratic(engine, radicand) ??
    fail(
      'not-exact',
      'This cube root has degree 6, which is no power of two, so straightedge and compass cannot reach it and there is no exact form in square roots.',
    )
  );
}

/**
 * The real cube root y of a real quadratic irrational x, when it has degree 2 as well.
 * Let x, x' be conjugate. y lies in the same field exactly when x x' is a rational cube n³ and t = y + y' is a rational
 * root of t³ - 3 n t - (x + x'); then y is a root of y² - t y + n. If not, y³ - x is irreducible over the field and y has
 * degree 6. Every candidate is cubed before it is returned.
 */
function cubeRootOfQuadratic(engine: Engine, x: Num): Num | null {
  const [leading, middle, last] = engine.minimalPolynomial(x);
  if (leading === undefined || middle === undefined || last === undefined) return null;
  // leading·y is an algebraic integer with the cube leading³·x, so its trace and norm are whole.
  const product = last * leading ** 5n;
  const n = wholeRoot(product, 3);
  if (n === null) return null;
  const sum = -middle * leading ** 2n;
  const four = engine.integer(4n);
  for (const t of wholeRootsOfCubic(-3n * n, -sum)) {
    const trace = engine.integer(t);
    const root = engine.sqrt(
      engine.sub(engine.mul(trace, trace), engine.mul(four, engine.integer(n))),
    );
    for (const signed of [root, engine.neg(root)]) {
      const y = engine.div(engine.add(trace, signed), engine.integer(2n * leading));
      if (engine.isReal(y) && engine.equal(engine.pow(y, 3n), x)) return y;
    }
  }
  return null;
}

/**
 * x^(p/q), the principal value. Powers of two in q are square roots, whatever x is; an odd part of q needs x real
 * and not negative, and a root that comes out exactly.
 */
export function rationalPower(engine: Engine, base: Value, p: bigint, q: bigint): Value {
  let odd = q;
  let halvings = 0;
  while (odd % 2n === 0n) {
    odd /= 2n;
    halvings += 1;
  }
  if (odd > BigInt(LANGUAGE_LIMITS.rootIndex) || halvings > LANGUAGE_LIMITS.rootIndex) {
    fail(
      'limit-size',
      `The exponent asks for a root of index ${q}; the limit is ${LANGUAGE_LIMITS.rootIndex} for its odd part and as many square roots.`,
    );
  }
  let root: Value = odd === 1n ? base : oddRoot(engine, base, Number(odd));
  for (let step = 0; step < halvings; step += 1) root = squareRoot(engine, root);
  return power(engine, root, p);
}

function oddRoot(engine: Engine, base: Value, index: number): NumberValue {
  const { plain, radicand } = needReal(engine, base, 'A power with this exponent');
  if (signOf(engine, plain) < 0) {
    const instead = index === 3 ? '; the real cube root is written `cbrt(x)`' : '';
    fail(
      'not-exact',
      `The principal value of this power of a negative number is not real and has no exact form here${instead}.`,
    );
  }
  if (plain.length % index !== 0) {
    fail(
      'unit-mismatch',
      `The exponent divides the dimension by ${index} and this is ${describe(plain)}, which it does not divide.`,
    );
  }
  const length = plain.length / index;
  if (index === 3) return number(fromNum(engine, realCubeRoot(engine, radicand)), length);
  const rational = engine.asRational(radicand);
  const n = rational === null ? null : wholeRoot(rational.n, index);
  const d = rational === null ? null : wholeRoot(rational.d, index);
  if (n === null || d === null) {
    return fail(
      'not-exact',
      `The root of index ${index} is exact here only for powers of rational numbers with that exponent, and this is none.`,
    );
  }
  return number(fromNum(engine, engine.rational(n, d)), length);
}

/** x to an exponent that is itself an exact value; only rational exponents keep the result algebraic. */
export function raise(engine: Engine, base: Value, exponent: Value): Value {
  const exact = needAlgebraic(engine, exponent, 'An exponent is a plain number');
  const rational = engine.asRational(exact);
  if (rational === null) {
    return fail(
      'not-exact',
      'The exponent is irrational; such a power of an algebraic number other than 0 and 1 is transcendental (Gelfond and Schneider), so a rational exponent was expected.',
    );
  }
  return rational.d === 1n
    ? power(engine, base, rational.n)
    : rationalPower(engine, base, rational.n, rational.d);
}
