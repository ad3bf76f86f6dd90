import type { Result } from '../result';

/** One line as it is shown: its latest result and, when that is an error, the last good one. */
export interface ShownLine {
  result: Result;
  before: Result | null;
}

export type Shown = ReadonlyMap<string, readonly ShownLine[]>;

export interface CellAnswer {
  id: string;
  results: Result[];
  /** A word of the server's for these results. */
  digest?: string;
}

/**
 * Folds a new answer into what is shown. A cell whose results did not change keeps its very lines,
 * so that only what changed is drawn again; a line that now fails remembers what it last said.
 */
export function foldAnswer(shown: Shown, cells: readonly CellAnswer[]): Shown {
  return new Map(
    cells.map(({ id, results }) => {
      const before = shown.get(id);
      return [id, before && sameResults(before, results) ? before : foldLines(before, results)];
    }),
  );
}

function sameResults(lines: readonly ShownLine[], results: readonly Result[]) {
  return (
    lines.length === results.length &&
    lines.every(({ result }, index) => {
      const now = results[index];
      return result === now || JSON.stringify(result) === JSON.stringify(now);
    })
  );
}

function foldLines(lines: readonly ShownLine[] = [], results: readonly Result[]): ShownLine[] {
  return results.map((result, index) => {
    if (result.kind !== 'error') return { result, before: null };
    const same = lines.length === results.length ? lines[index] : lines.find(isSameMark(result));
    const last = same?.result.kind === 'error' ? same.before : same?.result;
    return { result, before: last ?? null };
  });
}

const isSameMark =
  (result: Result) =>
  ({ result: other }: ShownLine) =>
    result.mark !== null && other.mark === result.mark;
