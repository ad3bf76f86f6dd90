import { SheetFrame } from '@/components/drawing/sheet-frame';
import { TitleBlock } from '@/components/drawing/title-block';
import { answersFor, isHurried } from '@/components/sheet/answers';
import { CellRows } from '@/components/sheet/cell-rows';
import { foldAnswer } from '@/components/sheet/state/shown';
import type { NotebookContent } from '@/lib/notebooks/content';

/** A pentagonal light: small enough to read at a glance, and evaluated like any other sheet. */
const EXAMPLE: NotebookContent = {
  format: 1,
  settings: { digits: 30, unit: 'mm', step: '0.5 mm', rounding: 'half-even' },
  cells: [
    { id: 'r', kind: 'dimension', source: 'R = 1200 mm' },
    { id: 's', kind: 'dimension', source: 's = 2 R sin(turn/10)' },
    { id: 'p', kind: 'dimension', source: 's^2 == R^2 (5 - sqrt(5))/2' },
    { id: 'g', kind: 'dimension', source: 'a = turn/7' },
  ],
};

/** A real sheet on the front page, its figures worked out by this server. */
export async function FrontExample() {
  const answers = await answersFor(EXAMPLE);
  if (answers === null || isHurried(answers)) return null;
  const shown = foldAnswer(new Map(), answers);
  return (
    <section aria-label="An example sheet" className="min-w-0">
      <SheetFrame
        zones={8}
        short
        foot={
          <TitleBlock
            fields={[
              { label: 'Title', value: 'Five-light oculus', span: 6, strong: true },
              { label: 'Unit', value: 'mm', span: 3 },
              { label: 'Cutting step', value: '0.5 mm', span: 3 },
            ]}
          />
        }
      >
        <div className="space-y-5 px-3 py-5">
          {EXAMPLE.cells.map(({ id, source }) => (
            <CellRows key={id} source={source} lines={shown.get(id) ?? []} />
          ))}
        </div>
      </SheetFrame>
    </section>
  );
}
