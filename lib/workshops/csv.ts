/** What a spreadsheet would take for the beginning of a formula, and what hides one. */
const FORMULA = /^[\s]*[=+\-@\t\r＝＋－＠]/u;
/** A plain number keeps its sign: it is no formula. */
const NUMBER = /^-?\d+(\.\d+)?$/;

/**
 * A table as CSV after RFC 4180: commas, CRLF, quotes doubled, the heads first. A field that a
 * spreadsheet would calculate gets an apostrophe before it, so that it is read as text.
 */
export function writeCsv(heads: readonly string[], rows: readonly (readonly string[])[]): string {
  return [heads, ...rows].map((row) => `${row.map(field).join(',')}\r\n`).join('');
}

function field(text: string): string {
  const safe = FORMULA.test(text) && !NUMBER.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) || safe !== safe.trim() ? `"${safe.replaceAll('"', '""')}"` : safe;
}
