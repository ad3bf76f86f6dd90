import type { Engine } from '../../engine/index';
import { Failure, type Span, fail } from '../failure';
import { asAlgebraic } from '../pi-sum';
import { readLine } from '../read';
import type { Expression } from '../syntax';
import {
  type Magnitude,
  type Value,
  angle,
  compareValues,
  differenceForDecision,
  isRealValue,
  isZeroValue,
  number,
} from '../values';
import {
  type Dimension,
  FormReader,
  OutsideForms,
  type Surroundings,
  sayDimension,
} from './equation-form';
import { type Proposer, questionOf } from './proposal';
import { rootsOf } from './roots';

/** What is solved: both sides and the name of the unknown, which is a local name in them. */
export interface Equation {
  readonly left: Expression;
  readonly right: Expression;
  readonly unknown: string;
  readonly at: Span;
}

export interface Solutions {
  /** Each verified exactly by substitution; real ones rising, and others only where there is no real one. */
  readonly values: readonly Magnitude[];
  /** Whether these are all; a search can miss some. */
  readonly complete: boolean;
}

/** Kinds that an unknown is tried as, the likely ones first; the first that fits both sides is taken. */
const DIMENSIONS: readonly Dimension[] = [0, 1, 'angle', 2, 3, -1, -2];

/**
 * Solves an equation in one unknown.
 * Where the unknown stands only in sums, products, quotients, powers and square roots, the equation is brought to a
 * polynomial by conjugates, whose roots contain all solutions; linear and quadratic ones have any exact coefficients.
 * Other equations are left to a search that proposes. Whatever a candidate comes from, it counts only when both sides
 * are exactly equal with it. Fails with `domain` when nothing satisfies the equation or everything does, and with
 * `not-exact` when no exact solution was found.
 */
export function solve(
  equation: Equation,
  around: Surroundings,
  propose: Proposer | null,
): Solutions {
  const candidates = candidatesByForms(equation, around);
  if (candidates === null) return search(equation, around, propose);
  const verified = candidates.filter((value) => satisfies(equation, value, around));
  const { engine } = around;
  const real = verified.filter((value) => isRealValue(engine, value));
  const [first] = verified;
  if (first === undefined) {
    return fail(
      'domain',
      `No value of \`${equation.unknown}\` makes both sides equal.`,
      equation.at,
    );
  }
  if (real.length > 0) return { values: inOrder(engine, real), complete: true };
  if (first.kind === 'number' && first.length !== 0) {
    return fail(
      'domain',
      `No real ${sayDimension(first.length).replace(/^an? /, '')} makes both sides equal; the solutions of this equation are complex.`,
      equation.at,
    );
  }
  return { values: verified, complete: true };
}

/** Values among which all solutions are; null when the unknown stands where forms do not reach. */
function candidatesByForms(equation: Equation, around: Surroundings): Magnitude[] | null {
  const { engine } = around;
  let mismatch: Failure | null = null;
  for (const dimension of DIMENSIONS) {
    const reader = new FormReader(around, equation.unknown, dimension);
    try {
      const { form } = reader.subtract(reader.read(equation.left), reader.read(equation.right));
      const norm = reader.forms.norm(form);
      if (norm.length === 0) return failUndetermined(equation);
      return rootsOf(engine, norm).flatMap((root): Magnitude[] => {
        if (dimension !== 'angle') return [number(root, dimension)];
        const turns = asAlgebraic(engine, root);
        return turns !== null && engine.isReal(turns) ? [angle(turns)] : [];
      });
    } catch (error) {
      if (error instanceof OutsideForms) return null;
      if (!(error instanceof Failure) || error.code !== 'unit-mismatch') throw error;
      mismatch ??= error;
    }
  }
  throw mismatch ?? new Error('An unknown has at least one kind.');
}

function failUndetermined({ unknown, at }: Equation): never {
  return fail(
    'domain',
    `Both sides are equal for more values of \`${unknown}\` than can be counted, so the equation does not tell it; another equation was expected.`,
    at,
  );
}

/** Exactly equal sides; a value for which a side does not exist is no solution. */
function satisfies(
  { left, right, unknown }: Equation,
  value: Value,
  around: Surroundings,
): boolean {
  const names = new Map(around.locals).set(unknown, value);
  try {
    const [a, b] = [around.valueIn(names, left), around.valueIn(names, right)];
    if (!isMagnitude(a) || !isMagnitude(b)) return false;
    return isZeroValue(around.engine, differenceForDecision(around.engine, a, b));
  } catch (error) {
    if (error instanceof Failure && OUTSIDE.has(error.code)) return false;
    throw error;
  }
}

const isMagnitude = (value: Value): value is Magnitude =>
  value.kind === 'number' || value.kind === 'angle';

const OUTSIDE: ReadonlySet<string> = new Set([
  'domain',
  'division-by-zero',
  'unit-mismatch',
  'not-exact',
]);

function inOrder(engine: Engine, values: readonly Magnitude[]): Magnitude[] {
  return [...values].sort((a, b) => compareValues(engine, a, b));
}

/** Asks the proposer and keeps what satisfies the equation exactly. */
function search(equation: Equation, around: Surroundings, propose: Proposer | null): Solutions {
  const { engine } = around;
  const { left, right, unknown } = equation;
  let verified: Magnitude[] = [];
  for (const whole of [false, true]) {
    const question = questionOf(left, right, unknown, whole);
    if (question === null || propose === null) {
      return fail(
        'not-exact',
        `\`${unknown}\` stands inside a function that solve cannot undo; sums, products, quotients, powers, square roots and the circular functions were expected.`,
        equation.at,
      );
    }
    const parts = new Map<string, Value>();
    for (const [name, node] of question.parts) parts.set(name, around.valueIn(around.locals, node));
    verified = verifiedAmong(propose(question.equation), parts, equation, around);
    if (verified.length > 0) break;
  }
  if (verified.length === 0) {
    return fail(
      'not-exact',
      `The search for \`${equation.unknown}\` found nothing that makes both sides exactly equal; that does not say that there is no solution.`,
      equation.at,
    );
  }
  const real = verified.every((value) => isRealValue(engine, value));
  return { values: real ? inOrder(engine, verified) : verified, complete: false };
}

/** The different ones among proposed texts that satisfy the equation exactly. */
function verifiedAmong(
  texts: readonly string[],
  parts: ReadonlyMap<string, Value>,
  equation: Equation,
  around: Surroundings,
): Magnitude[] {
  const verified: Magnitude[] = [];
  for (const text of texts) {
    for (const value of readCandidate(text, parts, around)) {
      const isNew = verified.every((other) => !areEqual(around.engine, value, other));
      if (isNew && satisfies(equation, value, around)) {
        verified.push(value);
        break;
      }
    }
  }
  return verified;
}

/** A proposed text as values: as it stands, and a plain number also as an angle in radians. */
function readCandidate(
  text: string,
  parts: ReadonlyMap<string, Value>,
  around: Surroundings,
): Magnitude[] {
  const reading = readLine(text);
  if (reading.kind !== 'statement' || reading.statement.kind !== 'value') return [];
  try {
    const value = around.valueIn(parts, reading.statement.value);
    if (!isMagnitude(value)) return [];
    const inTurns = asTurns(around.engine, value);
    return inTurns === null ? [value] : [inTurns, value];
  } catch (error) {
    if (error instanceof Failure) return [];
    throw error;
  }
}

/** A plain multiple of π as an angle. */
function asTurns(engine: Engine, value: Magnitude): Magnitude | null {
  if (value.kind !== 'number' || value.length !== 0 || value.sum.size !== 1) return null;
  const multiple = value.sum.get(1);
  if (multiple === undefined || !engine.isReal(multiple)) return null;
  return angle(engine.div(multiple, engine.integer(2n)));
}

function areEqual(engine: Engine, a: Magnitude, b: Magnitude): boolean {
  if (a.kind !== b.kind || (a.kind === 'number' && b.kind === 'number' && a.length !== b.length))
    return false;
  return isZeroValue(engine, differenceForDecision(engine, a, b));
}
