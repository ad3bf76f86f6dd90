import {
  acceptCompletion,
  autocompletion,
  closeBrackets,
  closeBracketsKeymap,
  completionStatus,
  startCompletion,
} from '@codemirror/autocomplete';
import { insertNewline, standardKeymap } from '@codemirror/commands';
import { bracketMatching, Language, LRLanguage, syntaxHighlighting } from '@codemirror/language';
import { setDiagnostics, type Diagnostic } from '@codemirror/lint';
import { Annotation, EditorState, Prec } from '@codemirror/state';
import { EditorView, keymap, placeholder, type Command } from '@codemirror/view';
import { documentNonce } from '@/components/ui/nonce';
import { parser } from '@/lib/language/parser/cell.parser';
import type { SourceCommand } from '../cell-keys';
import { editorKeys } from '../keys/chord';
import { aboutWords, hideCard, sayWordAtCursor, wordIn } from './about-word';
import { completeFrom } from './completion';
import { highlighting, theme } from './look';
import { markDefinedBy, type SheetNames } from './names';
import { signatureHelp } from './signature';
import { findSignature } from './word-at';

export interface EditorOptions {
  parent: HTMLElement;
  /** One line of a dimension cell, or a whole note. */
  source: string;
  kind: 'dimension' | 'note';
  label: string;
  /** Where the cursor begins. */
  column: number;
  /** What was written and where the cursor stands; a line broken in two comes with its line break. */
  onWrite: (source: string, cursor: number) => void;
  /** Escape, or an arrow beyond the first or last line. */
  onLeave: (to: 'here' | 'before' | 'after', column: number) => boolean;
  /** Backspace at the beginning or Delete at the end: the neighbouring line is to be joined. */
  onJoin?: (side: 'before' | 'after') => boolean;
  /** The names of the sheet, for a dimension cell. */
  names?: SheetNames;
}

export interface PlacedFault {
  from: number;
  to: number;
  message: string;
  severity: 'error' | 'warning';
}

export interface EditorHandle {
  setSource: (source: string) => void;
  setFaults: (faults: readonly PlacedFault[]) => void;
  focus: (column: number) => void;
  destroy: () => void;
}

const cellLanguage: Language = LRLanguage.define({
  name: 'cell',
  parser,
  languageData: { closeBrackets: { brackets: ['(', '['], before: ')],' } },
});

/** Marks a change that came from outside (undo of the notebook, another version), not from typing. */
const fromOutside = Annotation.define<boolean>();

const PLACEHOLDERS = { dimension: 'p = 2 R sin(turn/34)', note: 'A note, in Markdown' } as const;

const NO_NAMES: SheetNames = { marks: () => [], goTo: () => false, rename: () => false };

const dimensionExtensions = (names: SheetNames) => [
  cellLanguage,
  syntaxHighlighting(highlighting),
  bracketMatching(),
  closeBrackets(),
  autocompletion({
    override: [completeFrom(names.marks)],
    icons: false,
    // Enter ends the line unless a name has been chosen with the arrows.
    selectOnOpen: false,
    // So nothing can be taken by mistake either, and the arrows may be pressed at once.
    interactionDelay: 0,
  }),
  signatureHelp((name) => findSignature(name, names.marks())),
  aboutWords(names.marks),
  EditorView.domEventHandlers({
    mousedown(event, view) {
      if (event.button !== 0 || !(event.ctrlKey || event.metaKey)) return false;
      const at = view.posAtCoords({ x: event.clientX, y: event.clientY });
      const word = at === null ? null : wordIn(view.state, at);
      return word !== null && names.goTo(word.name);
    },
  }),
];

/** Whether names to choose from are on the screen; then the arrows and Escape are for them. */
const isChoosing = (view: EditorView) => completionStatus(view.state) === 'active';

const nameAtCursor = (view: EditorView) =>
  wordIn(view.state, view.state.selection.main.head)?.name ?? null;

/** Opens a source in place. Loaded only when the first line is taken in hand. */
export function makeEditor(options: EditorOptions): EditorHandle {
  const { kind, label, onWrite, onLeave, onJoin, names = NO_NAMES } = options;
  const nonce = documentNonce();
  const atEdge = (view: EditorView, edge: 'before' | 'after') => {
    const { main } = view.state.selection;
    // A long line wraps: the arrow leaves it only from its first or last row.
    const next = view.moveVertically(main, edge === 'after');
    const within =
      next.head !== main.head &&
      view.coordsAtPos(next.head)?.top !== view.coordsAtPos(main.head)?.top;
    return main.empty && !within && onLeave(edge, main.head);
  };
  const join = (view: EditorView, side: 'before' | 'after') => {
    const { main } = view.state.selection;
    const edge = side === 'before' ? 0 : view.state.doc.length;
    return main.empty && main.head === edge && (onJoin?.(side) ?? false);
  };
  /** The name under the cursor; where there is none, the mark that the line defines. */
  const rename = (view: EditorView) => {
    const here = nameAtCursor(view);
    if (here !== null && names.rename(here)) return true;
    const own = markDefinedBy(view.state.doc.toString());
    return own !== null && names.rename(own);
  };
  const commands: Record<SourceCommand, Command> = {
    close: (view) => !isChoosing(view) && (hideCard(view) || onLeave('here', 0)),
    lineBefore: (view) => !isChoosing(view) && atEdge(view, 'before'),
    lineAfter: (view) => !isChoosing(view) && atEdge(view, 'after'),
    // A line of a sheet begins at its margin, whatever bracket the one before left open.
    newLine: insertNewline,
    offer: startCompletion,
    about: (view) => sayWordAtCursor(view, names.marks),
    goTo: (view) => names.goTo(nameAtCursor(view) ?? ''),
    rename,
  };
  const bound = (command: SourceCommand) =>
    editorKeys(command).map((key) => ({ key, run: commands[command] }));
  const named: SourceCommand[] = kind === 'dimension' ? ['offer', 'about', 'goTo', 'rename'] : [];
  const view = new EditorView({
    parent: options.parent,
    state: EditorState.create({
      doc: options.source,
      selection: { anchor: Math.min(options.column, options.source.length) },
      extensions: [
        nonce ? EditorView.cspNonce.of(nonce) : [],
        Prec.highest(
          keymap.of([
            ...(['close', 'lineBefore', 'lineAfter', ...named] as const).flatMap(bound),
            { key: 'Backspace', run: (view) => join(view, 'before') },
            { key: 'Delete', run: (view) => join(view, 'after') },
            ...editorKeys('accept').map((key) => ({ key, run: acceptCompletion })),
          ]),
        ),
        // No history here: the notebook has one of its own, across all cells.
        keymap.of([...closeBracketsKeymap, ...bound('newLine'), ...standardKeymap]),
        kind === 'dimension' ? dimensionExtensions(names) : [],
        theme,
        placeholder(PLACEHOLDERS[kind]),
        EditorView.lineWrapping,
        EditorView.contentAttributes.of({
          'aria-label': label,
          spellcheck: kind === 'note' ? 'true' : 'false',
          autocapitalize: 'off',
          autocorrect: 'off',
        }),
        EditorView.updateListener.of((update) => {
          const outside = update.transactions.some((one) => one.annotation(fromOutside));
          if (!update.docChanged || outside) return;
          onWrite(update.state.doc.toString(), update.state.selection.main.head);
        }),
      ],
    }),
  });

  return {
    setSource(source) {
      const old = view.state.doc.toString();
      if (old === source) return;
      view.dispatch({ changes: smallestChange(old, source), annotations: fromOutside.of(true) });
    },
    setFaults(faults) {
      const placed = faults.map((fault) => place(view.state, fault));
      view.dispatch(setDiagnostics(view.state, placed));
    },
    focus(column) {
      const anchor = Math.min(column, view.state.doc.length);
      if (anchor !== view.state.selection.main.head) view.dispatch({ selection: { anchor } });
      view.focus();
    },
    destroy: () => view.destroy(),
  };
}

/** The change between two texts without their common beginning and end, so the cursor stays put. */
export function smallestChange(old: string, next: string) {
  const most = Math.min(old.length, next.length);
  let from = 0;
  while (from < most && old[from] === next[from]) from += 1;
  let end = 0;
  while (end < most - from && old[old.length - 1 - end] === next[next.length - 1 - end]) end += 1;
  return { from, to: old.length - end, insert: next.slice(from, next.length - end) };
}

/** A fault of an older text may lie beyond the end of the present one; it is kept within. */
function place({ doc }: EditorState, { from, to, message, severity }: PlacedFault): Diagnostic {
  const start = Math.min(from, doc.length);
  const end = Math.min(Math.max(to, start), doc.length);
  return { from: start === end && start > 0 ? start - 1 : start, to: end, severity, message };
}
