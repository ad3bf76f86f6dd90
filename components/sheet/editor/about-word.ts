import { StateEffect, StateField, type EditorState, type Extension } from '@codemirror/state';
import { EditorView, hoverTooltip, showTooltip, type Tooltip } from '@codemirror/view';
import type { KnownMark } from './names';
import { findFacts, sayFacts, wordAt, type WordAt, type WordFacts } from './word-at';
import { drawWordCard } from './word-card';

type Marks = () => readonly KnownMark[];

/** Milliseconds the pointer rests on a name before its card is shown. */
const REST = 300;

/** The name at a place of the document, with offsets into the document. */
export function wordIn(state: EditorState, pos: number): WordAt | null {
  const line = state.doc.lineAt(pos);
  const word = wordAt(line.text, pos - line.from);
  return word && { name: word.name, from: line.from + word.from, to: line.from + word.to };
}

const cardTooltip = (word: WordAt, facts: WordFacts): Tooltip => ({
  pos: word.from,
  end: word.to,
  create: () => ({ dom: drawWordCard(facts) }),
});

const showCard = StateEffect.define<Tooltip | null>();

const card = StateField.define<Tooltip | null>({
  create: () => null,
  update: (before, change) => {
    for (const effect of change.effects) if (effect.is(showCard)) return effect.value;
    return change.docChanged || change.selection ? null : before;
  },
  provide: (field) => showTooltip.from(field),
});

/** The card of a name, where the pointer rests on it. */
export function aboutWords(marks: Marks): Extension {
  return [
    card,
    hoverTooltip(
      (view, pos) => {
        const word = wordIn(view.state, pos);
        const facts = word && findFacts(word.name, marks());
        return facts && cardTooltip(word, facts);
      },
      { hoverTime: REST },
    ),
  ];
}

/** Shows the card of the name at the cursor, and says it; pressed again, takes it away. */
export function sayWordAtCursor(view: EditorView, marks: Marks): boolean {
  if (hideCard(view)) return true;
  const word = wordIn(view.state, view.state.selection.main.head);
  const facts = word && findFacts(word.name, marks());
  const said = facts
    ? sayFacts(facts)
    : word
      ? `Nothing on this sheet is called ${word.name}.`
      : 'No name stands at the cursor.';
  view.dispatch({
    effects: [
      EditorView.announce.of(said),
      ...(facts ? [showCard.of(cardTooltip(word, facts))] : []),
    ],
  });
  return true;
}

/** Takes the card away that a key has shown; false where there is none. */
export function hideCard(view: EditorView): boolean {
  if (!view.state.field(card, false)) return false;
  view.dispatch({ effects: showCard.of(null) });
  return true;
}
