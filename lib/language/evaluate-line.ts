import { type Limits, createEngine } from '../engine/index';
import type { Engine } from '../engine/index';
import { attemptOrFail } from './attempt';
import { decide } from './decide';
import { Evaluator } from './evaluator';
import { type ErrorCode, Failure, type Problem, type Span } from './failure';
import { giveStandIn } from './functions/stand-in';
import { giveFunction } from './give-function';
import { type GivenSettings, giveValue } from './give-value';
import { noticesOf } from './notices';
import { type PackedValue, packValue, unpackValue } from './packed-value';
import { attachOnce, readLineOnce } from './read-once';
import type { ErrorResult, Notice, Result } from './result';
import type { Proposer } from './solve/proposal';
import {
  type DefinitionStatement,
  type FunctionStatement,
  type Statement,
  type ValueStatement,
  marksReadBy,
} from './syntax';
import { typesetStatement } from './typeset';
import type { LineValue, Value } from './values';

/** Why a line, or a part of it, is not to be evaluated. */
export interface Refusal {
  readonly code: ErrorCode;
  readonly message: string;
}

type Placeless<T> = T extends unknown ? Omit<T, 'line' | 'source' | 'mark'> : never;

/**
 * What becomes of a line, told without its place: a result, an error of its own, or the first mark that it reads and
 * that has no value. It depends on the text of the line, on its settings and on the values that it reads alone.
 */
export type Outcome =
  | Placeless<Exclude<Result, ErrorResult>>
  | { readonly kind: 'error'; readonly typeset: string | null; readonly error: Problem }
  | {
      readonly kind: 'missing';
      readonly typeset: string;
      readonly name: string;
      readonly use: 'mark' | 'function';
      readonly at: Span;
    };

/** The values of the marks that a line reads; null for a mark that has none. */
export type FindValue = (name: string) => PackedValue | null;

export interface LineOptions {
  readonly engineLimits?: Partial<Limits>;
  /** Called when the line has its value and only degree, polynomial and tower are still to come. */
  readonly valued?: () => void;
  /** Why degree, polynomial and tower are to be left out, when they are. */
  readonly brief?: Refusal | null;
  /** Asked for what an equation that is not solved exactly might have as solutions. */
  readonly propose?: Proposer | null;
}

export interface EvaluatedLine {
  readonly outcome: Outcome;
  /** What others read; null for an error and for a line without a value. */
  readonly value: PackedValue | null;
}

/** Met a mark without a value. Why it has none is a matter of places, which this line knows nothing of. */
class MissingValue extends Failure {
  constructor(
    readonly mark: string,
    readonly use: 'mark' | 'function',
    at: Span,
  ) {
    super('depends-on-error', `\`${mark}\` has no value.`, at);
  }
}

/**
 * Evaluates one line in an engine of its own, so that nothing evaluated before can change a word of the answer.
 * Accepts any statement; whatever is wrong with it is its outcome. Cost: bounded by the engine's limits.
 */
export function evaluateLine(
  statement: Statement,
  source: string,
  settings: GivenSettings,
  find: FindValue,
  options: LineOptions = {},
): EvaluatedLine {
  const line = new LineEvaluation(find, options);
  const typeset = typesetStatement(statement);
  try {
    const given = line.give(statement, settings);
    return {
      outcome: {
        typeset,
        notices: [...noticesOf(statement, source), ...line.notices],
        ...given,
      },
      value: line.packed,
    };
  } catch (failure) {
    return { outcome: outcomeOf(failure, line, typeset), value: line.packed };
  }
}

/** The value of a line without its writing; null where it has none. */
function valueOfLine(
  statement: Statement,
  find: FindValue,
  options: LineOptions = {},
): PackedValue | null {
  const line = new LineEvaluation(find, options);
  try {
    if (statement.kind === 'function') line.giveFunction(statement);
    if (statement.kind === 'definition') line.evaluate(statement);
  } catch (failure) {
    if (!(failure instanceof Failure)) throw failure;
  }
  return line.packed;
}

function outcomeOf(failure: unknown, line: LineEvaluation, typeset: string): Outcome {
  if (!(failure instanceof Failure)) throw failure;
  const error = line.problemOf(failure);
  if (!(failure instanceof MissingValue)) return { kind: 'error', typeset, error };
  const { mark: name, use } = failure;
  return { kind: 'missing', typeset, name, use, at: { from: error.from, to: error.to } };
}

class LineEvaluation {
  packed: PackedValue | null = null;
  private readonly engine: Engine;
  private readonly evaluator: Evaluator;
  private readonly known = new Map<string, LineValue>();

  constructor(
    private readonly find: FindValue,
    private readonly options: LineOptions,
  ) {
    this.engine = createEngine(options.engineLimits);
    this.evaluator = new Evaluator(
      this.engine,
      (name, at, use) => this.valueOf(name, at, use),
      options.propose ?? null,
    );
  }

  /** What a reader must know of values that came up. */
  get notices(): readonly Notice[] {
    return this.evaluator.notices;
  }

  problemOf(failure: Failure): Problem {
    return this.evaluator.problemOf(failure);
  }

  private valueOf(name: string, at: Span, use: 'mark' | 'function'): LineValue {
    let value = this.known.get(name);
    if (value === undefined) {
      const packed = this.find(name);
      if (packed === null) throw new MissingValue(name, use, at);
      value = unpackValue(this.engine, packed);
      this.known.set(name, value);
    }
    return value;
  }

  /** The value, packed as soon as it is there: what fails in the writing of it does not take it from its readers. */
  evaluate(statement: DefinitionStatement | ValueStatement): Value {
    const value = attemptOrFail(this.engine, () => this.evaluator.lineValue(statement));
    this.evaluator.at = statement.value;
    if (statement.kind === 'definition')
      this.packed = attemptOrFail(this.engine, () => packValue(this.engine, value));
    return value;
  }

  giveFunction(definition: FunctionStatement) {
    const { engine, evaluator } = this;
    const given = attemptOrFail(engine, () =>
      giveFunction(evaluator, definition, marksReadBy(definition)),
    );
    this.packed = packValue(engine, { kind: 'function', definition });
    return given;
  }

  give(statement: Statement, settings: GivenSettings) {
    const { engine, evaluator } = this;
    evaluator.open({ ...statement, where: [] });
    if (statement.kind === 'function') return this.giveFunction(statement);
    if (statement.kind === 'decision') {
      return {
        kind: 'truth' as const,
        truth: decide(engine, evaluator, statement, settings),
      };
    }
    const value = this.evaluate(statement);
    const given = giveValue(engine, value, settings, {
      started: () => this.options.valued?.(),
      refused: this.options.brief ?? null,
    });
    if (value.kind === 'list') return given;
    return { ...given, ...attemptOrFail(engine, () => giveStandIn(engine, value, settings)) };
  }
}

/**
 * As `evaluateLine` for a line that is known to parse, given as text and with the names that are functions of the notebook;
 * without settings only its value is worked out.
 */
export function evaluateSource(
  source: string,
  functions: ReadonlySet<string>,
  settings: GivenSettings | null,
  find: FindValue,
  options: LineOptions = {},
): { readonly outcome: Outcome | null; readonly value: PackedValue | null } {
  const reading = readLineOnce(source);
  if (reading.kind !== 'statement') throw new TypeError('A line that does not parse was given.');
  const { statement } = attachOnce(reading.statement, functions);
  return settings === null
    ? { outcome: null, value: valueOfLine(statement, find, options) }
    : evaluateLine(statement, source, settings, find, options);
}
