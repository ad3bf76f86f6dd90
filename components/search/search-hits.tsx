import Link from 'next/link';
import type { SearchHit, Snippet } from '@/lib/notebooks/types';
import { Mark } from '@/components/drawing/balloon';
import { Moment } from '@/components/ui/moment';

/** Where a cell stands on its sheet. */
const cellAddress = (notebook: string, cell: string) => `/notebooks/${notebook}#cell-${cell}`;

/** What was found, each notebook with the marks and the place in its text that were asked for. */
export function SearchHits({ hits }: { hits: readonly SearchHit[] }) {
  return (
    <ol className="border border-rule bg-sheet" aria-label="Found">
      {hits.map((hit) => (
        <li key={hit.id} className="space-y-2 border-b border-hairline px-4 py-3 last:border-b-0">
          <div className="flex flex-wrap items-baseline justify-between gap-x-6">
            <h2 className="min-w-0">
              <Link
                href={`/notebooks/${hit.id}`}
                className="font-serif text-note font-semibold text-snapline underline-offset-4 hover:underline [overflow-wrap:anywhere]"
              >
                {hit.title}
              </Link>
            </h2>
            <p className="text-small text-soft">
              {hit.workshop.name} · {hit.role} · <Moment at={hit.changedAt} />
            </p>
          </div>
          {hit.marks.length > 0 && (
            <ul className="space-y-1" aria-label="Marks">
              {hit.marks.map(({ cell, line, mark, definition }) => (
                <li key={`${cell}-${line}`}>
                  <Link
                    href={cellAddress(hit.id, cell)}
                    className="group flex items-baseline gap-3 hover:bg-hand"
                  >
                    <span className="grid h-7 min-w-7 max-w-40 shrink-0 place-items-center truncate rounded-full border border-ink px-1.5">
                      <Mark mark={mark} />
                    </span>
                    <code className="min-w-0 font-mono text-source underline-offset-4 [overflow-wrap:anywhere] group-hover:underline">
                      {definition}
                    </code>
                  </Link>
                </li>
              ))}
            </ul>
          )}
          {hit.snippet && (
            <Link
              href={cellAddress(hit.id, hit.snippet.cell)}
              className="block underline-offset-4 [overflow-wrap:anywhere] hover:underline"
            >
              <Words snippet={hit.snippet} />
            </Link>
          )}
        </li>
      ))}
    </ol>
  );
}

/** The text around the words found; these are underlined and set bold, not told by colour alone. */
function Words({ snippet }: { snippet: Snippet }) {
  return snippet.pieces.map(({ text, found }, index) =>
    found ? (
      <mark key={index} className="bg-ochre-wash px-0.5 font-semibold text-ink underline">
        {text}
      </mark>
    ) : (
      text
    ),
  );
}
