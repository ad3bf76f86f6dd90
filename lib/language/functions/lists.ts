import type { Engine } from '../../engine/index';
import { fail } from '../failure';
import { itemByItem } from '../lists';
import { fromNum } from '../pi-sum';
import {
  type ListValue,
  type NumberValue,
  type Single,
  type Value,
  add,
  describe,
  number,
} from '../values';

/** The single values of a list and of the lists inside it, in order; a single value is itself. */
export function flatten(value: Value): Single[] {
  return value.kind === 'list' ? value.items.flatMap(flatten) : [value];
}

/** The sum of the items; lists inside are added item by item. All must be of one kind. */
export function sumOf(engine: Engine, value: Value): Value {
  return needList(value, 'sum').items.reduce((total, item) =>
    itemByItem([total, item], ([a, b]) => add(engine, a as Single, b as Single)),
  );
}

export function countOf(engine: Engine, value: Value): NumberValue {
  return number(fromNum(engine, engine.integer(BigInt(needList(value, 'count').items.length))));
}

function needList(value: Value, name: string): ListValue {
  if (value.kind === 'list') return value;
  return fail(
    'unit-mismatch',
    `${name} needs a list such as \`[2 mm, 3 mm]\`, and this is ${describe(value)}.`,
  );
}
