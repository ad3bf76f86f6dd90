/** Edits of one line within the source of a cell; each gives the new source and where the cursor goes. */
export interface LineEdit {
  source: string;
  line: number;
  column: number;
}

const split = (source: string) => source.split(/\r?\n/);

/** Puts `text`, which may hold several lines, in place of a line; `cursor` is the offset in `text`. */
export function replaceLine(source: string, line: number, text: string, cursor: number): LineEdit {
  const before = text.slice(0, cursor).split('\n');
  return {
    source: split(source)
      .toSpliced(line, 1, ...text.split('\n'))
      .join('\n'),
    line: line + before.length - 1,
    column: before.at(-1)?.length ?? 0,
  };
}

/** Joins a line to the one before it; null for the first line. */
export function joinBefore(source: string, line: number): LineEdit | null {
  const lines = split(source);
  const [above, own] = [lines[line - 1], lines[line]];
  if (above === undefined || own === undefined) return null;
  return {
    source: lines.toSpliced(line - 1, 2, above + own).join('\n'),
    line: line - 1,
    column: above.length,
  };
}

/** Joins the line after to a line; null for the last line. */
export function joinAfter(source: string, line: number): LineEdit | null {
  return joinBefore(source, line + 1);
}
