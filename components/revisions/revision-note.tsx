/** What is new in a revision, in the words of whoever issued it. */
export function RevisionNote({ note }: { note: string | null }) {
  if (note === null) return null;
  return (
    <p className="max-w-prose whitespace-pre-line border-l-2 border-rule pl-4 font-serif text-note [overflow-wrap:anywhere] print:hidden">
      {note}
    </p>
  );
}
