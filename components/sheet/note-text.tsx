import { memo } from 'react';
import { renderNote } from './note';

/** A note set in the text serif. */
export const NoteText = memo(function NoteText({ source }: { source: string }) {
  return (
    <div
      className="prose-note max-w-prose font-serif text-note [overflow-wrap:anywhere]"
      dangerouslySetInnerHTML={{ __html: renderNote(source) }}
    />
  );
});
