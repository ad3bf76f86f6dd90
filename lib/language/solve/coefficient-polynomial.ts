import type { Engine, Num } from '../../engine/index';
import { fail } from '../failure';
import {
  type PiSum,
  addSums,
  asAlgebraic,
  divideSums,
  fromNum,
  multiplySums,
  negateSum,
} from '../pi-sum';

/** A polynomial in the unknown, lowest power first, without a leading zero; the empty list is 0. */
export type UnknownPolynomial = readonly PiSum[];

/** Above this degree an equation is no longer brought to a polynomial. */
const LARGEST_DEGREE = 64;

export function constant(value: PiSum): UnknownPolynomial {
  return value.size === 0 ? [] : [value];
}

/** The unknown itself. */
export function unknown(engine: Engine): UnknownPolynomial {
  return [new Map(), fromNum(engine, engine.integer(1n))];
}

export function one(engine: Engine): UnknownPolynomial {
  return constant(fromNum(engine, engine.integer(1n)));
}

export function addPolynomials(
  engine: Engine,
  a: UnknownPolynomial,
  b: UnknownPolynomial,
): UnknownPolynomial {
  const [longer, shorter] = a.length >= b.length ? [a, b] : [b, a];
  return trim(
    longer.map((coefficient, power) => {
      const other = shorter[power];
      return other === undefined ? coefficient : addSums(engine, coefficient, other);
    }),
  );
}

export function negatePolynomial(engine: Engine, a: UnknownPolynomial): UnknownPolynomial {
  return a.map((coefficient) => negateSum(engine, coefficient));
}

/** Cost: one product of coefficients for each pair. Degrees above the limit are `limit-size`. */
export function multiplyPolynomials(
  engine: Engine,
  a: UnknownPolynomial,
  b: UnknownPolynomial,
): UnknownPolynomial {
  if (a.length === 0 || b.length === 0) return [];
  const degree = a.length + b.length - 2;
  if (degree > LARGEST_DEGREE) {
    fail(
      'limit-size',
      `The equation leads to a polynomial of degree ${degree} in the unknown; the limit is ${LARGEST_DEGREE}.`,
    );
  }
  const product: PiSum[] = Array.from({ length: degree + 1 }, () => new Map());
  a.forEach((x, i) => {
    b.forEach((y, j) => {
      product[i + j] = addSums(engine, product[i + j] as PiSum, multiplySums(engine, x, y));
    });
  });
  return trim(product);
}

export function areEqualPolynomials(
  engine: Engine,
  a: UnknownPolynomial,
  b: UnknownPolynomial,
): boolean {
  if (a.length !== b.length) return false;
  return addPolynomials(engine, a, negatePolynomial(engine, b)).length === 0;
}

export function dividedBy(engine: Engine, a: UnknownPolynomial, divisor: PiSum): UnknownPolynomial {
  return a.map((coefficient) => divideSums(engine, coefficient, divisor));
}

/** The coefficients as algebraic numbers, or null when π is in one of them. */
export function algebraicCoefficients(engine: Engine, a: UnknownPolynomial): Num[] | null {
  const coefficients: Num[] = [];
  for (const coefficient of a) {
    const algebraic = asAlgebraic(engine, coefficient);
    if (algebraic === null) return null;
    coefficients.push(algebraic);
  }
  return coefficients;
}

export function fromCoefficients(engine: Engine, coefficients: readonly Num[]): UnknownPolynomial {
  return trim(coefficients.map((coefficient) => fromNum(engine, coefficient)));
}

/**
 * The greatest common divisor with leading coefficient 1, by Euclid over the field of the coefficients. With π in a
 * coefficient 1 is given, which is a common divisor and not always the greatest.
 */
export function commonDivisor(
  engine: Engine,
  a: UnknownPolynomial,
  b: UnknownPolynomial,
): UnknownPolynomial {
  let x = algebraicCoefficients(engine, a);
  let y = algebraicCoefficients(engine, b);
  if (x === null || y === null) return one(engine);
  while (y.length > 0) [x, y] = [y, divideWithRemainder(engine, x, y).remainder];
  const lead = x.at(-1);
  if (lead === undefined) return [];
  return fromCoefficients(
    engine,
    x.map((coefficient) => engine.div(coefficient, lead)),
  );
}

/** The quotient of algebraic polynomials where the division leaves no remainder. */
export function exactQuotient(
  engine: Engine,
  a: UnknownPolynomial,
  b: UnknownPolynomial,
): UnknownPolynomial {
  const [top, bottom] = [algebraicCoefficients(engine, a), algebraicCoefficients(engine, b)];
  if (top === null || bottom === null) throw new Error('Only algebraic polynomials are divided.');
  return fromCoefficients(engine, divideWithRemainder(engine, top, bottom).quotient);
}

function divideWithRemainder(
  engine: Engine,
  a: readonly Num[],
  b: readonly Num[],
): { quotient: Num[]; remainder: Num[] } {
  const remainder = [...a];
  const quotient: Num[] = [];
  const lead = b.at(-1) as Num;
  for (let shift = a.length - b.length; shift >= 0; shift -= 1) {
    const factor = engine.div(remainder[shift + b.length - 1] as Num, lead);
    quotient.unshift(factor);
    b.forEach((coefficient, power) => {
      const place = shift + power;
      remainder[place] = engine.sub(remainder[place] as Num, engine.mul(factor, coefficient));
    });
    remainder.pop();
  }
  while (remainder.length > 0 && engine.isZero(remainder.at(-1) as Num)) remainder.pop();
  return { quotient, remainder };
}

function trim(coefficients: readonly PiSum[]): UnknownPolynomial {
  let length = coefficients.length;
  while (length > 0 && (coefficients[length - 1] as PiSum).size === 0) length -= 1;
  return coefficients.slice(0, length);
}
