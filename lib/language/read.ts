import type { Tree } from '@lezer/common';
import { explainSyntax } from './explain-syntax';
import { Failure, type Problem, type Span } from './failure';
import { LANGUAGE_LIMITS } from './limits';
import { parser } from './parser/cell.parser';
import { readStatement } from './read-tree';
import type { Statement } from './syntax';

export type Reading =
  | { readonly kind: 'blank' }
  | { readonly kind: 'statement'; readonly statement: Statement }
  | { readonly kind: 'problem'; readonly problem: Problem };

const NESTING_NODES = new Set(['Group', 'Call', 'Root', 'Power', 'Signed', 'List', 'Index']);

/**
 * Reads one line of a cell.
 * Accepts any text without line breaks; offsets in the answer are offsets in it. Never throws: a line that does not
 * parse, is too long or too deeply nested is answered with a problem. Cost: linear in the length.
 */
export function readLine(
  source: string,
  limits: Pick<typeof LANGUAGE_LIMITS, 'lineLength' | 'nesting'> = LANGUAGE_LIMITS,
): Reading {
  if (source.length > limits.lineLength) {
    const message = `The line has ${source.length} characters; the limit is ${limits.lineLength}.`;
    return problem('limit-size', message, { from: limits.lineLength, to: source.length });
  }
  const tree = parser.parse(source);
  const { depth, deepest, error } = measure(tree);
  if (depth > limits.nesting) {
    // The parser gives up on its own stack some way down, so brackets are counted in the text as well.
    const met = Math.max(depth, bracketDepth(source));
    const message = `Brackets, roots, powers and signs are nested ${met} deep; the limit is ${limits.nesting}.`;
    return problem('limit-size', message, deepest);
  }
  if (error !== null) return { kind: 'problem', problem: explainSyntax(source, error) };
  try {
    const statement = readStatement(source, tree);
    return statement === null ? { kind: 'blank' } : { kind: 'statement', statement };
  } catch (failure) {
    if (!(failure instanceof Failure) || failure.span === null) throw failure;
    return problem(failure.code, failure.message, failure.span);
  }
}

function problem(code: Problem['code'], message: string, span: Span): Reading {
  return { kind: 'problem', problem: { code, message, from: span.from, to: span.to } };
}

/** One pass with a cursor, which needs no stack, so that a hostile line cannot exhaust ours. */
function measure(tree: Tree): { depth: number; deepest: Span; error: Span | null } {
  let depth = 0;
  let greatest = 0;
  let deepest: Span = { from: 0, to: 0 };
  let error: Span | null = null;
  tree.iterate({
    enter: (node) => {
      if (node.type.isError && error === null) error = { from: node.from, to: node.to };
      if (!NESTING_NODES.has(node.name)) return;
      depth += 1;
      if (depth > greatest) {
        greatest = depth;
        deepest = { from: node.from, to: node.to };
      }
    },
    leave: (node) => {
      if (NESTING_NODES.has(node.name)) depth -= 1;
    },
  });
  return { depth: greatest, deepest, error };
}

function bracketDepth(source: string): number {
  let depth = 0;
  let greatest = 0;
  for (const character of source) {
    if ('(['.includes(character)) greatest = Math.max(greatest, (depth += 1));
    else if (')]'.includes(character)) depth -= 1;
  }
  return greatest;
}
