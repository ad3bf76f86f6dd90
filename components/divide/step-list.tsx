import { Tex } from '@/components/ui/tex';
import type { DivisionStep } from '@/lib/divisions';
import { sayDecimal } from './wording';

/** The steps of a division in words, each with its formula and, where it has one, its Carlyle circle. */
export function StepList({ steps }: { steps: readonly DivisionStep[] }) {
  return (
    <ol className="list-decimal space-y-3 pl-6 marker:font-mono marker:text-small">
      {steps.map(({ words, tex, circle }) => (
        <li key={words} className="space-y-1">
          <p className="max-w-prose">{words}</p>
          <div
            role="group"
            aria-label="Formula"
            tabIndex={0}
            className="scroll-hint overflow-x-auto overflow-y-hidden py-1"
          >
            <Tex tex={tex} display />
          </div>
          {circle && (
            <p className="text-small text-soft [overflow-wrap:anywhere]">
              Carlyle circle: centre ({sayDecimal(circle.centre.x)}, {sayDecimal(circle.centre.y)}),
              radius {circle.radius}.
            </p>
          )}
        </li>
      ))}
    </ol>
  );
}
