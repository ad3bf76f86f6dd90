import { createEngine } from '../engine/index';
import type { Engine, Limits } from '../engine/index';
import { attemptOrFail } from './attempt';
import { decide } from './decide';
import { Evaluator } from './evaluator';
import { giveStandIn } from './functions/stand-in';
import { type ErrorCode, Failure, type Problem, type Span, fail } from './failure';
import { giveFunction } from './give-function';
import { type GivenSettings, giveValue } from './give-value';
import { LANGUAGE_LIMITS } from './limits';
import { type CellSource, type LineGraph, type SourceLine, readCells } from './lines';
import { noticesOf } from './notices';
import type { Result } from './result';
import { type Settings, completeSettings } from './settings';
import type { Proposer } from './solve/proposal';
import type { Statement } from './syntax';
import { typesetStatement } from './typeset';
import type { LineValue } from './values';
import { failUnknown } from './unknown-name';

/** A line by the position of its cell and its 1-based number there. */
export interface LinePlace {
  readonly cell: number;
  readonly line: number;
}

/** How an evaluation is watched, and what is known from an earlier run that was stopped. */
export interface EvaluationOptions {
  readonly engineLimits?: Partial<Limits>;
  /** Called before the arithmetic of a line starts. */
  readonly started?: (place: LinePlace) => void;
  /** Called when a line has its value and only degree, polynomial and tower are still to come. */
  readonly valued?: (place: LinePlace) => void;
  /** Called with each result as soon as it is there; not for those in `known`. */
  readonly finished?: (place: LinePlace, result: Result) => void;
  /** Asked for what an equation that is not solved exactly might have as solutions. */
  readonly propose?: Proposer;
  /** Results of an earlier run, by `keyOf` their place: the line is evaluated again only if another line reads it. */
  readonly known?: ReadonlyMap<string, Result>;
  /** Lines whose degree, polynomial and tower are to be left out, with the reason, by `keyOf` their place. */
  readonly brief?: ReadonlyMap<string, { readonly code: ErrorCode; readonly message: string }>;
  /** Lines that are not to be evaluated because they went over a limit, by `keyOf` their place. */
  readonly refused?: ReadonlyMap<string, { readonly code: ErrorCode; readonly message: string }>;
}

export const keyOf = (place: LinePlace): string => `${place.cell}:${place.line}`;

export interface CellResults {
  id: string;
  results: Result[];
}

/**
 * Evaluates cells that share marks: one result for each line that is not blank or a remark, in order of the page.
 * Accepts any text as source; everything that can be wrong with it is a result of kind `error`, and the other lines
 * still answer. A cell with settings of its own is given in them. Throws a RangeError for settings that do not make sense. One engine serves the call, so equal values
 * are written alike. Cost: reading is linear; arithmetic is bounded line by line by the engine's limits.
 */
export function evaluateCells(
  cells: readonly CellSource[],
  settings: Partial<Settings> = {},
  options: EvaluationOptions = {},
): CellResults[] {
  const evaluation = new Evaluation(readCells(cells), settingsOf(cells, settings), options);
  const results = evaluation.run();
  return cells.map((cell, index) => ({ id: cell.id, results: results[index] ?? [] }));
}

/** Evaluates one line on its own. A text of several lines, and a blank one, is answered with `syntax`. */
export function evaluateExpression(
  source: string,
  settings: Partial<Settings> = {},
  options: EvaluationOptions = {},
): Result {
  const problem = (message: string, span: Span): Result => ({
    line: 1,
    source,
    mark: null,
    kind: 'error',
    typeset: null,
    error: { code: 'syntax', message, ...span },
  });
  const firstBreak = source.search(/[\r\n]/);
  if (firstBreak !== -1 && source.slice(firstBreak).trim() !== '') {
    return problem(
      'An expression is a single line, and this text has several; give several lines as cells.',
      { from: firstBreak, to: source.length },
    );
  }
  const line = firstBreak === -1 ? source : source.slice(0, firstBreak);
  const [cell] = evaluateCells([{ id: 'expression', source: line }], settings, options);
  return (
    cell?.results[0] ??
    problem('An expression was expected, and there is none.', { from: 0, to: line.length })
  );
}

/** The settings of each cell: its own before those of the whole. */
function settingsOf(cells: readonly CellSource[], whole: Partial<Settings>): GivenSettings[] {
  const common = completeSettings(whole);
  return cells.map((cell) =>
    cell.settings === undefined ? common : completeSettings({ ...whole, ...cell.settings }),
  );
}

class Evaluation {
  private readonly engine: Engine;
  private readonly evaluator: Evaluator;
  private readonly values = new Map<number, LineValue>();
  private readonly results: (Result | undefined)[] = [];
  /** Lines whose value another line reads that has no result yet. */
  private readonly wanted = new Set<number>();

  constructor(
    private readonly graph: LineGraph,
    /** Of each cell, by its position. */
    private readonly settings: readonly GivenSettings[],
    private readonly options: EvaluationOptions,
  ) {
    this.engine = createEngine(options.engineLimits);
    this.evaluator = new Evaluator(
      this.engine,
      (name, at, use) => this.findMark(name, at, use),
      options.propose ?? null,
    );
  }

  run(): Result[][] {
    this.markWanted();
    for (const index of this.graph.order) this.results[index] = this.resultOf(index);
    const byCell: Result[][] = [];
    this.graph.lines.forEach((line, index) => {
      const result = this.results[index];
      if (result !== undefined) (byCell[line.cell] ??= []).push(result);
    });
    return byCell;
  }

  /** From the last line in the order to the first, so that wants reach what lies further down. */
  private markWanted(): void {
    const { lines, order, definitions } = this.graph;
    for (const index of [...order].reverse()) {
      const line = lines[index];
      if (
        line === undefined ||
        (this.options.known?.has(keyOf(line)) === true && !this.wanted.has(index))
      )
        continue;
      for (const { name } of line.reads)
        for (const definition of definitions.get(name) ?? []) this.wanted.add(definition);
    }
  }

  private resultOf(index: number): Result | undefined {
    const line = this.graph.lines[index];
    if (line === undefined) return undefined;
    const known = this.options.known?.get(keyOf(line));
    if (known !== undefined) {
      if (this.wanted.has(index) && known.kind !== 'error') this.evaluateAgain(index, line);
      return known;
    }
    this.options.started?.(line);
    const result = this.evaluate(index, line);
    this.options.finished?.(line, result);
    return result;
  }

  /** Only for the value; it came out before, so a failure now is a fault that readers of the mark must see. */
  private evaluateAgain(index: number, line: SourceLine): void {
    const { statement } = line;
    if (statement?.kind === 'function')
      this.values.set(index, { kind: 'function', definition: statement });
    if (statement?.kind !== 'definition') return;
    this.options.started?.(line);
    this.values.set(
      index,
      attemptOrFail(this.engine, () => this.evaluator.lineValue(statement)),
    );
  }

  private evaluate(index: number, line: SourceLine): Result {
    const common = { line: line.line, source: line.source, mark: line.mark };
    const { statement } = line;
    const typeset = statement === null ? null : typesetStatement(statement);
    const error = (problem: Problem): Result => ({
      ...common,
      kind: 'error',
      typeset,
      error: problem,
    });
    if (statement === null || line.problem !== null) {
      return error(
        line.problem ?? {
          code: 'syntax',
          message: 'The line cannot be read.',
          from: 0,
          to: line.source.length,
        },
      );
    }
    this.evaluator.open({ ...statement, where: [] });
    try {
      this.refuseByPlace(index, line, statement);
      const given = this.giveStatement(index, line, statement);
      return {
        ...common,
        typeset: typeset ?? '',
        notices: [...noticesOf(statement, line.source), ...this.evaluator.notices],
        ...given,
      };
    } catch (failure) {
      if (!(failure instanceof Failure)) throw failure;
      this.values.delete(index);
      return error(this.evaluator.problemOf(failure));
    }
  }

  private giveStatement(index: number, line: SourceLine, statement: Statement) {
    const settings = this.settings[line.cell] ?? completeSettings();
    if (statement.kind === 'decision') {
      return {
        kind: 'truth' as const,
        truth: decide(this.engine, this.evaluator, statement, settings),
      };
    }
    if (statement.kind === 'function') {
      const given = giveFunction(this.evaluator, statement, line.reads);
      this.values.set(index, { kind: 'function', definition: statement });
      return given;
    }
    const value = attemptOrFail(this.engine, () => this.evaluator.lineValue(statement));
    this.evaluator.at = statement.value;
    const given = giveValue(this.engine, value, settings, {
      started: () => this.options.valued?.(line),
      refused: this.options.brief?.get(keyOf(line)) ?? null,
    });
    const standIn =
      value.kind === 'list'
        ? {}
        : attemptOrFail(this.engine, () => giveStandIn(this.engine, value, settings));
    this.values.set(index, value);
    return { ...given, ...standIn };
  }

  /** What is wrong with a line because of where it stands among the others. */
  private refuseByPlace(index: number, line: SourceLine, statement: Statement): void {
    const refused = this.options.refused?.get(keyOf(line));
    if (refused !== undefined) fail(refused.code, refused.message, statement);
    if (index >= LANGUAGE_LIMITS.lines) {
      fail(
        'limit-size',
        `The notebook has ${this.graph.lines.length} lines; only the first ${LANGUAGE_LIMITS.lines} are evaluated.`,
        statement,
      );
    }
    if (statement.kind === 'definition' || statement.kind === 'function') {
      const others = (this.graph.definitions.get(statement.mark) ?? []).filter(
        (other) => other !== index,
      );
      if (others.length > 0) {
        const places = others.map((other) => this.describePlace(other, line)).join(' and ');
        fail(
          'duplicate-mark',
          `\`${statement.mark}\` is defined here and also ${places}; a mark has one definition.`,
          statement.markSpan,
        );
      }
    }
    const cycle = this.graph.cycles.get(index);
    if (cycle !== undefined) {
      const within = new Set(cycle);
      const span = line.reads.find(({ name }) =>
        this.graph.definitions.get(name)?.some((definition) => within.has(definition)),
      );
      const marks = cycle
        .map((member) => this.graph.lines[member]?.mark)
        .filter((mark) => mark !== null && mark !== undefined);
      const message =
        cycle.length === 1
          ? `\`${line.mark ?? ''}\` is defined by itself; a definition reads only others.`
          : `These names are defined by one another in a circle: ${marks.map((mark) => `\`${mark}\``).join(', ')}; one of them must not read the others.`;
      fail('cycle', message, span ?? statement);
    }
  }

  private findMark(name: string, at: Span, use: 'mark' | 'function'): LineValue {
    const [definition, second] = this.graph.definitions.get(name) ?? [];
    const reader = this.graph.lines.find((line) =>
      line.reads.includes(at as (typeof line.reads)[number]),
    );
    if (definition === undefined)
      return failUnknown(name, at, use, this.graph.definitions.keys(), reader);
    const value = this.values.get(definition);
    if (second === undefined && value !== undefined) return value;
    const place = second === undefined ? this.describePlace(definition, reader) : 'more than once';
    const message =
      second === undefined
        ? `\`${name}\` has no value, as its definition ${place} has an error.`
        : `\`${name}\` has no value, as it is defined ${place}.`;
    return fail('depends-on-error', message, at);
  }

  private describePlace(index: number, from: SourceLine | undefined): string {
    const line = this.graph.lines[index];
    if (line === undefined) return 'elsewhere';
    return line.cell === from?.cell
      ? `in line ${line.line} of this cell`
      : `in line ${line.line} of another cell`;
  }
}
