import type { Engine } from '../../engine/index';
import { fail } from '../failure';
import { list } from '../lists';
import type { Surroundings } from '../solve/equation-form';
import type { Proposer } from '../solve/proposal';
import { solve } from '../solve/solve';
import type { CallNode } from '../syntax';
import {
  type Magnitude,
  type Single,
  type Value,
  compareValues,
  describe,
  differenceForDecision,
  isRealValue,
  negate,
  needMagnitude,
} from '../values';

export interface Solved {
  readonly value: Value;
  /** What a reader of the value must know, in a sentence; mostly nothing. */
  readonly notice: string | null;
}

/**
 * `solve(equation, unknown)`: the value of the unknown, or the list of its values when there are several; with a third
 * argument the one nearest to it. The unknown is a local name in the equation.
 */
export function solveCall(node: CallNode, around: Surroundings, propose: Proposer | null): Solved {
  const [equation, unknown, place] = node.args;
  if (equation?.kind !== 'equation') {
    return fail(
      'syntax',
      'solve takes an equation first, with `==` between its sides, as in `solve(x^2 == 2, x)`.',
      equation ?? node,
    );
  }
  if (unknown?.kind !== 'mark') {
    return fail(
      'syntax',
      'The second argument of solve is the name of the unknown, as in `solve(x^2 == 2, x)`.',
      unknown ?? node,
    );
  }
  const asked = { left: equation.left, right: equation.right, unknown: unknown.name, at: node };
  const { values, complete } = solve(asked, around, propose);
  const notice = complete
    ? null
    : `A search proposed this solution for \`${unknown.name}\`, and both sides are exactly equal with it; there may be others.`;
  const [first] = values as readonly [Magnitude, ...Magnitude[]];
  if (place !== undefined) {
    const near = needMagnitude(
      around.valueIn(around.locals, place),
      'The place near the solution is a number or an angle',
    );
    return { value: nearest(around.engine, values, near), notice };
  }
  return { value: values.length === 1 ? first : list(values), notice };
}

function nearest(engine: Engine, values: readonly Magnitude[], near: Magnitude): Magnitude {
  const gap = (value: Magnitude): Single => {
    if (!isRealValue(engine, value) || !isRealValue(engine, near))
      fail('domain', 'The nearest solution is told only among real ones, for a real place.');
    if (describe(value) !== describe(near)) {
      fail(
        'unit-mismatch',
        `The solutions are each ${describe(value)} and the place is ${describe(near)}; a place of their kind was expected.`,
      );
    }
    const difference = differenceForDecision(engine, value, near);
    const zero = differenceForDecision(engine, near, near);
    return compareValues(engine, difference, zero) < 0 ? negate(engine, difference) : difference;
  };
  let [best] = values as readonly [Magnitude, ...Magnitude[]];
  let tie = false;
  for (const value of values.slice(1)) {
    const order = compareValues(engine, gap(value), gap(best));
    if (order < 0) best = value;
    tie = order === 0 || (tie && order > 0);
  }
  if (tie)
    fail('domain', 'Two solutions lie equally near; a place nearer to one of them was expected.');
  gap(best);
  return best;
}
