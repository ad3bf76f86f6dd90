import Link from 'next/link';
import type { ActivityEntry } from '@/lib/workshops/types';
import { Moment } from '@/components/ui/moment';

interface ActivityListProps {
  entries: readonly ActivityEntry[];
}

/** The record as sentences, newest first. Titles are those of then. */
export function ActivityList({ entries }: ActivityListProps) {
  if (entries.length === 0) {
    return (
      <p className="border border-rule bg-sheet px-4 py-10 text-center text-soft">
        Nothing of that kind is on the record.
      </p>
    );
  }
  return (
    <ol className="border border-rule bg-sheet" reversed>
      {entries.map((entry) => (
        <li
          key={entry.number}
          className="grid gap-x-5 border-b border-hairline px-3 py-1.5 last:border-b-0 sm:grid-cols-[12.5rem_minmax(0,1fr)]"
        >
          <span className="text-small leading-6 text-soft">
            <Moment at={entry.at} />
          </span>
          <span className="min-w-0 [overflow-wrap:anywhere]">
            <span className="font-medium">{entry.who}</span> {entry.did}{' '}
            {entry.notebookId ? (
              <Link
                href={`/notebooks/${entry.notebookId}`}
                className="text-snapline underline underline-offset-4 hover:no-underline"
              >
                {entry.subject}
              </Link>
            ) : (
              entry.subject
            )}
            {entry.more && <span className="text-soft"> ({entry.more})</span>}
          </span>
        </li>
      ))}
    </ol>
  );
}
