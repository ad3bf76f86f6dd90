import type { SheetNames } from './names';
import { findFacts, wordAt } from './word-at';
import { drawWordCard } from './word-card';

/** Milliseconds the pointer rests on a name before its card is shown, and is away before it goes. */
const REST = 400;
const AWAY = 250;
/** Pixels between a name and its card. */
const GAP = 4;

interface Caret {
  node: Node;
  offset: number;
}

/** Where in the text a point of the screen lies. The older function is the one that every browser has. */
function caretAt(x: number, y: number): Caret | null {
  if ('caretPositionFromPoint' in document) {
    const caret = document.caretPositionFromPoint(x, y);
    return caret && { node: caret.offsetNode, offset: caret.offset };
  }
  const range = (document as Document).caretRangeFromPoint(x, y);
  return range && { node: range.startContainer, offset: range.startOffset };
}

export interface WordOnPage {
  name: string;
  box: DOMRect;
}

/** The name of a source at rest under a point, with where it stands on the screen. */
export function wordOnPage(x: number, y: number): WordOnPage | null {
  const caret = caretAt(x, y);
  const code = caret?.node.parentElement?.closest('[id^="cell-"] [data-row] code');
  if (!caret || !code) return null;
  const before = document.createRange();
  before.setStart(code, 0);
  before.setEnd(caret.node, caret.offset);
  const word = wordAt(code.textContent ?? '', before.toString().length);
  if (!word) return null;
  const box = rangeOf(code, word.from, word.to).getBoundingClientRect();
  const within = x >= box.left && x <= box.right && y >= box.top - GAP && y <= box.bottom + GAP;
  return within ? { name: word.name, box } : null;
}

function rangeOf(element: Element, from: number, to: number): Range {
  const range = document.createRange();
  range.selectNodeContents(element);
  const walker = document.createTreeWalker(element, NodeFilter.SHOW_TEXT);
  let passed = 0;
  for (let node = walker.nextNode(); node; node = walker.nextNode()) {
    const length = node.textContent?.length ?? 0;
    if (from >= passed && from <= passed + length) range.setStart(node, from - passed);
    if (to >= passed && to <= passed + length) {
      range.setEnd(node, to - passed);
      break;
    }
    passed += length;
  }
  return range;
}

/**
 * Shows the card of a name where the pointer rests on it in a source at rest, and goes to its definition on a press
 * with Ctrl or Cmd. The card stays while the pointer is on it; Escape, scrolling or a press takes it away. Gives the way to stop.
 */
export function watchWords(names: SheetNames): () => void {
  let card: HTMLElement | null = null;
  let shown = '';
  let timer = 0;

  const hide = () => {
    clearTimeout(timer);
    card?.remove();
    card = null;
    shown = '';
  };
  const show = ({ name, box }: WordOnPage) => {
    const facts = findFacts(name, names.marks());
    const key = `${name} ${box.left} ${box.top}`;
    if (!facts || key === shown) return;
    hide();
    shown = key;
    card = drawWordCard(facts);
    card.classList.add('word-card-floating');
    card.setAttribute('role', 'tooltip');
    document.body.append(card);
    const { width, height } = card.getBoundingClientRect();
    const below = box.bottom + GAP + height <= innerHeight;
    const left = Math.max(GAP, Math.min(box.left, innerWidth - width - GAP));
    card.style.left = `${left}px`;
    card.style.top = `${below ? box.bottom + GAP : Math.max(GAP, box.top - GAP - height)}px`;
  };

  const onMove = (event: PointerEvent) => {
    if (event.pointerType !== 'mouse' || event.buttons !== 0) return;
    if (event.target instanceof Element && card?.contains(event.target)) return clearTimeout(timer);
    clearTimeout(timer);
    const { clientX, clientY } = event;
    const onCode = event.target instanceof Element && event.target.closest('button, code');
    if (!onCode && !card) return;
    timer = window.setTimeout(
      () => {
        const word = onCode ? wordOnPage(clientX, clientY) : null;
        if (word) show(word);
        else hide();
      },
      card ? AWAY : REST,
    );
  };
  const onKey = (event: KeyboardEvent) => {
    if (event.key === 'Escape') hide();
  };
  const onClick = (event: MouseEvent) => {
    hide();
    if (event.button !== 0 || !(event.ctrlKey || event.metaKey)) return;
    const word = wordOnPage(event.clientX, event.clientY);
    if (!word || !names.goTo(word.name)) return;
    event.preventDefault();
    event.stopPropagation();
  };

  document.addEventListener('pointermove', onMove, { passive: true });
  document.addEventListener('keydown', onKey, true);
  document.addEventListener('click', onClick, true);
  window.addEventListener('scroll', hide, { passive: true, capture: true });
  return () => {
    hide();
    document.removeEventListener('pointermove', onMove);
    document.removeEventListener('keydown', onKey, true);
    document.removeEventListener('click', onClick, true);
    window.removeEventListener('scroll', hide, true);
  };
}
