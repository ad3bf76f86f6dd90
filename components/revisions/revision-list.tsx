import Link from 'next/link';
import type { RevisionLine } from '@/lib/notebooks/types';
import { Moment } from '@/components/ui/moment';
import { ReevaluateButton } from './reevaluate-button';

interface RevisionListProps {
  notebookId: string;
  revisions: readonly RevisionLine[];
}

/** Issued revisions, newest first: the letter large, as on the sheet, what it was for and who answers for it. */
export function RevisionList({ notebookId, revisions }: RevisionListProps) {
  if (revisions.length === 0) {
    return (
      <p className="border border-rule bg-sheet px-5 py-8 font-serif text-note italic text-soft">
        Nothing has been issued yet.
      </p>
    );
  }
  return (
    <ol aria-label="Revisions, newest first" className="border border-rule bg-sheet">
      {revisions.map((revision) => (
        <li
          key={revision.letter}
          className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-4 gap-y-2 border-b border-hairline px-4 py-4 last:border-b-0 sm:grid-cols-[auto_minmax(0,1fr)_auto] sm:px-5"
        >
          <Link
            href={`/notebooks/${notebookId}/revisions/${revision.letter}`}
            aria-label={`Revision ${revision.letter}`}
            className={`flex size-12 items-center justify-center self-start border-2 font-serif text-figure font-semibold hover:bg-hand ${
              revision.supersededBy === null ? 'border-ink' : 'border-rule text-soft'
            }`}
          >
            {revision.letter}
          </Link>
          <div className="min-w-0">
            <p className="font-medium [overflow-wrap:anywhere]">
              <Link
                href={`/notebooks/${notebookId}/revisions/${revision.letter}`}
                className="text-snapline underline underline-offset-4"
              >
                Revision {revision.letter}
              </Link>
              {`, ${revision.purpose}`}
              {revision.supersededBy !== null && (
                <strong className="ml-2 font-semibold text-ruddle">
                  superseded by {revision.supersededBy}
                </strong>
              )}
            </p>
            {revision.note !== null && (
              <p className="mt-0.5 whitespace-pre-line font-serif [overflow-wrap:anywhere]">
                {revision.note}
              </p>
            )}
            <p className="mt-1 text-small text-soft">
              issued <Moment at={revision.issuedAt} /> by {revision.issuedBy}, from{' '}
              <Link
                href={`/notebooks/${notebookId}/versions/${revision.version}`}
                className="underline underline-offset-4"
              >
                version {revision.version}
              </Link>
              {revision.checkedBy === null ? '' : `, checked by ${revision.checkedBy}`} · check code{' '}
              <span className="whitespace-nowrap font-mono">{revision.checkCode}</span>
            </p>
          </div>
          <div className="max-sm:col-start-2">
            <ReevaluateButton notebookId={notebookId} letter={revision.letter} />
          </div>
        </li>
      ))}
    </ol>
  );
}
