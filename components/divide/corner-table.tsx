import { Tex } from '@/components/ui/tex';
import type { Measure, Radius, Vertex } from '@/lib/divisions';
import { FIGURES, ROW, ScrollTable } from './scroll-table';
import { sayCount, sayDecimal } from './wording';

interface CornerTableProps {
  corners: readonly Vertex[];
  parts: number;
  radius: Radius;
}

function Coordinate({ value: { decimal, exact } }: { value: Measure }) {
  return (
    <td className={FIGURES}>
      {sayDecimal(decimal)}
      {exact && exact.text !== decimal && (
        <div className="pt-0.5 font-sans">
          <Tex tex={exact.tex} />
        </div>
      )}
    </td>
  );
}

/** Coordinates of the corners from the centre, on one side of the datum; the other side mirrors them. */
export function CornerTable({ corners, parts, radius }: CornerTableProps) {
  const last = Math.floor(parts / 2);
  const shown = corners.length - 1;
  return (
    <div className="space-y-2">
      <p className="max-w-prose text-small text-soft">
        From the centre in {radius.unit}; corner 0 lies on the datum, the rest follow anticlockwise.{' '}
        {shown < last
          ? `Corners 0 to ${shown} of ${sayCount(parts)}.`
          : `Corner ${sayCount(parts)} − k mirrors corner k: same x, opposite y.`}
      </p>
      <ScrollTable caption="Corners" heads={['Corner', 'x', 'y']}>
        {corners.map(({ number, x, y }) => (
          <tr key={number} className={ROW}>
            <th scope="row" className={`${FIGURES} text-soft`}>
              {number}
            </th>
            <Coordinate value={x} />
            <Coordinate value={y} />
          </tr>
        ))}
      </ScrollTable>
    </div>
  );
}
