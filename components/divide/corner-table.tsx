import { Tex } from '@/components/ui/tex';
import type { Measure, Radius, Vertex } from '@/lib/divisions';
import { CELL, FIGURES, ROW, ScrollTable } from '@/components/ui/scroll-table';
import { sayCount, sayDecimal } from './wording';

interface CornerTableProps {
  corners: readonly Vertex[];
  parts: number;
  radius: Radius;
}

/** The exact coordinates, where they can be read and say more than the decimals do. */
function Exact({ corner: { x, y } }: { corner: Vertex }) {
  return (
    <td className={CELL}>
      {isWorthShowing(x) && (
        <div>
          <Tex tex={`x=${x.exact.tex}`} />
        </div>
      )}
      {isWorthShowing(y) && (
        <div>
          <Tex tex={`y=${y.exact.tex}`} />
        </div>
      )}
    </td>
  );
}

function isWorthShowing(measure: Measure): measure is Measure & { exact: { tex: string } } {
  return measure.exact !== null && measure.exact.text !== measure.decimal;
}

/** Coordinates of the corners from the centre, on one side of the datum; the other side mirrors them. */
export function CornerTable({ corners, parts, radius }: CornerTableProps) {
  const last = Math.floor(parts / 2);
  const shown = corners.length - 1;
  const hasExact = corners.some(({ x, y }) => isWorthShowing(x) || isWorthShowing(y));
  return (
    <div className="space-y-2">
      <p className="max-w-prose text-small text-soft">
        From the centre in {radius.unit}; corner 0 lies on the datum, the rest follow anticlockwise.{' '}
        {shown < last
          ? `Corners 0 to ${shown} of ${sayCount(parts)}.`
          : `Corner ${sayCount(parts)} − k mirrors corner k: same x, opposite y.`}
      </p>
      <ScrollTable
        caption="Corners"
        heads={hasExact ? ['Corner', 'x', 'y', 'Exact'] : ['Corner', 'x', 'y']}
      >
        {corners.map((corner) => (
          <tr key={corner.number} className={ROW}>
            <th scope="row" className={`${FIGURES} text-soft`}>
              {corner.number}
            </th>
            <td className={FIGURES}>{sayDecimal(corner.x.decimal)}</td>
            <td className={FIGURES}>{sayDecimal(corner.y.decimal)}</td>
            {hasExact && <Exact corner={corner} />}
          </tr>
        ))}
      </ScrollTable>
    </div>
  );
}
