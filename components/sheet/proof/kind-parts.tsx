import { Compartments } from '@/components/drawing/compartments';
import { commonReach, singlesOf } from '../lists/list-rows';
import type { ListResult, Result } from '../result';
import { dmsCompartments, inchesCompartments, sayGap } from '../say-parts';
import { compartmentsOf } from '../wording';
import { Part } from './part';
import { reachCompartments } from './say-proof';

/** A length on a rule in inches, an angle on a circle of minutes and seconds; each is rounded, and by how much is said. */
export function RulePart({ result }: { result: Extract<Result, { kind: 'number' | 'angle' }> }) {
  if (result.kind === 'angle') {
    return (
      <Part title="On a divided circle">
        <Compartments items={dmsCompartments(result.dms, true)} />
        {result.dms.direction !== 'exact' && (
          <p className="mt-1.5 text-base">
            To the nearest tenth of a second, so the error is at most a twentieth of one.
          </p>
        )}
      </Part>
    );
  }
  if (result.inches === undefined) return null;
  return (
    <Part title="On a rule in inches">
      <Compartments items={inchesCompartments(result.inches, result.unit)} />
      <p className="mt-1.5 text-base">{sayGap(result.inches)}</p>
    </Part>
  );
}

/** What a function is given and what else it needs. */
export function FunctionPart({ result }: { result: Extract<Result, { kind: 'function' }> }) {
  return (
    <Part title="Function">
      <Compartments items={compartmentsOf(result, true)} />
      <p className="mt-1.5 text-base">It has no value of its own: each call of it is worked out.</p>
    </Part>
  );
}

/** What reaches the items of a list, once where it is the same for all; else its table says so item by item. */
export function ListReachPart({ list }: { list: ListResult }) {
  const reach = commonReach(singlesOf(list));
  return (
    <Part title="Reach">
      {reach !== null && <Compartments items={reachCompartments(reach)} />}
      <p className={`text-base ${reach === null ? '' : 'mt-1.5'}`}>
        {reach === null
          ? 'The items differ: the table says of each what reaches it.'
          : 'It is the same for every item.'}
      </p>
    </Part>
  );
}
