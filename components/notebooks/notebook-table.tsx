import Link from 'next/link';
import type { MemberWorkshop } from '@/lib/accounts/types';
import type { NotebookLine } from '@/lib/notebooks/types';
import { Moment } from '@/components/ui/moment';
import { NotebookTools } from './notebook-tools';

interface NotebookTableProps {
  notebooks: readonly NotebookLine[];
  /** Those the person belongs to. */
  workshops: readonly MemberWorkshop[];
  archived: boolean;
  /** Whether only some of all notebooks were asked for. */
  filtered: boolean;
}

const CELL = 'px-3 py-2.5 align-top max-md:block max-md:px-0 max-md:py-0.5';
/** On a narrow screen, short facts stand beside one another. */
const BESIDE = 'max-md:mr-3 max-md:inline-block';
const HEAD = 'px-3 py-2 text-left text-small font-semibold whitespace-nowrap';

/** Notebooks the person may read; on a narrow screen each row is a card. */
export function NotebookTable({ notebooks, workshops, archived, filtered }: NotebookTableProps) {
  if (notebooks.length === 0) return <NoNotebooks archived={archived} filtered={filtered} />;
  return (
    <div className="border border-rule bg-sheet">
      <table className="w-full border-collapse max-md:block">
        <caption className="sr-only">Notebooks you may read</caption>
        <thead className="border-b-2 border-ink max-md:sr-only">
          <tr>
            <th scope="col" className={HEAD}>
              Title
            </th>
            <th scope="col" className={HEAD}>
              Workshop
            </th>
            <th scope="col" className={HEAD}>
              My role
            </th>
            <th scope="col" className={`${HEAD} text-right`}>
              Version
            </th>
            <th scope="col" className={HEAD}>
              Changed
            </th>
            <td />
          </tr>
        </thead>
        <tbody className="max-md:block">
          {notebooks.map((notebook) => (
            <tr
              key={notebook.id}
              className="border-b border-hairline last:border-b-0 hover:bg-hand max-md:block max-md:px-3 max-md:py-2.5"
            >
              <th scope="row" className={`${CELL} text-left font-normal`}>
                <Link
                  href={`/notebooks/${notebook.id}`}
                  className="font-serif text-note font-semibold text-snapline underline-offset-4 hover:underline [overflow-wrap:anywhere]"
                >
                  {notebook.title}
                </Link>
                {notebook.template && (
                  <span className="ml-2 whitespace-nowrap border border-rule px-1.5 py-px text-small text-soft">
                    template
                  </span>
                )}
              </th>
              <td className={`${CELL} ${BESIDE} md:min-w-36 [overflow-wrap:anywhere]`}>
                {notebook.workshop.name}
              </td>
              <td className={`${CELL} ${BESIDE}`}>{notebook.role}</td>
              <td className={`${CELL} ${BESIDE} font-mono tabular-nums md:text-right`}>
                <span className="font-sans md:hidden">version </span>
                {notebook.version}
              </td>
              <td className={CELL}>
                <Moment at={notebook.changedAt} />
                {notebook.changedBy && (
                  <span className="block text-small text-soft max-md:inline">
                    {' '}
                    by {notebook.changedBy}
                  </span>
                )}
              </td>
              <td className={`${CELL} md:text-right`}>
                <NotebookTools notebook={notebook} workshops={workshops} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function NoNotebooks({ archived, filtered }: { archived: boolean; filtered: boolean }) {
  const [title, text] = filtered
    ? ['No notebook like that.', 'None that you may read is in that workshop with that role.']
    : archived
      ? [
          'Nothing is archived.',
          'A notebook that is done with can be archived: it can still be read, but not changed.',
        ]
      : [
          'No notebook yet.',
          'A notebook holds the figures of one piece of work: what was given, what follows from it, and what is cut. Begin one, or ask a colleague to add you to theirs.',
        ];
  return (
    <div className="border border-rule bg-sheet p-1.5">
      <div className="border-2 border-ink px-6 py-14 text-center">
        <p className="font-serif text-head font-semibold">{title}</p>
        <p className="mx-auto mt-2 max-w-prose text-soft">{text}</p>
      </div>
    </div>
  );
}
