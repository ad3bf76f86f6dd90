import type { ReactNode } from 'react';
import { Compartments } from '@/components/drawing/compartments';
import { SheetFrame } from '@/components/drawing/sheet-frame';
import { TitleBlock } from '@/components/drawing/title-block';
import { Notice } from '@/components/ui/notice';
import { Tex } from '@/components/ui/tex';
import { divisionSteps, vertices, type DividedCircle } from '@/lib/divisions';
import { ChainTable } from './chain-table';
import { shownChain } from './chains';
import { CornerTable } from './corner-table';
import { PolygonFigure } from './polygon-figure';
import { Sizes } from './sizes';
import { StepList } from './step-list';
import { sayCount, sayReasons, sayVerdict, verdictCompartments } from './wording';

const CORNERS_SHOWN = 25;
const CORNER_DIGITS = 12;

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="space-y-3">
      <h2 className="border-b-2 border-ink pb-1 font-serif text-figure font-semibold">{title}</h2>
      {children}
    </section>
  );
}

interface DivisionSheetProps {
  division: DividedCircle;
  /** As it was typed. */
  radiusTyped: string;
}

/** The answer: verdict, reasons, sizes, steps, quadratics and corners on one sheet. */
export function DivisionSheet({ division, radiusTyped }: DivisionSheetProps) {
  const { parts, reach, radius, measures, fermatPrimes } = division;
  const steps = divisionSteps(parts) ?? [];
  const chains = reach.compass ? fermatPrimes.filter((prime) => prime > 3).map(shownChain) : [];
  return (
    <SheetFrame
      short
      foot={
        <TitleBlock
          fields={[
            {
              label: 'Title',
              value: `Circle in ${sayCount(parts)} ${parts === 1 ? 'part' : 'parts'}`,
              span: 6,
              strong: true,
            },
            { label: 'Radius', value: radiusTyped, span: 3 },
            { label: 'Unit', value: radius?.unit ?? '', span: 3 },
          ]}
        />
      }
    >
      <div className="space-y-8 px-3 py-5 sm:px-5">
        <div className="grid items-start gap-6 md:grid-cols-[minmax(0,1fr)_15rem]">
          <div className="min-w-0 space-y-4">
            <Notice tone={reach.compass ? 'good' : 'caution'} title={sayVerdict(division)} />
            <Compartments items={verdictCompartments(division)} />
            <ul className="max-w-prose list-disc space-y-1 pl-5" aria-label="Reasons">
              {sayReasons(division).map((reason) => (
                <li key={reason}>{reason}</li>
              ))}
            </ul>
          </div>
          {parts > 2 && <PolygonFigure parts={parts} />}
        </div>
        {measures && radius && (
          <Part title="Sizes of the polygon">
            <Sizes measures={measures} radius={radius} />
          </Part>
        )}
        {steps.length > 0 && (
          <Part title="Steps">
            <StepList steps={steps} />
          </Part>
        )}
        {chains.length > 0 && (
          <Part title="Quadratics and Carlyle circles">
            <p className="max-w-prose text-small">
              The circle on the diameter from (0, 1) to (s, p) meets the axis in the roots of{' '}
              <Tex tex="x^2-sx+p=0" />. Figures are for the radius 1.
            </p>
            {chains.map((chain) => (
              <ChainTable key={chain.chain.prime} {...chain} />
            ))}
          </Part>
        )}
        {measures && radius && (
          <Part title="Corners">
            <CornerTable
              parts={parts}
              radius={radius}
              corners={vertices(parts, radius, {
                count: Math.min(CORNERS_SHOWN, Math.floor(parts / 2) + 1),
                digits: CORNER_DIGITS,
              })}
            />
          </Part>
        )}
      </div>
    </SheetFrame>
  );
}
