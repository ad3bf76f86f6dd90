import {
  insertBracket,
  insertCompletionText,
  pickedCompletion,
  type Completion,
  type CompletionContext,
  type CompletionResult,
} from '@codemirror/autocomplete';
import type { EditorView } from '@codemirror/view';
import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';
import type { KnownMark } from './names';
import { codeLength, findFacts } from './word-at';
import { drawWordCard } from './word-card';

/** A name begins so; shorter ones are typed faster than chosen. */
const NAME = /[\p{L}][\p{L}\p{N}_]*/u;
const SHORTEST = 2;
/** Directly after a number a unit is likely, and its first letter is enough. */
const AFTER_NUMBER = /[\d.]\s*$/;

/** Puts the brackets of a call and stands between them; brackets that are there already serve. */
function applyCall(view: EditorView, completion: Completion, from: number, to: number) {
  const { label } = completion;
  const isOpen = view.state.sliceDoc(to, to + 1) === '(';
  view.dispatch({
    ...insertCompletionText(view.state, label, from, to),
    annotations: pickedCompletion.of(completion),
  });
  // Put as if typed, so that the closing one can be typed over.
  const brackets = isOpen ? null : insertBracket(view.state, '(');
  view.dispatch(brackets ?? { selection: { anchor: from + label.length + 1 } });
}

function infoOf(name: string, marks: readonly KnownMark[]) {
  return () => {
    const facts = findFacts(name, marks);
    return facts && drawWordCard(facts);
  };
}

const unitWords: readonly Completion[] = UNITS.map(({ name, meaning }) => ({
  label: name,
  detail: meaning,
  type: 'unit',
}));

const otherWords: readonly Completion[] = [
  ...FUNCTIONS.map(({ name, signature }) => ({
    label: name,
    detail: signature.slice(name.length),
    type: 'function',
    info: infoOf(name, []),
    apply: applyCall,
  })),
  ...CONSTANTS.map(({ name, meaning }) => ({ label: name, detail: meaning, type: 'constant' })),
];

const boosted = (options: readonly Completion[], boost: number) =>
  options.map((option) => ({ ...option, boost }));

/** Offers marks of the sheet, then the words of the language, units first after a number; nothing where the word is whole. */
export function completeFrom(marks: () => readonly KnownMark[]) {
  return (context: CompletionContext): CompletionResult | null => {
    const { state, pos, explicit } = context;
    const line = state.doc.lineAt(pos);
    if (pos - line.from > codeLength(line.text)) return null;
    const before = context.matchBefore(NAME);
    if (!before && !explicit) return null;
    const word = before?.text ?? '';
    const from = before?.from ?? pos;
    const afterNumber = AFTER_NUMBER.test(state.sliceDoc(line.from, from));
    if (!explicit && word.length < (afterNumber ? 1 : SHORTEST)) return null;
    const known = marks();
    const offered: Completion[] = [
      ...known.map(({ name, signature, size }) => ({
        label: name,
        detail: signature === null ? size : signature.slice(name.length),
        type: 'mark',
        boost: 10,
        info: infoOf(name, known),
        ...(signature === null ? {} : { apply: applyCall }),
      })),
      ...boosted(unitWords, afterNumber ? 50 : -5),
      ...otherWords,
    ];
    if (!explicit && offered.some(({ label }) => label === word)) return null;
    return { from, options: offered, validFor: /^[\p{L}\p{N}_]*$/u };
  };
}
