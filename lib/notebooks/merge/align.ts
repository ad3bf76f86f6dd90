/** A stretch of one sequence that another has otherwise: places `from`–`to` became `with`. */
export interface Hunk {
  readonly from: number;
  readonly to: number;
  readonly with: readonly string[];
}

/** Steps of editing beyond which what lies between the equal ends counts as one change. */
const MOST_EDITS = 600;

/**
 * What turns `before` into `after`, in order, with as few changed lines as there can be; of several such ways always the
 * same one. Past MOST_EDITS changes the whole stretch is one hunk: coarser, never wrong. Cost: O((n + m)·d) for d
 * changes. Method: E. W. Myers, “An O(ND) Difference Algorithm and Its Variations”, Algorithmica 1, 1986.
 */
export function findHunks(before: readonly string[], after: readonly string[]): Hunk[] {
  let head = 0;
  const most = Math.min(before.length, after.length);
  while (head < most && before[head] === after[head]) head += 1;
  let tail = 0;
  while (tail < most - head && before.at(-1 - tail) === after.at(-1 - tail)) tail += 1;
  const a = before.slice(head, before.length - tail);
  const b = after.slice(head, after.length - tail);
  return hunksBetween(a, b, pairEqual(a, b)).map(({ from, to, with: lines }) => ({
    from: from + head,
    to: to + head,
    with: lines,
  }));
}

/** The stretches between pairs of places, both in increasing order. */
export function hunksBetween(
  a: readonly string[],
  b: readonly string[],
  pairs: readonly (readonly [number, number])[],
): Hunk[] {
  const hunks: Hunk[] = [];
  let [x, y] = [0, 0];
  for (const [i, j] of [...pairs, [a.length, b.length] as const]) {
    if (i > x || j > y) hunks.push({ from: x, to: i, with: b.slice(y, j) });
    [x, y] = [i + 1, j + 1];
  }
  return hunks;
}

/** Places of a longest common subsequence; none at all when it would take too many steps. */
function pairEqual(a: readonly string[], b: readonly string[]): (readonly [number, number])[] {
  if (a.length === 0 || b.length === 0) return [];
  const limit = Math.min(MOST_EDITS, a.length + b.length);
  let reached = new Map<number, number>([[1, 0]]);
  const trace: Map<number, number>[] = [];
  for (let edits = 0; edits <= limit; edits += 1) {
    trace.push(reached);
    const next = new Map(reached);
    for (let k = -edits; k <= edits; k += 2) {
      const before = diagonalBefore(reached, k, edits);
      let x = (reached.get(before) ?? 0) + (before < k ? 1 : 0);
      while (x < a.length && x - k < b.length && x - k >= 0 && a[x] === b[x - k]) x += 1;
      next.set(k, x);
      if (x >= a.length && x - k >= b.length) return walkBack(trace, a.length, b.length);
    }
    reached = next;
  }
  return [];
}

/** From which diagonal the next edit comes: down from the one above, or right from the one to the left. */
function diagonalBefore(reached: ReadonlyMap<number, number>, k: number, edits: number): number {
  const left = reached.get(k - 1) ?? -1;
  const above = reached.get(k + 1) ?? -1;
  return k === -edits || (k !== edits && left < above) ? k + 1 : k - 1;
}

function walkBack(
  trace: readonly ReadonlyMap<number, number>[],
  width: number,
  height: number,
): (readonly [number, number])[] {
  const pairs: (readonly [number, number])[] = [];
  let [x, y] = [width, height];
  for (let edits = trace.length - 1; edits >= 0; edits -= 1) {
    const reached = trace[edits] ?? new Map<number, number>();
    const k = diagonalBefore(reached, x - y, edits);
    const startX = reached.get(k) ?? 0;
    const startY = startX - k;
    while (x > startX && y > startY) {
      [x, y] = [x - 1, y - 1];
      pairs.push([x, y]);
    }
    [x, y] = [startX, startY];
  }
  return pairs.reverse();
}
