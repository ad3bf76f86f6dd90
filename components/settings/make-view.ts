import { javascript } from '@codemirror/lang-javascript';
import { HighlightStyle, syntaxHighlighting } from '@codemirror/language';
import { EditorState } from '@codemirror/state';
import { EditorView } from '@codemirror/view';
import { tags } from '@lezer/highlight';
import { documentNonce } from '@/components/ui/nonce';

const highlighting = HighlightStyle.define([
  { tag: [tags.keyword, tags.operatorKeyword], color: 'var(--ruddle)' },
  { tag: [tags.string, tags.special(tags.string)], color: 'var(--lichen)' },
  { tag: [tags.number, tags.bool, tags.null], color: 'var(--ochre)' },
  {
    tag: [tags.function(tags.variableName), tags.function(tags.propertyName)],
    color: 'var(--snapline)',
  },
  { tag: tags.comment, color: 'var(--soft)', fontStyle: 'italic' },
]);

const theme = EditorView.theme({
  '&': { fontSize: '0.8125rem', color: 'var(--ink)' },
  '.cm-content': { fontFamily: 'var(--font-mono), monospace', padding: '0.75rem 0' },
  '.cm-line': { padding: '0 0.875rem' },
  '.cm-scroller': { fontFamily: 'inherit', lineHeight: '1.3rem' },
});

/** Source to be read and copied, not changed. */
export function makeView(parent: HTMLElement, text: string, label: string) {
  const nonce = documentNonce();
  return new EditorView({
    parent,
    state: EditorState.create({
      doc: text,
      extensions: [
        nonce ? EditorView.cspNonce.of(nonce) : [],
        javascript(),
        syntaxHighlighting(highlighting),
        theme,
        EditorState.readOnly.of(true),
        EditorView.editable.of(false),
        EditorView.contentAttributes.of({ 'aria-label': label, tabindex: '0' }),
      ],
    }),
  });
}
