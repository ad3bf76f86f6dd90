import { autocompletion, completionStatus } from '@codemirror/autocomplete';
import { insertNewline, standardKeymap } from '@codemirror/commands';
import {
  bracketMatching,
  HighlightStyle,
  Language,
  LRLanguage,
  syntaxHighlighting,
} from '@codemirror/language';
import { setDiagnostics, type Diagnostic } from '@codemirror/lint';
import { Annotation, EditorState, Prec } from '@codemirror/state';
import { EditorView, keymap, placeholder } from '@codemirror/view';
import { tags } from '@lezer/highlight';
import { documentNonce } from '@/components/ui/nonce';
import { completeFrom, type KnownMark } from './completion';
import { parser } from '@/lib/language/parser/cell.parser';

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
  /** Names to complete from, in a dimension cell. */
  marks?: () => readonly KnownMark[];
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

const cellLanguage: Language = LRLanguage.define({ name: 'cell', parser });

const highlighting = HighlightStyle.define([
  { tag: tags.definition(tags.variableName), color: 'var(--ruddle)', fontWeight: '500' },
  { tag: tags.function(tags.variableName), color: 'var(--snapline)' },
  { tag: tags.constant(tags.variableName), color: 'var(--snapline)' },
  { tag: tags.unit, color: 'var(--lichen)' },
  { tag: tags.lineComment, color: 'var(--soft)', fontStyle: 'italic' },
]);

const theme = EditorView.theme({
  '&': { color: 'var(--ink)', backgroundColor: 'transparent', fontSize: '0.9375rem' },
  '&.cm-focused': { outline: 'none' },
  '.cm-content': {
    fontFamily: 'var(--font-mono), monospace',
    lineHeight: '1.5rem',
    padding: '0',
    caretColor: 'var(--ruddle)',
  },
  '.cm-line': { padding: '0' },
  '.cm-scroller': { fontFamily: 'inherit', lineHeight: '1.5rem' },
  '.cm-cursor': { borderLeftColor: 'var(--ruddle)', borderLeftWidth: '2px' },
  '.cm-placeholder': { color: 'var(--soft)' },
  '.cm-matchingBracket, &.cm-focused .cm-matchingBracket': {
    backgroundColor: 'var(--snapline-wash)',
    outline: '1px solid var(--snapline)',
  },
  '.cm-lintRange-error': {
    backgroundImage: 'none',
    textDecoration: 'underline wavy 1px var(--ruddle)',
    textUnderlineOffset: '4px',
    backgroundColor: 'var(--ruddle-wash)',
  },
  '.cm-lintRange-warning': {
    backgroundImage: 'none',
    textDecoration: 'underline dotted 2px var(--ochre)',
    textUnderlineOffset: '4px',
  },
  '.cm-tooltip': {
    border: '1px solid var(--ink)',
    backgroundColor: 'var(--sheet)',
    color: 'var(--ink)',
    fontFamily: 'var(--font-grotesque), sans-serif',
    fontSize: '0.8125rem',
  },
  '.cm-tooltip.cm-tooltip-autocomplete > ul': { fontFamily: 'var(--font-mono), monospace' },
  '.cm-tooltip-autocomplete ul li[aria-selected]': {
    backgroundColor: 'var(--snapline-wash)',
    color: 'var(--ink)',
  },
  '.cm-completionDetail': { color: 'var(--soft)', fontStyle: 'normal' },
  '.cm-completionMatchedText': {
    textDecoration: 'none',
    fontWeight: '500',
    color: 'var(--snapline)',
  },
  '.cm-diagnostic': { padding: '0.25rem 0.5rem' },
  '.cm-diagnostic-warning': { borderLeft: '3px solid var(--ochre)' },
  '.cm-diagnostic-error': { borderLeft: '3px solid var(--ruddle)' },
});

/** Marks a change that came from outside (undo of the notebook, another version), not from typing. */
const fromOutside = Annotation.define<boolean>();

const PLACEHOLDERS = { dimension: 'p = 2 R sin(turn/34)', note: 'A note, in Markdown' } as const;

const dimensionExtensions = (marks: EditorOptions['marks']) => [
  cellLanguage,
  syntaxHighlighting(highlighting),
  bracketMatching(),
  autocompletion({
    override: [completeFrom(marks ?? (() => []))],
    icons: false,
    // Enter ends the line unless a name has been chosen with the arrows.
    selectOnOpen: false,
  }),
];

/** Whether names to choose from are on the screen; then the arrows and Escape are for them. */
const isChoosing = (view: EditorView) => completionStatus(view.state) === 'active';

/** Opens a source in place. Loaded only when the first line is taken in hand. */
export function makeEditor(options: EditorOptions): EditorHandle {
  const { kind, label, onWrite, onLeave, onJoin } = options;
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
  const view = new EditorView({
    parent: options.parent,
    state: EditorState.create({
      doc: options.source,
      selection: { anchor: Math.min(options.column, options.source.length) },
      extensions: [
        nonce ? EditorView.cspNonce.of(nonce) : [],
        Prec.highest(
          keymap.of([
            { key: 'Escape', run: (view) => !isChoosing(view) && onLeave('here', 0) },
            { key: 'ArrowUp', run: (view) => !isChoosing(view) && atEdge(view, 'before') },
            { key: 'ArrowDown', run: (view) => !isChoosing(view) && atEdge(view, 'after') },
            { key: 'Backspace', run: (view) => join(view, 'before') },
            { key: 'Delete', run: (view) => join(view, 'after') },
          ]),
        ),
        // No history here: the notebook has one of its own, across all cells.
        // A line of a sheet begins at its margin, whatever bracket the one before left open.
        keymap.of([{ key: 'Enter', run: insertNewline }, ...standardKeymap]),
        kind === 'dimension' ? dimensionExtensions(options.marks) : [],
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
