import type { Engine, Num } from '../../engine/index';
import type { TurnPart } from '../../geometry/index';
import { fail } from '../failure';
import { asAlgebraic } from '../pi-sum';
import {
  type NumberValue,
  type Single,
  type Value,
  angle,
  describe,
  needAlgebraic,
  number,
} from '../values';
import { fromNum } from '../pi-sum';

/**
 * Reads a value as an angle in turns.
 * Accepts an angle, or a plain number in radians. c π radians are c/2 turns. Any other algebraic number than 0 of radians
 * has a transcendental sine and cosine (Lindemann 1882): `not-exact`.
 */
export function turnsOf(engine: Engine, value: Value): Num {
  if (value.kind === 'angle') return value.turns;
  if (value.kind !== 'number' || value.length !== 0)
    return fail('unit-mismatch', `An angle was expected, and this is ${describe(value)}.`);
  const algebraic = asAlgebraic(engine, value.sum);
  if (algebraic !== null) {
    if (engine.isZero(algebraic)) return algebraic;
    return fail(
      'not-exact',
      'A plain number is an angle in radians, and sine and cosine of an algebraic number of radians other than 0 are transcendental (Lindemann); give the angle in `deg`, `turn` or multiples of π.',
    );
  }
  const coefficient = value.sum.size === 1 ? value.sum.get(1) : undefined;
  if (coefficient === undefined) {
    return fail(
      'not-exact',
      'This angle in radians is not an algebraic multiple of π, so its sine and cosine have no exact form here.',
    );
  }
  if (!engine.isReal(coefficient))
    return fail('domain', 'A real angle was expected, and this one is not real.');
  return engine.div(coefficient, engine.integer(2n));
}

/**
 * The angle as k/n of a turn.
 * An irrational algebraic part of a turn has transcendental sine and cosine (Gelfond 1934, Schneider 1934): `not-exact`.
 */
export function partOfTurn(engine: Engine, value: Value): TurnPart {
  const part = engine.asRational(turnsOf(engine, value));
  if (part === null) {
    return fail(
      'not-exact',
      'The angle is an irrational part of a turn, so its sine and cosine are transcendental (Gelfond and Schneider) and have no exact form.',
    );
  }
  return { k: part.n, n: part.d };
}

const plain = (engine: Engine, value: Num): NumberValue => number(fromNum(engine, value));

export function cosine(engine: Engine, value: Single): NumberValue {
  const { k, n } = partOfTurn(engine, value);
  return plain(engine, engine.cosTurn(k, n));
}

export function sine(engine: Engine, value: Single): NumberValue {
  const { k, n } = partOfTurn(engine, value);
  return plain(engine, engine.sinTurn(k, n));
}

export const tangent = (engine: Engine, value: Single): NumberValue =>
  ratio(engine, value, 'tangent', 'at a quarter turn from 0', (k, n) => [
    engine.sinTurn(k, n),
    engine.cosTurn(k, n),
  ]);

export const cotangent = (engine: Engine, value: Single): NumberValue =>
  ratio(engine, value, 'cotangent', 'at a whole number of half turns', (k, n) => [
    engine.cosTurn(k, n),
    engine.sinTurn(k, n),
  ]);

export const secant = (engine: Engine, value: Single): NumberValue =>
  ratio(engine, value, 'secant', 'at a quarter turn from 0', (k, n) => [
    engine.integer(1n),
    engine.cosTurn(k, n),
  ]);

export const cosecant = (engine: Engine, value: Single): NumberValue =>
  ratio(engine, value, 'cosecant', 'at a whole number of half turns', (k, n) => [
    engine.integer(1n),
    engine.sinTurn(k, n),
  ]);

/** A quotient of circular functions; `domain` where the lower one is 0. */
function ratio(
  engine: Engine,
  value: Single,
  name: string,
  place: string,
  parts: (k: bigint, n: bigint) => [above: Num, below: Num],
): NumberValue {
  const { k, n } = partOfTurn(engine, value);
  const [above, below] = parts(k, n);
  if (engine.isZero(below)) {
    fail('domain', `The ${name} has no value ${place}; another angle was expected.`);
  }
  return plain(engine, engine.div(above, below));
}

export function arcCosine(engine: Engine, value: Single): Single {
  const cosineValue = needProperSine(engine, value, 'acos');
  return angle(turnsWithCosine(engine, cosineValue, 'acos'));
}

/** asin(y) is a quarter turn less acos(y). */
export function arcSine(engine: Engine, value: Single): Single {
  const sineValue = needProperSine(engine, value, 'asin');
  return angle(engine.sub(engine.rational(1n, 4n), turnsWithCosine(engine, sineValue, 'asin')));
}

/** With cos 2a = (1 - y²)/(1 + y²) and the sign of y. */
export function arcTangent(engine: Engine, value: Single): Single {
  const y = needReal(engine, value, 'atan');
  const one = engine.integer(1n);
  const square = engine.mul(y, y);
  const doubled = engine.div(engine.sub(one, square), engine.add(one, square));
  const turns = engine.div(turnsWithCosine(engine, doubled, 'atan'), engine.integer(2n));
  return angle(engine.sign(y) < 0 ? engine.neg(turns) : turns);
}

function needReal(engine: Engine, value: Single, name: string): Num {
  const algebraic = needAlgebraic(engine, value, `${name} needs a plain number`);
  if (!engine.isReal(algebraic))
    fail('domain', `${name} needs a real number, and this one is not real.`);
  return algebraic;
}

function needProperSine(engine: Engine, value: Single, name: string): Num {
  const algebraic = needReal(engine, value, name);
  const one = engine.integer(1n);
  if (engine.compare(algebraic, one) > 0 || engine.compare(algebraic, engine.neg(one)) < 0) {
    fail('domain', `${name} needs a number from -1 to 1, and this one lies outside.`);
  }
  return algebraic;
}

/**
 * The part of a turn, from 0 to 1/2, whose cosine this is; null when it is no rational part.
 * For n > 2 the degree of cos(2πk/n), k prime to n, is φ(n)/2 (Lehmer 1933), so only few n come into question; within
 * one n the cosine falls as k grows, and exact comparisons find k or prove that there is none.
 * Cost: log n comparisons for each n.
 */
export function findTurnsWithCosine(engine: Engine, value: Num): Num | null {
  for (const n of divisionsOfDegree(BigInt(engine.degree(value)))) {
    let low = 0n;
    let high = n / 2n;
    while (low <= high) {
      const k = (low + high) / 2n;
      const order = engine.compare(engine.cosTurn(k, n), value);
      if (order === 0) return engine.rational(k, n);
      if (order > 0) low = k + 1n;
      else high = k - 1n;
    }
  }
  return null;
}

function turnsWithCosine(engine: Engine, value: Num, name: string): Num {
  return (
    findTurnsWithCosine(engine, value) ??
    fail(
      'not-exact',
      `The angle that ${name} asks for is not a rational part of a turn, so it has no exact measure; its sine and cosine can be used as they are.`,
    )
  );
}

/**
 * All n whose cosine has this degree, φ(n) = 2·degree; degree 1 leaves 4 and 6 apart from the whole turns' own ±1.
 * With φ(n) ≥ √(n/2) only n ≤ 8·degree² come into question; beyond the divisions that the engine knows, only
 * those that can be struck are looked at.
 */
function divisionsOfDegree(degree: bigint): bigint[] {
  if (degree === 1n) return [4n, 6n];
  const totient = 2n * degree;
  const limit = 8n * degree * degree;
  const found: bigint[] = [];
  for (let n = 3n; n <= limit && n <= LARGEST_PLAIN_DIVISION; n += 1n) {
    if (totientOf(n) === totient) found.push(n);
  }
  return [...found, ...strikableDivisions(totient).filter((n) => n > LARGEST_PLAIN_DIVISION)];
}

/** The engine has the cosines of every division up to this one. */
const LARGEST_PLAIN_DIVISION = 2000n;

function totientOf(n: bigint): bigint {
  let rest = n;
  let totient = n;
  for (let p = 2n; p * p <= rest; p += 1n) {
    if (rest % p !== 0n) continue;
    totient -= totient / p;
    while (rest % p === 0n) rest /= p;
  }
  return rest > 1n ? totient - totient / rest : totient;
}

/** All n of this totient with a division that can be struck. */
function strikableDivisions(totient: bigint): bigint[] {
  const found: bigint[] = [];
  const primes = [3n, 5n, 17n, 257n, 65537n];
  for (let choice = 0; choice < 1 << primes.length; choice += 1) {
    const chosen = primes.filter((_, index) => (choice >> index) & 1);
    const odd = chosen.reduce((product, prime) => product * prime, 1n);
    const oddTotient = chosen.reduce((product, prime) => product * (prime - 1n), 1n);
    if (oddTotient === totient) found.push(odd, 2n * odd);
    for (
      let power = 4n, powerTotient = 2n;
      oddTotient * powerTotient <= totient;
      power *= 2n, powerTotient *= 2n
    ) {
      if (oddTotient * powerTotient === totient) found.push(power * odd);
    }
  }
  return found;
}
