import type { Engine } from '../engine/index';
import { distance } from '../geometry/index';
import { decimalOfSum, inUnit, unitName, writeSum } from './give-value';
import { attemptOrFail } from './attempt';
import type { Evaluator } from './evaluator';
import { fail } from './failure';
import { fromNum } from './pi-sum';
import type { Settings } from './settings';
import type { DecisionStatement, Relation } from './syntax';
import {
  type Magnitude,
  type Single,
  type Value,
  compareValues,
  describe,
  differenceForDecision,
  isRealValue,
  isZeroValue,
  mismatchInDecision,
  number,
  signOf,
} from './values';
import { type FigureValue, areEqualFigures, describeFigure, isFigure } from './values-geometry';
import { withUnit } from './written';

const HOLDS: Readonly<Record<Relation, (order: -1 | 0 | 1) => boolean>> = {
  '==': (order) => order === 0,
  '!=': (order) => order !== 0,
  '<': (order) => order < 0,
  '<=': (order) => order <= 0,
  '>': (order) => order > 0,
  '>=': (order) => order >= 0,
};

const LONGEST_VALUE_IN_A_REASON = 160;

/**
 * Decides a chain of relations exactly: it is true when each holds between its two sides. The reason speaks of the
 * first relation that fails, or of the last one.
 */
export function decide(
  engine: Engine,
  evaluator: Evaluator,
  statement: DecisionStatement,
  settings: Settings,
): { value: boolean; reason: string } {
  const values = attemptOrFail(engine, () => {
    evaluator.open(statement);
    return statement.sides.map((side) => evaluator.value(side));
  });
  let reason = '';
  for (const [index, relation] of statement.relations.entries()) {
    const [left, right] = [values[index], values[index + 1]] as [Value, Value];
    evaluator.at = {
      from: statement.sides[index]?.from ?? 0,
      to: statement.sides[index + 1]?.to ?? 0,
    };
    const holds = attemptOrFail(engine, () => holdsBetween(engine, left, relation, right));
    reason = attemptOrFail(engine, () => explain(engine, left, right, settings));
    if (!holds)
      return {
        value: false,
        reason: statement.relations.length > 1 ? `Relation ${index + 1} fails. ${reason}` : reason,
      };
  }
  return {
    value: true,
    reason:
      statement.relations.length > 1 ? `All ${statement.relations.length} relations hold.` : reason,
  };
}

function holdsBetween(engine: Engine, left: Value, relation: Relation, right: Value): boolean {
  if (left.kind !== 'list' && right.kind !== 'list')
    return holdsBetweenSingles(engine, left, relation, right);
  if (relation === '==' || relation === '!=')
    return (findDifference(engine, left, right) === null) === (relation === '==');
  return fail(
    'domain',
    `Lists have no order, so \`${relation}\` does not hold between them; \`==\` or \`!=\` was expected.`,
  );
}

interface Difference {
  /** Numbers of the items that lead to it. */
  readonly path: readonly number[];
  readonly left: Value;
  readonly right: Value;
}

/** The first place at which two values are not the same; lists are the same when all their items are. */
function findDifference(engine: Engine, left: Value, right: Value): Difference | null {
  if (left.kind !== 'list' && right.kind !== 'list')
    return holdsBetweenSingles(engine, left, '==', right) ? null : { path: [], left, right };
  if (left.kind !== 'list' || right.kind !== 'list')
    return fail(
      'unit-mismatch',
      `The left side is ${describe(left)} and the right side is ${describe(right)}; only values of one kind can be compared.`,
    );
  if (left.items.length !== right.items.length) return { path: [], left, right };
  for (const [index, item] of left.items.entries()) {
    const found = findDifference(engine, item, right.items[index] as Value);
    if (found !== null) return { ...found, path: [index + 1, ...found.path] };
  }
  return null;
}

function holdsBetweenSingles(
  engine: Engine,
  left: Single,
  relation: Relation,
  right: Single,
): boolean {
  if (isFigure(left) && isFigure(right)) {
    const same = areEqualFigures(engine, left, right) ?? mismatchInDecision(left, right);
    if (relation === '==' || relation === '!=') return same === (relation === '==');
    return fail(
      'domain',
      `Only numbers and angles have an order, and here are ${describeFigure(left)} and ${describeFigure(right)}.`,
    );
  }
  if (relation === '==' || relation === '!=') {
    return isZeroValue(engine, differenceForDecision(engine, left, right)) === (relation === '==');
  }
  return HOLDS[relation](compareValues(engine, left, right));
}

function explain(engine: Engine, left: Value, right: Value, settings: Settings): string {
  if (left.kind !== 'list' && right.kind !== 'list')
    return explainSingles(engine, left, right, settings);
  const found = findDifference(engine, left, right);
  if (found === null) return `Both sides are ${describe(left)}, and all items are the same.`;
  const place = found.path.length === 0 ? '' : `In item ${found.path.join(', item ')}: `;
  return found.left.kind === 'list' || found.right.kind === 'list'
    ? `${place}The left side is ${describe(found.left)} and the right side is ${describe(found.right)}.`
    : place + explainSingles(engine, found.left, found.right, settings);
}

/** One sentence on how the sides stand to each other. */
function explainSingles(engine: Engine, left: Single, right: Single, settings: Settings): string {
  if (isFigure(left) && isFigure(right)) return explainFigures(engine, left, right, settings);
  const difference = differenceForDecision(engine, left, right);
  if (isZeroValue(engine, difference)) {
    const { text, approximate } = inWords(engine, left as Magnitude, settings);
    return approximate ? `Both sides are the same value, ${text}.` : `Both sides are ${text}.`;
  }
  if (!isRealValue(engine, difference))
    return `The sides differ by ${about(engine, difference, settings)}.`;
  const [word, gap] =
    signOf(engine, difference) > 0
      ? ['greater', difference]
      : ['less', differenceForDecision(engine, right, left)];
  return `The left side is ${word} by ${about(engine, gap, settings)}.`;
}

/** Whether two figures of one kind are the same, and for points how far they lie apart. */
function explainFigures(
  engine: Engine,
  left: FigureValue,
  right: FigureValue,
  settings: Settings,
): string {
  if (areEqualFigures(engine, left, right) === true) return `Both sides are the same ${left.kind}.`;
  if (left.kind !== 'point' || right.kind !== 'point')
    return `The sides are two different ${left.kind}s.`;
  const gap = number(
    fromNum(engine, distance(engine, left.figure, right.figure)),
    Math.max(left.length, right.length),
  );
  return `The points lie ${about(engine, gap, settings)} apart.`;
}

function inWords(
  engine: Engine,
  value: Magnitude,
  settings: Settings,
): { text: string; approximate: boolean } {
  if (value.kind === 'angle') {
    const degrees = engine.mul(value.turns, engine.integer(360n));
    return { text: `${engine.write(degrees).text} deg`, approximate: false };
  }
  const { text, staged } = writeSum(engine, inUnit(engine, value, settings.unit));
  if (staged || text.length > LONGEST_VALUE_IN_A_REASON)
    return { text: about(engine, value, settings), approximate: true };
  return { text: withUnit(text, unitName(settings.unit, value.length)), approximate: false };
}

const DIGITS_IN_A_REASON = 4;

/** A few digits, with the word `about` unless they are the value itself. */
function about(engine: Engine, value: Magnitude, settings: Settings): string {
  const sum =
    value.kind === 'angle'
      ? fromNum(engine, engine.mul(value.turns, engine.integer(360n)))
      : inUnit(engine, value, settings.unit);
  const { re, im, terminates } = decimalOfSum(engine, sum, DIGITS_IN_A_REASON);
  const word = terminates ? '' : 'about ';
  const unit = value.kind === 'angle' ? 'deg' : unitName(settings.unit, value.length);
  if (im === null) return word + withUnit(re, unit);
  const imaginary = im.startsWith('-') ? `- ${im.slice(1)}` : `+ ${im}`;
  const whole = `${re} ${imaginary} i`;
  return word + (unit === null ? whole : `(${whole}) ${unit}`);
}
