import type { NotebookCell } from '@/lib/notebooks/content';
import { linesOf } from '../source-text';
import { markDefinedIn } from '../state/uses';

const LONGEST = 40;

/** What a cell is called where there is little room: its marks, its heading, or how it begins. */
export function sayCell(cell: NotebookCell, place: number): string {
  const lines = linesOf(cell.source);
  const marks = cell.kind === 'dimension' ? lines.flatMap((line) => markDefinedIn(line) ?? []) : [];
  const first = lines
    .map((line) => line.replace(/[#*_`>]/g, '').trim())
    .find((line) => line !== '');
  const text = marks.length > 0 ? marks.join(', ') : (first ?? '');
  if (text === '') return `cell ${place}`;
  const signs = [...text];
  return signs.length > LONGEST ? `${signs.slice(0, LONGEST - 1).join('')}…` : text;
}
