import { type Engine, type Num, PackedNum } from '../engine/index';
import type { LineValue } from './values';

declare const opaque: unique symbol;

/** A value as plain data, free of the engine that worked it out. */
export interface PackedValue {
  readonly [opaque]: 'packed value';
}

/** A value, or a function, as plain data that outlives its engine, with all that hangs on it. Fails only over a limit of the engine. */
export function packValue(engine: Engine, value: LineValue): PackedValue {
  return mapParts(value, (part) =>
    engine.holds(part) ? engine.pack(part) : undefined,
  ) as PackedValue;
}

/** A packed value in the engine given. Its roots are proven anew there, so a limit may be met. */
export function unpackValue(engine: Engine, packed: PackedValue): LineValue {
  return mapParts(packed, (part): Num | undefined =>
    part instanceof PackedNum ? engine.unpack(part) : undefined,
  ) as LineValue;
}

/** About how many integers a packed value holds. */
export function sizeOfPacked(packed: PackedValue): number {
  let size = 0;
  mapParts(packed, (part) => {
    size += part instanceof PackedNum ? part.size : 1;
    return part instanceof PackedNum ? part : undefined;
  });
  return size;
}

/** A copy of plain data in which `change` replaces parts; what it answers `undefined` for is copied. */
function mapParts(part: unknown, change: (part: unknown) => unknown): unknown {
  if (typeof part === 'function') throw new TypeError('A value holds a function.');
  if (typeof part !== 'object' || part === null) return part;
  const changed = change(part);
  if (changed !== undefined) return changed;
  if (Array.isArray(part)) return part.map((each) => mapParts(each, change));
  if (part instanceof Map)
    return new Map([...part].map(([key, each]) => [key as unknown, mapParts(each, change)]));
  return Object.fromEntries(
    Object.entries(part).map(([name, each]) => [name, mapParts(each, change)]),
  );
}
