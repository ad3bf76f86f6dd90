import Link from 'next/link';
import type { CheckLine, VersionLine } from '@/lib/notebooks/types';
import { Moment } from '@/components/ui/moment';
import { CheckedBy } from './checked-by';
import { RestoreButton } from './restore-button';

interface VersionTableProps {
  notebookId: string;
  head: number;
  mayRestore: boolean;
  versions: readonly VersionLine[];
  checks: readonly CheckLine[];
}

const CELL = 'px-3 py-2.5 align-top max-md:block max-md:px-0 max-md:py-0.5';
const HEAD = 'px-3 py-2 text-left text-small font-semibold whitespace-nowrap';

export function sayNote({ note, restoredFrom }: VersionLine): string {
  const restored = restoredFrom === null ? '' : `version ${restoredFrom} kept again`;
  return [restored, note].filter(Boolean).join('; ');
}

export function VersionTable(props: VersionTableProps) {
  const { notebookId, head, mayRestore, versions, checks } = props;
  return (
    <div className="border border-rule bg-sheet">
      <table className="w-full border-collapse max-md:block">
        <caption className="sr-only">Versions, newest first</caption>
        <thead className="border-b-2 border-ink max-md:sr-only">
          <tr>
            <th scope="col" className={`${HEAD} w-24`}>
              Version
            </th>
            <th scope="col" className={HEAD}>
              What changed
            </th>
            <th scope="col" className={HEAD}>
              By
            </th>
            <th scope="col" className={HEAD}>
              Kept
            </th>
            <td />
          </tr>
        </thead>
        <tbody className="max-md:block">
          {versions.map((version) => (
            <tr
              key={version.number}
              className="border-b border-hairline last:border-b-0 hover:bg-hand max-md:block max-md:px-3 max-md:py-2.5"
            >
              <th scope="row" className={`${CELL} text-left font-normal`}>
                <Link
                  href={`/notebooks/${notebookId}/versions/${version.number}`}
                  className="font-mono font-medium text-snapline underline-offset-4 hover:underline"
                >
                  <span className="sr-only md:hidden">Version </span>
                  {version.number}
                </Link>
                {version.number === head && (
                  <span className="ml-2 text-small text-soft">newest</span>
                )}
              </th>
              <td className={`${CELL} [overflow-wrap:anywhere]`}>
                {sayNote(version) || <span className="text-soft">not said</span>}
              </td>
              <td className={CELL}>
                {version.author}
                <CheckedBy checks={checks} number={version.number} />
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
          ))}
        </tbody>
      </table>
    </div>
  );
}
