import { type Problem, type Span } from './failure';
import { LANGUAGE_LIMITS } from './limits';
import type { LineGraph, SourceLine } from './lines';
import type { Outcome } from './evaluate-line';
import type { Result } from './result';
import { typesetStatement } from './typeset';
import { explainUnknown } from './unknown-name';

/**
 * What a line's place among the others makes of it: everything here can be told without any arithmetic, and is told
 * anew for each notebook, so that a message always names places as they are now.
 */

/** What is wrong with a line before any arithmetic: it cannot be read, or its place forbids a value. */
export function findPlaceProblem(graph: LineGraph, index: number): Problem | null {
  const line = graph.lines[index];
  if (line === undefined) return null;
  const { statement } = line;
  if (statement === null || line.problem !== null)
    return (
      line.problem ??
      problem('syntax', 'The line cannot be read.', { from: 0, to: line.source.length })
    );
  if (index >= LANGUAGE_LIMITS.lines)
    return problem(
      'limit-size',
      `The notebook has ${graph.lines.length} lines; only the first ${LANGUAGE_LIMITS.lines} are evaluated.`,
      statement,
    );
  return findDuplicate(graph, index, line) ?? findCycle(graph, index, line);
}

const problem = (code: Problem['code'], message: string, { from, to }: Span): Problem => ({
  code,
  message,
  from,
  to,
});

function findDuplicate(graph: LineGraph, index: number, line: SourceLine): Problem | null {
  if (line.statement?.kind !== 'definition' && line.statement?.kind !== 'function') return null;
  const { mark, markSpan } = line.statement;
  const others = (graph.definitions.get(mark) ?? []).filter((other) => other !== index);
  if (others.length === 0) return null;
  const places = others.map((other) => describePlace(graph, other, line)).join(' and ');
  const message = `\`${mark}\` is defined here and also ${places}; a mark has one definition.`;
  return problem('duplicate-mark', message, markSpan);
}

function findCycle(graph: LineGraph, index: number, line: SourceLine): Problem | null {
  const cycle = graph.cycles.get(index);
  if (cycle === undefined || line.statement === null) return null;
  const within = new Set(cycle);
  const span = line.reads.find(({ name }) =>
    graph.definitions.get(name)?.some((definition) => within.has(definition)),
  );
  const marks = cycle.flatMap((member) => graph.lines[member]?.mark ?? []);
  const message =
    cycle.length === 1
      ? `\`${line.mark ?? ''}\` is defined by itself; a definition reads only others.`
      : `These names are defined by one another in a circle: ${marks.map((mark) => `\`${mark}\``).join(', ')}; one of them must not read the others.`;
  return problem('cycle', message, span ?? line.statement);
}

/** The line whose value a mark stands for: its only definition, unless that has a problem of its own. */
export function findDefinition(
  graph: LineGraph,
  name: string,
  problems: readonly (Problem | null)[],
): number | null {
  const [definition, second] = graph.definitions.get(name) ?? [];
  return definition === undefined || second !== undefined || problems[definition] !== null
    ? null
    : definition;
}

/** The result of a line as it is shown: its outcome with its place. */
export function resultOf(graph: LineGraph, index: number, outcome: Outcome): Result {
  const { line, source, mark } = lineAt(graph, index);
  const common = { line, source, mark };
  if (outcome.kind !== 'missing') return { ...common, ...outcome };
  const { typeset } = outcome;
  return { ...common, kind: 'error', typeset, error: explainMissing(graph, index, outcome) };
}

/** The result of a line that was not evaluated, and why. */
export function refusedResult(graph: LineGraph, index: number, error: Problem): Result {
  const { line, source, mark, statement } = lineAt(graph, index);
  const typeset = statement === null ? null : typesetStatement(statement);
  return { line, source, mark, kind: 'error', typeset, error };
}

function lineAt(graph: LineGraph, index: number): SourceLine {
  const line = graph.lines[index];
  if (line === undefined) throw new RangeError(`There is no line ${index}.`);
  return line;
}

function explainMissing(
  graph: LineGraph,
  index: number,
  { name, use, at }: Extract<Outcome, { kind: 'missing' }>,
): Problem {
  const [definition, second] = graph.definitions.get(name) ?? [];
  if (definition === undefined)
    return explainUnknown(name, at, use, graph.definitions.keys(), graph.lines[index]);
  const message =
    second === undefined
      ? `\`${name}\` has no value, as its definition ${describePlace(graph, definition, graph.lines[index])} has an error.`
      : `\`${name}\` has no value, as it is defined more than once.`;
  return problem('depends-on-error', message, at);
}

function describePlace(graph: LineGraph, index: number, from: SourceLine | undefined): string {
  const line = graph.lines[index];
  if (line === undefined) return 'elsewhere';
  return line.cell === from?.cell
    ? `in line ${line.line} of this cell`
    : `in line ${line.line} of another cell`;
}
