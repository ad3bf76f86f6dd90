import type { Result } from '@/components/sheet/result';
import type { CellAnswer } from '@/components/sheet/state/shown';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { findMoved, sameCell } from '@/lib/notebooks/merge';
import { cutFigure, exactFigure } from './short-figure';

/** A line's value on either side; null where that side has no such line. */
export interface ComparedLine {
  mark: string | null;
  before: Result | null;
  after: Result | null;
  differs: boolean;
  /** How the cut size differs, in words; null where it does not or cannot be said. */
  difference: string | null;
}

/** A cell on either side. `follows`: written alike, but its values differ because others changed. */
export interface ComparedCell {
  id: string;
  state: 'same' | 'changed' | 'added' | 'gone' | 'follows' | 'moved';
  before: NotebookCell | null;
  after: NotebookCell | null;
  lines: ComparedLine[];
}

interface Side {
  content: NotebookContent;
  answers: readonly CellAnswer[];
}

/** Two versions cell by cell, in the order of the later one; what it has no more stands where it stood. */
export function compareVersions(before: Side, after: Side): ComparedCell[] {
  const old = new Map(before.content.cells.map((cell) => [cell.id, cell]));
  const now = new Map(after.content.cells.map((cell) => [cell.id, cell]));
  const ids = after.content.cells.map(({ id }) => id);
  before.content.cells.forEach(({ id }, place) => {
    if (now.has(id)) return;
    const above = before.content.cells[place - 1];
    ids.splice(above ? ids.indexOf(above.id) + 1 : 0, 0, id);
  });
  const moved = findMoved(
    before.content.cells.map(({ id }) => id),
    after.content.cells.map(({ id }) => id),
  );
  const resultsOf = ({ answers }: Side) => new Map(answers.map(({ id, results }) => [id, results]));
  const [oldResults, newResults] = [resultsOf(before), resultsOf(after)];
  return ids.map((id) => {
    const [was, is] = [old.get(id) ?? null, now.get(id) ?? null];
    const lines = compareLines(oldResults.get(id) ?? [], newResults.get(id) ?? []);
    return { id, before: was, after: is, lines, state: stateOf(was, is, lines, moved.has(id)) };
  });
}

function stateOf(
  was: NotebookCell | null,
  is: NotebookCell | null,
  lines: readonly ComparedLine[],
  isMoved: boolean,
): ComparedCell['state'] {
  if (was === null) return 'added';
  if (is === null) return 'gone';
  if (!sameCell(was, is)) return 'changed';
  if (lines.some(({ differs }) => differs)) return 'follows';
  return isMoved ? 'moved' : 'same';
}

/** Lines of one cell side by side: by their mark where they have one, else by their text, else by their place. */
function compareLines(before: readonly Result[], after: readonly Result[]): ComparedLine[] {
  const left = [...before];
  const takeLike = (is: Result): Result | null => {
    const at = left.findIndex((was) =>
      is.mark === null ? was.mark === null && was.source === is.source : was.mark === is.mark,
    );
    const found = at >= 0 ? at : left.findIndex((was) => was.mark === is.mark && is.mark === null);
    return found < 0 ? null : (left.splice(found, 1)[0] ?? null);
  };
  const lines = after.map((is) => compareLine(takeLike(is), is));
  return [...lines, ...left.map((was) => compareLine(was, null))];
}

function compareLine(before: Result | null, after: Result | null): ComparedLine {
  const mark = (after ?? before)?.mark ?? null;
  const differs =
    before === null ||
    after === null ||
    exactFigure(before) !== exactFigure(after) ||
    cutFigure(before)?.figure !== cutFigure(after)?.figure;
  return {
    mark,
    before,
    after,
    differs,
    difference: before && after && differs ? cutDifference(before, after) : null,
  };
}

/** By how much a cut size differs: decimals of one unit, taken from each other exactly. */
function cutDifference(before: Result, after: Result): string | null {
  if (before.kind !== 'number' || after.kind !== 'number') return null;
  if (!before.cut || !after.cut || before.unit !== after.unit || before.unit === null) return null;
  const by = subtractDecimals(after.cut.value, before.cut.value);
  if (by === null) return null;
  if (by === '0') return 'cut to the same size';
  return by.startsWith('-')
    ? `cut ${by.slice(1)} ${before.unit} less`
    : `cut ${by} ${before.unit} more`;
}

const DECIMAL = /^-?\d+(?:\.\d+)?$/;

/** The difference of two decimals, exactly; null for what is no plain decimal. */
export function subtractDecimals(one: string, other: string): string | null {
  if (!DECIMAL.test(one) || !DECIMAL.test(other)) return null;
  const places = Math.max(...[one, other].map((text) => text.split('.')[1]?.length ?? 0));
  const scaled = (text: string) => {
    const [whole = '', part = ''] = text.split('.');
    return BigInt(whole + part.padEnd(places, '0'));
  };
  const difference = scaled(one) - scaled(other);
  const sign = difference < 0n ? '-' : '';
  const digits = (difference < 0n ? -difference : difference).toString().padStart(places + 1, '0');
  if (places === 0) return sign + digits;
  const whole = digits.slice(0, -places);
  const part = digits.slice(-places).replace(/0+$/, '');
  return `${sign}${whole}${part === '' ? '' : `.${part}`}`;
}
