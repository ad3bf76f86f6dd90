import type { Engine } from '../engine/index';
import { fail } from './failure';
import { LANGUAGE_LIMITS } from './limits';
import {
  type ListValue,
  type Single,
  type Value,
  describe,
  needAlgebraic,
  needSingle,
} from './values';

/** Makes a list of at least one value; `limit-size` when it holds too many values or lists too deep. */
export function list(items: readonly Value[]): ListValue {
  let size = 0;
  let depth = 1;
  for (const item of items) {
    size += item.kind === 'list' ? item.size : 1;
    depth = Math.max(depth, item.kind === 'list' ? item.depth + 1 : 1);
  }
  checkSize(size);
  if (depth > LANGUAGE_LIMITS.listDepth)
    fail(
      'limit-size',
      `Lists are nested ${depth} deep here; the limit is ${LANGUAGE_LIMITS.listDepth}.`,
    );
  return { kind: 'list', items, size, depth };
}

function checkSize(size: number | bigint): void {
  if (size > LANGUAGE_LIMITS.listItems)
    fail(
      'limit-size',
      `The list would have ${size} items; the limit is ${LANGUAGE_LIMITS.listItems}.`,
    );
}

/**
 * Applies an action to single values; where lists stand in their place, to the first items, the second ones and so on.
 * All lists must have one count (`domain`); a single value goes with every item.
 */
export function itemByItem(
  args: readonly Value[],
  action: (args: readonly Single[]) => Value,
): Value {
  const lists = args.filter((arg) => arg.kind === 'list');
  const [first] = lists;
  if (first === undefined) return action(args.map(needSingle));
  const other = lists.find(({ items }) => items.length !== first.items.length);
  if (other !== undefined)
    fail(
      'domain',
      `Lists are worked on item by item and need one count; here are ${describe(first)} and ${describe(other)}.`,
    );
  return list(
    first.items.map((_, index) =>
      itemByItem(
        args.map((arg) => (arg.kind === 'list' ? (arg.items[index] as Value) : arg)),
        action,
      ),
    ),
  );
}

/** The item with this number, counted from 1. The number is an exact whole one; outside the list it is `domain`. */
export function itemOf(engine: Engine, value: Value, index: Value): Value {
  if (value.kind !== 'list')
    return fail(
      'unit-mismatch',
      `Only a list has items that are told by number, and this is ${describe(value)}.`,
    );
  const place = wholeNumber(engine, index, 'The number of an item');
  const count = value.items.length;
  const item = place >= 1n && place <= BigInt(count) ? value.items[Number(place) - 1] : undefined;
  const only = count === 1 ? 'the list has 1 item' : `the list has ${count} items, numbered from 1`;
  return item ?? fail('domain', `There is no item ${place}; ${only}.`);
}

/** The counts from first to last; `domain` when they are no whole numbers in this order, `limit-size` when too many. */
export function countsBetween(engine: Engine, first: Value, last: Value): bigint[] {
  const from = wholeNumber(engine, first, 'The first count of `each`');
  const to = wholeNumber(engine, last, 'The last count of `each`');
  if (to < from)
    fail('domain', `\`each\` counts upwards, and ${to} is below ${from}; a list is never empty.`);
  checkSize(to - from + 1n);
  return Array.from({ length: Number(to - from) + 1 }, (_, step) => from + BigInt(step));
}

function wholeNumber(engine: Engine, value: Value, what: string): bigint {
  const plain = engine.asRational(needAlgebraic(engine, value, `${what} is a whole number`));
  if (plain?.d === 1n) return plain.n;
  return fail('domain', `${what} is a whole number, and this is none.`);
}
