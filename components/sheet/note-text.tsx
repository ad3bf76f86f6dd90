import { renderNote } from './note';
import { NOTE_LOOK } from './note-look';

/** A note on a page that the server sets. */
export function NoteText({ source }: { source: string }) {
  return <div className={NOTE_LOOK} dangerouslySetInnerHTML={{ __html: renderNote(source) }} />;
}
