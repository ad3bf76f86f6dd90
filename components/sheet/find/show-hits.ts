import { cellAnchor, entryId } from '../cells';
import { patternOf, type Hit } from './find-hits';

/** Names under which the style sheet colours what was found (`::highlight`). */
const ALL = 'found';
const CURRENT = 'found-here';

const TEXTS = 'code, .cm-line, .prose-note, h2';

/** The element in which a hit is read: its line, open or closed, or its cell. */
export function elementOf({ id, line, kind }: Hit): HTMLElement | null {
  const cell = document.getElementById(cellAnchor(id));
  if (!cell) return null;
  if (kind !== 'dimension') return cell;
  const closed = document.getElementById(entryId(id, line));
  return closed ?? cell.querySelector<HTMLElement>('.cm-editor') ?? cell;
}

/** Ranges of a pattern in the text of an element, over the borders of its parts. */
function rangesIn(element: Element, pattern: RegExp): Range[] {
  const walker = document.createTreeWalker(element, NodeFilter.SHOW_TEXT);
  const parts: { node: Node; from: number }[] = [];
  let text = '';
  for (let node = walker.nextNode(); node; node = walker.nextNode()) {
    parts.push({ node, from: text.length });
    text += node.textContent ?? '';
  }
  const placeOf = (offset: number, atEnd: boolean) => {
    const part = parts.findLast(({ from }) => (atEnd ? from < offset : from <= offset));
    return part && ([part.node, offset - part.from] as const);
  };
  return [...text.matchAll(pattern)].flatMap(({ 0: { length }, index }) => {
    const [start, end] = [placeOf(index, false), placeOf(index + length, true)];
    if (!start || !end) return [];
    const range = document.createRange();
    range.setStart(...start);
    range.setEnd(...end);
    return [range];
  });
}

function textsOf(cell: Element): Element[] {
  return [...cell.querySelectorAll(TEXTS)].filter((one) => !one.parentElement?.closest(TEXTS));
}

/**
 * Colours every hit that is on the page, the one in hand more strongly, and marks its cell. The page's own elements are
 * left as they are. Gives the way to take it all away.
 */
export function showHits(text: string, hits: readonly Hit[], current: Hit | null): () => void {
  const pattern = patternOf(text);
  const cells = [...new Set(hits.map(({ id }) => id))].flatMap(
    (id) => document.getElementById(cellAnchor(id)) ?? [],
  );
  const here = current && document.getElementById(cellAnchor(current.id));
  here?.setAttribute('data-found', '');
  if (pattern && 'highlights' in CSS) {
    const all = cells.flatMap((cell) => textsOf(cell).flatMap((one) => rangesIn(one, pattern)));
    const now = current && currentRange(current, hits, pattern);
    CSS.highlights.set(ALL, new Highlight(...all));
    CSS.highlights.set(CURRENT, new Highlight(...(now ? [now] : [])));
  }
  return () => {
    here?.removeAttribute('data-found');
    if (!('highlights' in CSS)) return;
    CSS.highlights.delete(ALL);
    CSS.highlights.delete(CURRENT);
  };
}

/** The range of one hit, where the page shows as many on its line (or in its note) as the source has. */
function currentRange(current: Hit, hits: readonly Hit[], pattern: RegExp): Range | null {
  const element = elementOf(current);
  if (!element) return null;
  const ofLine = hits.filter(
    ({ id, line, kind }) => id === current.id && (kind !== 'dimension' || line === current.line),
  );
  const ranges = textsOf(element).flatMap((one) => rangesIn(one, pattern));
  return ranges[ofLine.indexOf(current)] ?? null;
}
