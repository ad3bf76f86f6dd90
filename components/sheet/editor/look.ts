import { HighlightStyle } from '@codemirror/language';
import { EditorView } from '@codemirror/view';
import { tags } from '@lezer/highlight';

/** Colours of a source: ruddle for what a line defines, the snapped line for functions, lichen for units. */
export const highlighting = HighlightStyle.define([
  { tag: tags.definition(tags.variableName), color: 'var(--ruddle)', fontWeight: '500' },
  { tag: tags.function(tags.variableName), color: 'var(--snapline)' },
  { tag: tags.constant(tags.variableName), color: 'var(--snapline)' },
  { tag: tags.unit, color: 'var(--lichen)' },
  { tag: tags.lineComment, color: 'var(--soft)', fontStyle: 'italic' },
]);

export const theme = EditorView.theme({
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
  '.cm-nonmatchingBracket, &.cm-focused .cm-nonmatchingBracket': {
    backgroundColor: 'var(--ruddle-wash)',
    outline: '1px dashed var(--ruddle)',
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
    // Above the strip of the sheet that stays at the top.
    zIndex: '40',
  },
  '.cm-tooltip.signature-line': {
    fontFamily: 'var(--font-mono), monospace',
    padding: '0.0625rem 0.5rem',
    color: 'var(--soft)',
  },
  '&:not(.cm-focused) .cm-tooltip.signature-line': { display: 'none' },
  '.cm-tooltip.signature-line b': {
    fontWeight: '600',
    color: 'var(--ink)',
    borderBottom: '2px solid var(--ruddle)',
  },
  '.cm-tooltip.cm-completionInfo': {
    padding: '0',
    maxWidth: '22rem',
    border: '1px solid var(--rule)',
  },
  '.cm-tooltip.cm-tooltip-autocomplete > ul': { fontFamily: 'var(--font-mono), monospace' },
  '.cm-tooltip.cm-tooltip-autocomplete > ul > li': {
    padding: '0.125rem 0.625rem',
    lineHeight: '1.25rem',
    display: 'flex',
    justifyContent: 'space-between',
    gap: '1.5rem',
  },
  '.cm-tooltip-autocomplete ul li[aria-selected]': {
    backgroundColor: 'var(--snapline-wash)',
    color: 'var(--ink)',
  },
  '.cm-completionDetail': { color: 'var(--soft)', fontStyle: 'normal', marginLeft: '0' },
  '.cm-completionMatchedText': {
    textDecoration: 'none',
    fontWeight: '500',
    color: 'var(--snapline)',
  },
  '.cm-diagnostic': { padding: '0.25rem 0.5rem' },
  '.cm-diagnostic-warning': { borderLeft: '3px solid var(--ochre)' },
  '.cm-diagnostic-error': { borderLeft: '3px solid var(--ruddle)' },
});
