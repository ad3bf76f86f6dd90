import { type CellSource, readCells } from '@/lib/language/index';

/** A line that defines a mark or a function, as the language reads it. */
export interface DefinedMark {
  /** Id of its cell. */
  cell: string;
  /** The line in the cell, from 1. */
  line: number;
  mark: string;
  /** The whole line, without blanks at its ends. */
  source: string;
}

/**
 * The marks that cells define, in order of the page; a mark that two lines define is there twice. Nothing is worked out,
 * so a line is named here whether or not its value can be had. Never throws. Cost: reading the lines, which is linear in
 * their length, and nothing for those that were read before.
 */
export function marksDefinedIn(cells: readonly CellSource[]): DefinedMark[] {
  return readCells(cells).lines.flatMap(({ cell, line, mark, source }) => {
    const id = cells[cell]?.id;
    return mark === null || id === undefined
      ? []
      : [{ cell: id, line, mark, source: source.trim() }];
  });
}
