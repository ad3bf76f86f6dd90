import type { Engine } from '../../engine/index';
import { fail } from '../failure';
import { asAlgebraic, decideByEnclosures, fromNum } from '../pi-sum';
import {
  type NumberValue,
  type Single,
  compareValues,
  divide,
  isRealValue,
  mapNumber,
  multiply,
  needNumber,
  needMagnitude,
  number,
  signOf,
} from '../values';
import { negate } from '../values';

export function realPart(engine: Engine, value: Single): Single {
  return mapNumber(engine, needNumber(value, 're needs a number'), (coefficient) =>
    engine.re(coefficient),
  );
}

export function imaginaryPart(engine: Engine, value: Single): Single {
  return mapNumber(engine, needNumber(value, 'im needs a number'), (coefficient) =>
    engine.im(coefficient),
  );
}

export function conjugate(engine: Engine, value: Single): Single {
  return mapNumber(engine, needNumber(value, 'conj needs a number'), (coefficient) =>
    engine.conj(coefficient),
  );
}

/** The size of a value; of a complex one with several powers of π in it there is none of this form. */
export function absolute(engine: Engine, value: Single): Single {
  if (isRealValue(engine, value)) return signOf(engine, value) < 0 ? negate(engine, value) : value;
  const plain = needNumber(value, 'abs needs a number');
  if (plain.sum.size > 1)
    fail(
      'not-exact',
      'The size of a complex value with different powers of π in it has no exact form here.',
    );
  return mapNumber(engine, plain, (coefficient) => engine.abs(coefficient));
}

export function extreme(engine: Engine, values: readonly Single[], sought: -1 | 1): Single {
  const [first, ...others] = values;
  if (first === undefined) throw new RangeError('At least one value is needed.');
  compareValues(engine, first, first);
  return others.reduce(
    (best, value) => (compareValues(engine, best, value) === -sought ? value : best),
    first,
  );
}

/** The whole number, or multiple of a step, that `take` picks: below, or nearest with ties to even. */
export function toWhole(
  engine: Engine,
  name: 'floor' | 'round',
  given: Single,
  step: Single | undefined,
): Single {
  const value = needMagnitude(given, `${name} needs a number or an angle`);
  if (step !== undefined) {
    if (signOf(engine, step) <= 0) fail('domain', `${name} needs a step above 0.`);
    return multiply(engine, wholeOf(engine, name, divide(engine, value, step)), step);
  }
  if (value.kind === 'angle' || value.length !== 0) {
    fail(
      'unit-mismatch',
      `${name} of a value with a unit needs a step with that unit, as in \`${name}(x, 0.5 mm)\`.`,
    );
  }
  return wholeOf(engine, name, value);
}

function wholeOf(engine: Engine, name: 'floor' | 'round', ratio: Single): NumberValue {
  const plain = needNumber(ratio, `${name} needs a number`);
  if (plain.length !== 0) fail('unit-mismatch', `${name} needs a value and a step of one kind.`);
  if (!isRealValue(engine, plain))
    fail('domain', `${name} needs a real number, and this one is not real.`);
  const algebraic = asAlgebraic(engine, plain.sum);
  const whole =
    algebraic !== null
      ? engine[name](algebraic)
      : decideByEnclosures(engine, plain.sum, 64, ({ low, high }) => {
          const below = engine[name](low);
          return below === engine[name](high) ? below : null;
        });
  return number(fromNum(engine, engine.integer(whole)));
}
