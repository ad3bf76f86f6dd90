import type { Snippet, SnippetPiece } from './types';

/** Signs shown before and behind the first word found. */
const BEFORE = 60;
const BEHIND = 140;

/** As the database compares: neither case nor accents count. One sign of the folded text for each UTF-16 unit. */
function fold(text: string): string {
  let folded = '';
  for (const sign of text) {
    const base = sign.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();
    folded += base.length === sign.length ? base : (base[0] ?? ' ').padEnd(sign.length, '\0');
  }
  return folded;
}

const WORD = /[\p{L}\p{M}\p{N}_]+/gu;

interface Found {
  from: number;
  to: number;
}

/** Every place at which a word begins as one of those looked for. */
function placesIn(text: string, words: readonly string[]): Found[] {
  const folded = fold(text);
  const places: Found[] = [];
  for (const { index } of text.matchAll(WORD)) {
    const longest = Math.max(
      0,
      ...words.filter((word) => folded.startsWith(word, index)).map(({ length }) => length),
    );
    if (longest > 0) places.push({ from: index, to: index + longest });
  }
  return places;
}

/**
 * Where the words stand: the cell that holds most of them, and what is around the first one, cut into pieces of which
 * some are the words found. Null where no cell holds any.
 */
export function snippetOf(
  cells: readonly { id: string; text: string }[],
  looked: readonly string[],
): Snippet | null {
  const words = looked.map(fold);
  let best: { id: string; text: string; places: Found[]; kinds: number } | null = null;
  for (const { id, text } of cells) {
    const places = placesIn(text, words);
    const folded = fold(text);
    const kinds = new Set(places.map(({ from, to }) => folded.slice(from, to))).size;
    if (places.length > 0 && kinds > (best?.kinds ?? 0)) best = { id, text, places, kinds };
    if (best?.kinds === words.length) break;
  }
  const [first] = best?.places ?? [];
  if (best === null || first === undefined) return null;
  return { cell: best.id, pieces: piecesAround(best.text, first, best.places) };
}

function piecesAround(text: string, first: Found, places: readonly Found[]): SnippetPiece[] {
  const start = first.from <= BEFORE ? 0 : wordStartAfter(text, first.from - BEFORE);
  const end = Math.min(text.length, Math.max(first.to, first.from + BEHIND));
  const pieces: SnippetPiece[] = [];
  const add = (from: number, to: number, found: boolean) => {
    const part = text.slice(from, to).replace(/\s+/g, ' ');
    if (part !== '') pieces.push({ text: part, found });
  };
  let at = start;
  for (const { from, to } of places) {
    if (from < at || to > end) continue;
    add(at, from, false);
    add(from, to, true);
    at = to;
  }
  add(at, end, false);
  if (start > 0) pieces.unshift({ text: '… ', found: false });
  if (end < text.length) pieces.push({ text: ' …', found: false });
  return pieces;
}

/** The first word that begins at or behind a place, so that the snippet does not begin within one. */
function wordStartAfter(text: string, at: number): number {
  const blank = text.slice(at).search(/\s/);
  return blank < 0 || blank > BEFORE ? at : at + blank + 1;
}
