import { marksDefinedIn } from '@/lib/evaluation/marks';
import type { NotebookCell } from './content';

const LONGEST = 60;

const cut = (text: string) => {
  const signs = [...text.trim()];
  return signs.length > LONGEST ? `${signs.slice(0, LONGEST - 1).join('')}…` : signs.join('');
};

const FALLBACK = { dimension: 'Dimension cell', note: 'Note', section: 'Section' } as const;

/** What a cell is called in a sentence: its marks, its heading, or how it begins. At most 60 characters. */
export function nameOfCell(cell: NotebookCell): string {
  const marks = cell.kind === 'dimension' ? marksDefinedIn([cell]).map(({ mark }) => mark) : [];
  if (marks.length > 0) return cut(marks.join(', '));
  const lines = cell.source.replace(cell.kind === 'note' ? /[#*_`>]/g : /^$/, '').split(/\r?\n/);
  return cut(lines.find((line) => line.trim() !== '') ?? '') || FALLBACK[cell.kind];
}
