import type { ReactNode } from 'react';

/** What is shown, with words in its place for whoever listens, where its signs would be misread. */
export function Spoken({ words, children }: { words: string | undefined; children: ReactNode }) {
  if (words === undefined) return children;
  return (
    <>
      <span aria-hidden="true">{children}</span>
      <span className="sr-only">{words}</span>
    </>
  );
}
