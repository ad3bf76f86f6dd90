import Link from 'next/link';
import type { CheckLine, HistoryEntry, VersionLine } from '@/lib/notebooks/types';
import { Button } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Sentence } from '@/components/ui/sentence';
import { CheckedBy } from './checked-by';
import { RestoreButton } from './restore-button';

interface HistoryListProps {
  notebookId: string;
  head: number;
  mayRestore: boolean;
  entries: readonly HistoryEntry[];
  checks: readonly CheckLine[];
}

const CELL = 'px-3 py-2.5 align-top max-md:block max-md:px-0 max-md:py-0.5';
const HEAD = 'px-3 py-2 text-left text-small font-semibold whitespace-nowrap';

/** What was said at its saving, and what it came from. */
export function sayNote({ note, restoredFrom, mergedWith }: VersionLine): string {
  const restored = restoredFrom === null ? '' : `version ${restoredFrom} kept again`;
  const merged = mergedWith === null ? '' : `brought together with version ${mergedWith}`;
  return [restored, merged, note].filter(Boolean).join('; ');
}

/** The history as a table whose first columns choose two versions to compare. */
export function HistoryList(props: HistoryListProps) {
  const { notebookId, head, mayRestore, entries, checks } = props;
  const newest = entries[0]?.versions[0]?.number;
  const second = entries[1]?.versions[0]?.number ?? entries[0]?.versions.at(-1)?.number;
  return (
    <form action={`/notebooks/${notebookId}/compare`} className="space-y-3">
      <div className="border border-rule bg-sheet">
        <table className="w-full border-collapse max-md:block">
          <caption className="sr-only">Versions, newest first</caption>
          <thead className="border-b-2 border-ink max-md:sr-only">
            <tr>
              <th scope="col" className={`${HEAD} w-24`}>
                Compare
              </th>
              <th scope="col" className={`${HEAD} w-28`}>
                Version
              </th>
              <th scope="col" className={HEAD}>
                What changed
              </th>
              <th scope="col" className={HEAD}>
                By
              </th>
              <th scope="col" className={HEAD}>
                Saved
              </th>
              <td />
            </tr>
          </thead>
          <tbody className="max-md:block">
            {entries.map((entry) => {
              const [version, ...earlier] = entry.versions;
              if (version === undefined) return null;
              const note = sayNote(version);
              return (
                <tr
                  key={version.number}
                  className="border-b border-hairline last:border-b-0 hover:bg-hand max-md:block max-md:px-3 max-md:py-2.5"
                >
                  <td className={`${CELL} whitespace-nowrap max-md:float-right`}>
                    <Choose name="from" number={version.number} chosen={second} />
                    <Choose name="to" number={version.number} chosen={newest} />
                  </td>
                  <th scope="row" className={`${CELL} text-left font-normal`}>
                    <VersionLink notebookId={notebookId} number={version.number} />
                    {version.number === head && (
                      <span className="ml-2 text-small text-soft">newest</span>
                    )}
                  </th>
                  <td className={`${CELL} [overflow-wrap:anywhere]`}>
                    {note !== '' && <p className="font-semibold">{note}</p>}
                    <p className={note === '' ? '' : 'text-small text-soft'}>
                      <Words words={entry.words} first={version.number === 1} />
                    </p>
                    {earlier.length > 0 && (
                      <Run notebookId={notebookId} versions={entry.versions} />
                    )}
                  </td>
                  <td className={CELL}>
                    {version.author}
                    {entry.versions.map(({ number }) => (
                      <CheckedBy key={number} checks={checks} number={number} />
                    ))}
                    {version.byItself && (
                      <span className="block text-small text-soft">saved by the sheet</span>
                    )}
                  </td>
                  <td className={CELL}>
                    <Moment at={version.savedAt} />
                  </td>
                  <td className={`${CELL} md:text-right`}>
                    {mayRestore && version.number !== head && (
                      <RestoreButton notebookId={notebookId} number={version.number} head={head} />
                    )}
                  </td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
      <div className="sticky bottom-0 flex items-center gap-3 border-t border-rule bg-limestone py-2">
        <Button type="submit" look="main">
          Compare the two chosen
        </Button>
        <span className="text-small text-soft max-md:hidden">
          from the left column to the right one
        </span>
      </div>
    </form>
  );
}

interface ChooseProps {
  name: 'from' | 'to';
  number: number;
  chosen: number | undefined;
}

function Choose({ name, number, chosen }: ChooseProps) {
  return (
    <label className="inline-flex min-h-7 min-w-9 items-center justify-center gap-1">
      <input
        type="radio"
        name={name}
        value={number}
        defaultChecked={number === chosen}
        className="size-4 accent-snapline"
      />
      <span className="text-small md:sr-only">
        {name}
        <span className="sr-only">{` version ${number}`}</span>
      </span>
    </label>
  );
}

const VersionLink = ({ notebookId, number }: { notebookId: string; number: number }) => (
  <Link
    href={`/notebooks/${notebookId}/versions/${number}`}
    aria-label={`Version ${number}`}
    className="font-mono font-medium text-snapline underline-offset-4 hover:underline"
  >
    <span className="md:hidden">Version </span>
    {number}
  </Link>
);

function Words({ words, first }: { words: string | null; first: boolean }) {
  if (words !== null) return <Sentence text={words} />;
  return <span className="text-soft">{first ? 'began the notebook' : 'not worked out yet'}</span>;
}

/** The saves that one entry gathers, opened when asked for. */
function Run({ notebookId, versions }: { notebookId: string; versions: HistoryEntry['versions'] }) {
  const [newest, oldest] = [versions[0]?.number ?? 0, versions.at(-1)?.number ?? 0];
  return (
    <details className="mt-1">
      <summary className="w-fit text-small text-snapline underline-offset-4 hover:underline">
        {`${versions.length} saves, versions ${oldest} to ${newest}`}
      </summary>
      <ol className="mt-1 space-y-1 border-l border-hairline pl-3" reversed start={newest}>
        {versions.map(({ number, savedAt, words, mergedWith }) => (
          <li key={number} className="text-small">
            <VersionLink notebookId={notebookId} number={number} /> <Moment at={savedAt} />
            {words !== null && (
              <>
                {': '}
                <Sentence text={words} />
              </>
            )}
            {mergedWith !== null && ` (brought together with version ${mergedWith})`}
          </li>
        ))}
      </ol>
    </details>
  );
}
