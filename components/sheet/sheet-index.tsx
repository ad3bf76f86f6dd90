import { Mark } from '@/components/drawing/balloon';
import type { NotebookContent } from '@/lib/notebooks/content';
import { cellAnchor } from './cells';
import { headingsOf } from './note';
import type { Shown } from './state/shown';
import { sayBriefly } from './wording';

interface SheetIndexProps {
  content: NotebookContent;
  shown: Shown;
}

interface Entry {
  key: string;
  cell: string;
  mark: string;
  size: string;
  faulty: boolean;
}

function marksOf({ content, shown }: SheetIndexProps): Entry[] {
  return content.cells.flatMap(({ id }) =>
    (shown.get(id) ?? []).flatMap(({ result }) =>
      result.mark === null
        ? []
        : [
            {
              key: `${id}:${result.line}`,
              cell: id,
              mark: result.mark,
              size: sayBriefly(result),
              faulty: result.kind === 'error',
            },
          ],
    ),
  );
}

/** The marks of the sheet with their sizes, and its headings; each leads to its place. */
export function SheetIndex(props: SheetIndexProps) {
  const marks = marksOf(props);
  const headings = props.content.cells.flatMap(({ id, kind, source }) =>
    kind === 'section'
      ? [{ id, level: 1, text: source.trim() || 'Untitled' }]
      : kind === 'note'
        ? headingsOf(source).map((heading) => ({ ...heading, id }))
        : [],
  );
  if (marks.length === 0 && headings.length === 0) {
    return (
      <p className="text-small text-soft">Marks and headings are listed here as you write them.</p>
    );
  }
  return (
    <div className="space-y-6">
      {marks.length > 0 && (
        <section aria-labelledby="index-marks">
          <h2 id="index-marks" className="mb-1 text-small font-semibold">
            Marks
          </h2>
          <ul className="border-t border-rule">
            {marks.map(({ key, cell, mark, size, faulty }) => (
              <li key={key} className="border-b border-hairline">
                <a
                  href={`#${cellAnchor(cell)}`}
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
      {headings.length > 0 && (
        <section aria-labelledby="index-headings">
          <h2 id="index-headings" className="mb-1 text-small font-semibold">
            On this sheet
          </h2>
          <ul className="border-t border-rule">
            {headings.map(({ id, text, level }, index) => (
              <li key={index} className="border-b border-hairline">
                <a
                  href={`#${cellAnchor(id)}`}
                  className={`block truncate py-1 text-small hover:bg-snapline-wash ${level > 1 ? 'pl-3' : ''}`}
                >
                  {text}
                </a>
              </li>
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}
