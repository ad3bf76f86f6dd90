import type { Engine } from '../../engine/index';
import { fail } from '../failure';
import { fromNum } from '../pi-sum';
import {
  type NumberValue,
  type Single,
  angle,
  multiply,
  needNumber,
  number,
  signOf,
  subtract,
} from '../values';
import { cosine, sine, turnsOf } from './circular';

/** 2 R sin(angle/2) for an angle at the centre from 0 to a whole turn; `domain` outside it. */
export function chord(engine: Engine, radius: Single, central: Single): Single {
  const { half, reach } = halfOf(engine, radius, central, 'chord');
  return multiply(engine, multiply(engine, whole(engine, 2n), reach), sine(engine, half));
}

/** R (1 - cos(angle/2)): from the middle of the chord to the arc. */
export function sagitta(engine: Engine, radius: Single, central: Single): Single {
  const { half, reach } = halfOf(engine, radius, central, 'sagitta');
  return multiply(engine, reach, subtract(engine, whole(engine, 1n), cosine(engine, half)));
}

/** 1 - cos(angle). */
export function versine(engine: Engine, value: Single): Single {
  return subtract(engine, whole(engine, 1n), cosine(engine, value));
}

function halfOf(
  engine: Engine,
  radius: Single,
  central: Single,
  name: string,
): { half: Single; reach: NumberValue } {
  const reach = needNumber(radius, `${name} needs a radius first`);
  if (signOf(engine, reach) < 0)
    fail('domain', `${name} needs a radius that is not negative, and this one is.`);
  const turns = turnsOf(engine, central);
  if (engine.sign(turns) < 0 || engine.compare(turns, engine.integer(1n)) > 0) {
    fail(
      'domain',
      `${name} needs an angle at the centre from 0 to one turn, and this one lies outside.`,
    );
  }
  return { half: angle(engine.div(turns, engine.integer(2n))), reach };
}

const whole = (engine: Engine, n: bigint): NumberValue =>
  number(fromNum(engine, engine.integer(n)));
