import type { Result } from '../result';
import type { Shown } from '../state/shown';
import { largeTex } from '../value-tex';
import { sayDecimal, shorten } from '../say-number';
import { sayBriefly, sayDimension } from '../wording';

/** A mark of the sheet, as completion and the card of a name show it. */
export interface KnownMark {
  name: string;
  /** Of a function of the notebook, as it is called: `f(x, y)`; null for a value. */
  signature: string | null;
  /** In a few characters, as the index of marks shows it. */
  size: string;
  /** The exact value as TeX; null where there is none. */
  tex: string | null;
  decimal: string | null;
  cut: string | null;
  /** What is wrong with it, or null. */
  fault: string | null;
  /** Where it is defined: `cell 3, line 2`. */
  where: string;
}

/** What an open source may ask about the names it holds. */
export interface SheetNames {
  /** The marks of the sheet as they stand. */
  marks: () => readonly KnownMark[];
  /** Takes the line in hand that defines a name; false where no line does. */
  goTo: (name: string) => boolean;
  /** Asks for another name for a mark; false where no line defines it. */
  rename: (name: string) => boolean;
}

const FIGURES = 16;

function decimalOf(result: Result): string | null {
  if (result.kind === 'angle') return `${shorten(result.decimal.re, FIGURES)}°`;
  if (result.kind !== 'number') return null;
  const text = shorten(sayDecimal(result, true), FIGURES);
  return result.unit === null ? text : `${text} ${result.unit}`;
}

function cutOf(result: Result): string | null {
  if (result.kind !== 'number' || !result.cut) return null;
  const said = sayDimension(result);
  return said && `${said.figure}, ${said.below}`;
}

/** The marks that the lines of a sheet define, in its order. */
export function knownMarks(cells: readonly { id: string }[], shown: Shown): KnownMark[] {
  return cells.flatMap(({ id }, index) =>
    (shown.get(id) ?? []).flatMap(({ result }) =>
      result.mark === null
        ? []
        : [
            {
              name: result.mark,
              signature: result.kind === 'function' ? result.signature : null,
              size: sayBriefly(result),
              tex: result.kind === 'error' ? null : largeTex(result),
              decimal: decimalOf(result),
              cut: cutOf(result),
              fault: result.kind === 'error' ? result.error.message : null,
              where: `cell ${index + 1}, line ${result.line}`,
            },
          ],
    ),
  );
}

/** The mark that a line means to define, told from its beginning, so that it need not parse. */
export const markDefinedBy = (line: string): string | null =>
  /^\s*(\p{L}[\p{L}\p{N}_]*)\s*(?:\([^()]*\)\s*)?=(?!=)/u.exec(line)?.[1] ?? null;

export interface LinePlace {
  id: string;
  line: number;
  column: number;
}

/** The first line that defines a name, told from its beginning, so that it need not parse. */
export function findDefinition(
  cells: readonly { id: string; kind: string; source: string }[],
  name: string,
): LinePlace | null {
  if (!/^\p{L}[\p{L}\p{N}_]*$/u.test(name)) return null;
  const begins = new RegExp(String.raw`^\s*(${name})\s*(?:\([^()]*\)\s*)?=(?!=)`, 'u');
  for (const { id, kind, source } of cells) {
    if (kind !== 'dimension' || !source.includes(name)) continue;
    const lines = source.split(/\r?\n/);
    const line = lines.findIndex((text) => begins.test(text));
    if (line >= 0) return { id, line, column: lines[line]?.indexOf(name) ?? 0 };
  }
  return null;
}
