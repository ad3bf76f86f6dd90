/** The order of ids when two sides moved, added and took away, and where they contradict. */
export interface MergedOrder {
  readonly ids: readonly string[];
  /** Moved by both and to different places; they stand where I put them. */
  readonly contested: readonly string[];
}

/**
 * Brings two orders of one list together. `alive` are the ids that the result has. What one side moved or added stands
 * after what it follows on that side; where both added at one place, theirs comes first. Deterministic. Cost: O(n log n)
 * but for moved and added ids, each of which costs one look through the list.
 */
export function mergeOrder(
  base: readonly string[],
  mine: readonly string[],
  theirs: readonly string[],
  alive: ReadonlySet<string>,
): MergedOrder {
  const [inBase, inMine, inTheirs] = [new Set(base), new Set(mine), new Set(theirs)];
  const moved = findMoved(base, mine);
  const contested = findContested(moved, findMoved(base, theirs), mine, theirs);

  const ids = theirs.filter((id) => alive.has(id) && !moved.has(id));
  let previous: string | null = null;
  for (const id of mine) {
    if (!alive.has(id)) continue;
    if (moved.has(id) || !inTheirs.has(id)) {
      let at = previous === null ? 0 : ids.indexOf(previous) + 1;
      const isTheirNew = (other: string | undefined) =>
        other !== undefined && !inBase.has(other) && !inMine.has(other);
      while (isTheirNew(ids[at])) at += 1;
      ids.splice(at, 0, id);
    }
    previous = id;
  }
  return { ids, contested };
}

/** The id before another in an order, among those that are there still; null at the beginning. */
export function findBefore(
  order: readonly string[],
  id: string,
  among: { has: (id: string) => boolean },
): string | null {
  return order.slice(0, order.indexOf(id)).findLast((other) => among.has(other)) ?? null;
}

function findContested(
  byMe: ReadonlySet<string>,
  byThem: ReadonlySet<string>,
  mine: readonly string[],
  theirs: readonly string[],
): string[] {
  const [inMine, inTheirs] = [new Set(mine), new Set(theirs)];
  return mine.filter(
    (id) =>
      byMe.has(id) &&
      byThem.has(id) &&
      findBefore(mine, id, inTheirs) !== findBefore(theirs, id, inMine),
  );
}

/** The fewest ids that must have been moved to make one order of the other. */
export function findMoved(base: readonly string[], now: readonly string[]): Set<string> {
  const places = new Map(base.map((id, place) => [id, place]));
  const common = now.filter((id) => places.has(id));
  const stayed = longestIncreasing(common.map((id) => places.get(id) ?? 0));
  return new Set(common.filter((_, index) => !stayed.has(index)));
}

/** Indices of a longest increasing subsequence. Method: patience sorting (Fredman 1975), O(n log n). */
function longestIncreasing(values: readonly number[]): ReadonlySet<number> {
  const tails: number[] = [];
  const before = new Map<number, number>();
  values.forEach((value, index) => {
    let [low, high] = [0, tails.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if ((values[tails[middle] ?? 0] ?? 0) < value) low = middle + 1;
      else high = middle;
    }
    const below = tails[low - 1];
    if (below !== undefined) before.set(index, below);
    tails[low] = index;
  });
  const chosen = new Set<number>();
  for (let at = tails.at(-1); at !== undefined; at = before.get(at)) chosen.add(at);
  return chosen;
}
