import { Mark } from '@/components/drawing/balloon';
import type { NotebookContent } from '@/lib/notebooks/content';
import { cellAnchor } from './cells';
import { listHeadings, listMarks, type IndexedHeading } from './state/index-entries';
import type { Shown } from './state/shown';

interface SheetIndexProps {
  content: NotebookContent;
  shown: Shown;
}

/** The marks of a sheet that is only read, with their sizes, and its headings; each leads to its place. */
export function SheetIndex({ content, shown }: SheetIndexProps) {
  const marks = listMarks(content, shown);
  return (
    <div className="space-y-6">
      {marks.length > 0 && (
        <section aria-labelledby="index-marks">
          <h2 id="index-marks" className="mb-1 text-small font-semibold">
            Marks
          </h2>
          <ul className="border-t border-rule">
            {marks.map(({ id, line, mark, size, faulty }) => (
              <li key={`${id}:${line}`} className="border-b border-hairline">
                <a
                  href={`#${cellAnchor(id)}`}
                  className="flex items-baseline justify-between gap-3 py-1 hover:bg-snapline-wash"
                >
                  <span className="min-w-0 truncate text-base">
                    <Mark mark={mark} />
                  </span>
                  <span
                    className={`shrink-0 font-mono text-small tabular-nums ${faulty ? 'text-ruddle' : ''}`}
                  >
                    {size}
                  </span>
                </a>
              </li>
            ))}
          </ul>
        </section>
      )}
      <HeadingList headings={listHeadings(content)} />
    </div>
  );
}

interface HeadingListProps {
  headings: readonly IndexedHeading[];
  /** Goes there by script, which opens what is folded; without it the link alone does. */
  onGo?: (id: string) => void;
}

export function HeadingList({ headings, onGo }: HeadingListProps) {
  if (headings.length === 0) return null;
  return (
    <section aria-labelledby="index-headings">
      <h2 id="index-headings" className="mb-1 text-small font-semibold">
        On this sheet
      </h2>
      <ul className="border-t border-rule">
        {headings.map(({ id, text, level }, index) => (
          <li key={index} className="border-b border-hairline">
            <a
              href={`#${cellAnchor(id)}`}
              onClick={
                onGo &&
                ((event) => {
                  event.preventDefault();
                  onGo(id);
                })
              }
              className={`block truncate py-1 text-small hover:bg-snapline-wash ${level > 1 ? 'pl-3' : ''}`}
            >
              {text}
            </a>
          </li>
        ))}
      </ul>
    </section>
  );
}
