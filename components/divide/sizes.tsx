import { Tex } from '@/components/ui/tex';
import type { Measure, Measures, Radius } from '@/lib/divisions';
import { sayDecimal } from './wording';

interface SizesProps {
  measures: Measures;
  radius: Radius;
}

/** Side, apothem and area: the exact value where it can be read, the decimal always. */
export function Sizes({ measures, radius: { unit } }: SizesProps) {
  const rows: [string, Measure, string][] = [
    ['Side', measures.side, unit],
    ['Apothem', measures.apothem, unit],
    ['Area', measures.area, `${unit}²`],
  ];
  return (
    <dl className="border-t border-hairline">
      {rows.map(([label, { decimal, exact }, in_]) => (
        <div
          key={label}
          className="grid gap-x-6 border-b border-hairline py-2 sm:grid-cols-[7rem_minmax(0,1fr)]"
        >
          <dt className="font-semibold">{label}</dt>
          <dd className="min-w-0 space-y-1">
            {exact && exact.text !== decimal && (
              <div
                role="group"
                aria-label={`${label}, exact`}
                tabIndex={0}
                className="scroll-hint overflow-x-auto overflow-y-hidden py-1 text-figure"
              >
                <Tex tex={exact.tex} display />
              </div>
            )}
            <p className="font-mono [overflow-wrap:anywhere]">
              {sayDecimal(decimal)} {in_}
            </p>
          </dd>
        </div>
      ))}
    </dl>
  );
}
