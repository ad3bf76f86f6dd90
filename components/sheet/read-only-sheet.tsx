import { SectionRule } from '@/components/drawing/section-rule';
import { TitleBlock, type TitleField } from '@/components/drawing/title-block';
import type { NotebookContent } from '@/lib/notebooks/content';
import { CellRows } from './cell-rows';
import { cellAnchor } from './cells';
import { NoteText } from './note-text';
import { SheetIndex } from './sheet-index';
import { SheetLayout, zonesFor } from './sheet-layout';
import { foldAnswer, type CellAnswer } from './state/shown';

interface ReadOnlySheetProps {
  content: NotebookContent;
  answers: CellAnswer[];
  fields: readonly TitleField[];
}

/** A sheet that is only read: drawn on the server, it needs no script. */
export function ReadOnlySheet({ content, answers, fields }: ReadOnlySheetProps) {
  const shown = foldAnswer(new Map(), answers);
  return (
    <SheetLayout
      index={<SheetIndex content={content} shown={shown} />}
      foot={<TitleBlock fields={fields} />}
      zones={zonesFor(content.cells.length)}
    >
      {content.cells.length === 0 && (
        <p className="py-10 text-center font-serif text-note italic text-soft">
          Nothing has been written on this sheet yet.
        </p>
      )}
      <div className="space-y-4">
        {content.cells.map(({ id, kind, source }) => {
          if (kind === 'section') {
            return (
              <section key={id} id={cellAnchor(id)} className="px-3 pt-2 max-sm:px-2">
                <SectionRule>{source}</SectionRule>
              </section>
            );
          }
          if (kind === 'note') {
            return (
              <section
                key={id}
                id={cellAnchor(id)}
                className="px-3 py-2 max-sm:px-2 sm:pl-[6.875rem]"
              >
                <NoteText source={source} />
              </section>
            );
          }
          return (
            <section key={id} id={cellAnchor(id)} className="px-3 py-3 max-sm:px-2">
              <CellRows source={source} lines={shown.get(id) ?? []} />
            </section>
          );
        })}
      </div>
    </SheetLayout>
  );
}
