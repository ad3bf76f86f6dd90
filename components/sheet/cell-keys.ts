/**
 * The keys of the sheet: one table, from which the handlers, the sheet of keys and the help page read. `Mod` is Ctrl, or
 * Cmd on a Mac. None is a single letter and none belongs to browsers, screen readers or the writing of text.
 */

export type SheetCommand =
  'find' | 'findNext' | 'findBefore' | 'undo' | 'redo' | 'keep' | 'keys' | 'goBack';
export type CellCommand =
  | 'dimensionBelow'
  | 'noteBelow'
  | 'dimensionAbove'
  | 'noteAbove'
  | 'sectionBelow'
  | 'sectionAbove'
  | 'moveUp'
  | 'moveDown'
  | 'duplicate'
  | 'fold'
  | 'copy'
  | 'proof'
  | 'comment'
  | 'remove'
  | 'cellBefore'
  | 'cellAfter'
  | 'headingBefore'
  | 'headingAfter';
export type EntryCommand =
  'open' | 'entryBefore' | 'entryAfter' | 'firstEntry' | 'lastEntry' | 'remove' | 'rename' | 'keys';
export type SourceCommand =
  'close' | 'lineBefore' | 'lineAfter' | 'newLine' | 'offer' | 'about' | 'goTo' | 'rename';
/** While names are offered below the cursor. */
export type OfferCommand = 'accept';

interface CommandsOf {
  /** Anywhere on the page of a sheet. */
  sheet: SheetCommand;
  /** Anywhere in a cell, its source open or not. */
  cell: CellCommand;
  /** On a line whose source is closed. */
  entry: EntryCommand;
  /** In an open source. */
  source: SourceCommand;
  offer: OfferCommand;
}

export type KeyScope = keyof CommandsOf;

export const KEY_GROUPS = ['Writing', 'Names', 'Cells', 'Getting about', 'The sheet'] as const;

type KeyOf<S extends KeyScope> = {
  readonly scope: S;
  readonly group: (typeof KEY_GROUPS)[number];
  readonly keys: readonly string[];
  /** The command of each key, in the same order. */
  readonly runs: readonly CommandsOf[S][];
  readonly does: string;
};

export type Key = { [S in KeyScope]: KeyOf<S> }[KeyScope];

export const KEYS: readonly Key[] = [
  {
    scope: 'entry',
    group: 'Writing',
    keys: ['Enter'],
    runs: ['open'],
    does: 'Open the source of the line that has the focus',
  },
  {
    scope: 'source',
    group: 'Writing',
    keys: ['Enter'],
    runs: ['newLine'],
    does: 'In an open source: begin a new line',
  },
  {
    scope: 'source',
    group: 'Writing',
    keys: ['Esc'],
    runs: ['close'],
    does: 'Close the source',
  },
  {
    scope: 'sheet',
    group: 'Writing',
    keys: ['Mod+Z'],
    runs: ['undo'],
    does: 'Undo: typing, moving, deleting, renaming and settings alike',
  },
  {
    scope: 'sheet',
    group: 'Writing',
    keys: ['Mod+Shift+Z', 'Mod+Y'],
    runs: ['redo', 'redo'],
    does: 'Do again what was undone',
  },
  {
    scope: 'source',
    group: 'Names',
    keys: ['Ctrl+Space'],
    runs: ['offer'],
    does: 'Offer the names and units that fit here; the arrows choose one',
  },
  {
    scope: 'offer',
    group: 'Names',
    keys: ['Enter', 'Tab'],
    runs: ['accept', 'accept'],
    does: 'Take the name that is chosen',
  },
  {
    scope: 'source',
    group: 'Names',
    keys: ['Shift+F1'],
    runs: ['about'],
    does: 'Say what the name at the cursor is: its value, or what the function gives',
  },
  {
    scope: 'source',
    group: 'Names',
    keys: ['F8'],
    runs: ['goTo'],
    does: 'Go to the line that defines the name at the cursor; a press on it with Ctrl or Cmd does the same',
  },
  {
    scope: 'sheet',
    group: 'Names',
    keys: ['Shift+F8'],
    runs: ['goBack'],
    does: 'Go back to where one came from',
  },
  {
    scope: 'source',
    group: 'Names',
    keys: ['F2'],
    runs: ['rename'],
    does: 'Rename the mark at the cursor, wherever it is read',
  },
  {
    scope: 'entry',
    group: 'Names',
    keys: ['F2'],
    runs: ['rename'],
    does: 'Rename the mark of the line that has the focus',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Mod+Enter', 'Alt+Enter'],
    runs: ['dimensionBelow', 'dimensionAbove'],
    does: 'Add a dimension cell below, above',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Mod+Shift+Enter', 'Alt+Shift+Enter'],
    runs: ['noteBelow', 'noteAbove'],
    does: 'Add a note below, above',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Mod+Alt+Enter', 'Mod+Alt+Shift+Enter'],
    runs: ['sectionBelow', 'sectionAbove'],
    does: 'Begin a section below, above',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Alt+↑', 'Alt+↓'],
    runs: ['moveUp', 'moveDown'],
    does: 'Move the cell up, down',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Alt+Shift+D'],
    runs: ['duplicate'],
    does: 'Duplicate the cell below itself, its marks under fresh names',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Alt+Shift+F'],
    runs: ['fold'],
    does: 'Fold the cell, or the section under its heading; open what is folded',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Alt+Shift+C'],
    runs: ['copy'],
    does: 'Copy the value of the line: open the choice of forms',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Alt+Shift+P'],
    runs: ['proof'],
    does: 'Open the proof of the figure of the line: digits, polynomial, tower, reach, certificate',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Alt+Shift+M'],
    runs: ['comment'],
    does: 'Read and write comments on the cell',
  },
  {
    scope: 'entry',
    group: 'Cells',
    keys: ['Delete'],
    runs: ['remove'],
    does: 'Delete the cell that has the focus; undo brings it back',
  },
  {
    scope: 'cell',
    group: 'Cells',
    keys: ['Alt+Shift+Delete', 'Alt+Shift+Backspace'],
    runs: ['remove', 'remove'],
    does: 'Delete the cell, its source open or not',
  },
  {
    scope: 'entry',
    group: 'Getting about',
    keys: ['↑', '↓'],
    runs: ['entryBefore', 'entryAfter'],
    does: 'Go to the line above, below',
  },
  {
    scope: 'source',
    group: 'Getting about',
    keys: ['↑', '↓'],
    runs: ['lineBefore', 'lineAfter'],
    does: 'In an open source: go on to the line above, below',
  },
  {
    scope: 'cell',
    group: 'Getting about',
    keys: ['Alt+PageUp', 'Alt+PageDown'],
    runs: ['cellBefore', 'cellAfter'],
    does: 'Go to the cell before, after',
  },
  {
    scope: 'cell',
    group: 'Getting about',
    keys: ['Alt+Shift+PageUp', 'Alt+Shift+PageDown'],
    runs: ['headingBefore', 'headingAfter'],
    does: 'Go to the heading before, after',
  },
  {
    scope: 'entry',
    group: 'Getting about',
    keys: ['Home', 'End'],
    runs: ['firstEntry', 'lastEntry'],
    does: 'Go to the first, the last line of the sheet',
  },
  {
    scope: 'sheet',
    group: 'Getting about',
    keys: ['Mod+F'],
    runs: ['find'],
    does: 'Find in sources, notes and headings',
  },
  {
    scope: 'sheet',
    group: 'Getting about',
    keys: ['F3', 'Shift+F3'],
    runs: ['findNext', 'findBefore'],
    does: 'Go to the next place found, to the one before',
  },
  {
    scope: 'sheet',
    group: 'The sheet',
    keys: ['Mod+S'],
    runs: ['keep'],
    does: 'Keep a version',
  },
  {
    scope: 'sheet',
    group: 'The sheet',
    keys: ['F1'],
    runs: ['keys'],
    does: 'Show these keys',
  },
  {
    scope: 'entry',
    group: 'The sheet',
    keys: ['?'],
    runs: ['keys'],
    does: 'Show these keys, from a line whose source is closed',
  },
];
