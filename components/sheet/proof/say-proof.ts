import type { Compartment } from '@/components/drawing/compartments';
import type { NumberResult } from '../say-number';

/** The verdict tool by tool, for where there is room. */
export function reachCompartments(
  reach: Pick<NumberResult['reach'], 'straightedgeAndCompass' | 'withTrisector'>,
): Compartment[] {
  const say = (label: string, reached: boolean | null): Compartment =>
    reached === null
      ? { label, value: 'not decided', tone: 'approximate' }
      : {
          label,
          value: reached ? 'reach it' : 'do not reach it',
          tone: reached ? 'reached' : 'approximate',
        };
  return [
    say('Straightedge and compass', reach.straightedgeAndCompass),
    say('With an angle trisector too', reach.straightedgeAndCompass || reach.withTrisector),
  ];
}

/** What the rounding of a cut size guarantees, in one sentence. */
export function sayGuarantee({
  step,
  rounding,
  direction,
}: NonNullable<NumberResult['cut']>): string {
  if (direction === 'exact') return `The exact value is a whole number of steps of ${step}.`;
  const nearest = rounding === 'half-even' || rounding === 'half-up';
  const side = direction === 'up' ? 'larger' : 'smaller';
  const gap = nearest ? `at most half a step of ${step}` : `less than a step of ${step}`;
  return `Rounded ${direction}: the cut size is ${side} than the exact value, by ${gap}.`;
}
