import type { Engine, Num } from '../../engine/index';
import { fail } from '../failure';
import { LANGUAGE_LIMITS } from '../limits';
import { fromNum } from '../pi-sum';
import {
  type NumberValue,
  type Single,
  describe,
  needAlgebraic,
  needNumber,
  number,
  power,
  squareRoot,
} from '../values';
import { asAlgebraic } from '../pi-sum';

/**
 * The real cube root of a real value, the principal one of any other, in square roots where they reach it. A dimension
 * must be a multiple of three.
 */
export function cubeRoot(engine: Engine, value: Single): NumberValue {
  const { plain, radicand } = needRadicand(engine, value, 'cbrt');
  if (plain.length % 3 !== 0) {
    fail(
      'unit-mismatch',
      `A cube root divides the dimension by three and this is ${describe(plain)}; a volume or a plain number was expected.`,
    );
  }
  const root = engine.isReal(radicand)
    ? engine.realRoot(radicand, 3)
    : engine.principalRoot(radicand, 3);
  return number(fromNum(engine, root), plain.length / 3);
}

function needRadicand(
  engine: Engine,
  value: Single,
  name: string,
): { plain: NumberValue; radicand: Num } {
  const plain = needNumber(value, `${name} needs a number`);
  const radicand = asAlgebraic(engine, plain.sum);
  return {
    plain,
    radicand:
      radicand ?? fail('not-exact', `${name} of a value with π in it has no exact form here.`),
  };
}

/** x^(p/q), the principal value: the q-th root with its argument in (-π/q, π/q], to the power p. */
export function rationalPower(engine: Engine, base: Single, p: bigint, q: bigint): Single {
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
  let root: Single = odd === 1n ? base : oddRoot(engine, base, Number(odd));
  for (let step = 0; step < halvings; step += 1) root = squareRoot(engine, root);
  return power(engine, root, p);
}

function oddRoot(engine: Engine, base: Single, index: number): NumberValue {
  const { plain, radicand } = needRadicand(engine, base, 'A power with this exponent');
  if (plain.length % index !== 0) {
    fail(
      'unit-mismatch',
      `The exponent divides the dimension by ${index} and this is ${describe(plain)}, which it does not divide.`,
    );
  }
  return number(fromNum(engine, engine.principalRoot(radicand, index)), plain.length / index);
}

/** x to an exponent that is itself an exact value; only rational exponents keep the result algebraic. */
export function raise(engine: Engine, base: Single, exponent: Single): Single {
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
