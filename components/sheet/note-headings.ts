export interface Heading {
  level: number;
  text: string;
}

const FENCE = /^ {0,3}(`{3,}|~{3,})/;
const MARKED = /^ {0,3}(#{1,6})(?:[ \t]+(.*?))??(?:[ \t]+#+)?[ \t]*$/;
const UNDERLINE = /^ {0,3}(=+|-+)[ \t]*$/;
const CODE = /^(?: {4}| {0,3}\t)/;
/** A quotation, or an item of a list that may end a paragraph. */
const CONTAINER = /^ {0,3}(?:>|[-+*][ \t]+\S|1[.)][ \t]+\S)/;
const OTHER_ITEM = /^ {0,3}(?:[-+*]|\d{1,9}[.)])(?:[ \t]|$)/;
const BREAK = /^ {0,3}(?:(?:\*[ \t]*){3,}|(?:-[ \t]*){3,}|(?:_[ \t]*){3,})$/;

const plain = (text: string) => text.trim().replace(/[*_`$]/g, '');

/**
 * The headings of a note, for the index beside the sheet: lines marked with `#` and underlined paragraphs, outside
 * fenced code, as CommonMark 0.31 has them at the top level. Read by itself, so that the sheet can list the headings
 * before what sets Markdown is there.
 */
export function headingsOf(source: string): Heading[] {
  const headings: Heading[] = [];
  let fence: string | null = null;
  let paragraph: string[] = [];
  // What follows the line of a list or quotation may belong to it up to the next blank line.
  let inContainer = false;
  const begin = () => {
    paragraph = [];
    inContainer = false;
  };
  for (const line of source.split(/\r\n|\n|\r/)) {
    const mark = FENCE.exec(line)?.[1];
    if (fence !== null) {
      if (mark?.startsWith(fence) === true && line.trim() === mark) fence = null;
      continue;
    }
    const marked = MARKED.exec(line);
    const underline = UNDERLINE.exec(line)?.[1];
    if (mark !== undefined) {
      fence = mark;
      begin();
    } else if (marked !== null) {
      headings.push({ level: marked[1]?.length ?? 1, text: plain(marked[2] ?? '') });
      begin();
    } else if (underline !== undefined && paragraph.length > 0) {
      headings.push({ level: underline.startsWith('=') ? 1 : 2, text: plain(paragraph.join(' ')) });
      begin();
    } else if (line.trim() === '' || BREAK.test(line)) {
      begin();
    } else if (CONTAINER.test(line) || (paragraph.length === 0 && OTHER_ITEM.test(line))) {
      begin();
      inContainer = true;
    } else if (!inContainer && (paragraph.length > 0 || !CODE.test(line))) {
      paragraph.push(line.trim());
    }
  }
  return headings;
}
