import type { CellAnswer } from './shown';

/** What the server is told that this page has, so that it sends only what is different. */
export function digestsOf(cells: readonly CellAnswer[]): Record<string, string> {
  return Object.fromEntries(
    cells.flatMap(({ id, digest }) => (digest === undefined ? [] : [[id, digest]])),
  );
}

/**
 * The whole answer from what was sent and, for the cells that were left out, what was had when it was asked for. Cells
 * that are as before stay the very objects that they were.
 */
export function mergeAnswer(
  asked: readonly { id: string }[],
  had: readonly CellAnswer[],
  sent: readonly CellAnswer[],
): CellAnswer[] {
  const known = new Map([...had, ...sent].map((cell) => [cell.id, cell]));
  return asked.flatMap(({ id }) => known.get(id) ?? []);
}
