import type { SyntaxNode, Tree } from '@lezer/common';
import { explainSyntax } from './explain-syntax';
import type { Problem, Span } from './failure';
import { LANGUAGE_LIMITS } from './limits';
import { parser } from './parser/cell.parser';
import { describeWord, suggestMark } from './words';
import type {
  CallNode,
  Expression,
  NumberNode,
  PowerNode,
  ProductNode,
  QuantityNode,
  Relation,
  Statement,
  UnitNode,
} from './syntax';

export type Reading =
  | { readonly kind: 'blank' }
  | { readonly kind: 'statement'; readonly statement: Statement }
  | { readonly kind: 'problem'; readonly problem: Problem };

const NESTING_NODES = new Set(['Group', 'Call', 'Root', 'Power', 'Signed']);
const RELATIONS: Readonly<Record<string, Relation>> = { '≤': '<=', '≥': '>=', '≠': '!=' };

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
  const line = firstStatement(tree);
  return line === null ? { kind: 'blank' } : new TreeReader(source).statement(line);
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
    if (character === '(') greatest = Math.max(greatest, (depth += 1));
    else if (character === ')') depth -= 1;
  }
  return greatest;
}

function firstStatement(tree: Tree): SyntaxNode | null {
  return childrenOf(tree.topNode)[0] ?? null;
}

/** Children that carry meaning; a remark may stand between any two tokens at the end of a line. */
function childrenOf(node: SyntaxNode): SyntaxNode[] {
  const children: SyntaxNode[] = [];
  for (let child = node.firstChild; child !== null; child = child.nextSibling) {
    if (child.name !== 'Remark') children.push(child);
  }
  return children;
}

/** Turns a parse without errors into a syntax tree. Recursion is bounded by the nesting limit. */
class TreeReader {
  constructor(private readonly source: string) {}

  statement(node: SyntaxNode): Reading {
    const span = { from: node.from, to: node.to };
    if (node.name === 'Definition') {
      const [target, , value] = this.exactly(node, 3);
      const mark = this.text(target);
      if (target.firstChild !== null) {
        return { kind: 'problem', problem: keptWord(mark, target) };
      }
      const markSpan = { from: target.from, to: target.to };
      return {
        kind: 'statement',
        statement: { kind: 'definition', mark, markSpan, value: this.expression(value), ...span },
      };
    }
    if (node.name === 'Decision') {
      const children = childrenOf(node);
      const relations = children
        .filter((child) => child.name === 'Relation')
        .map((child) => this.relation(child));
      const sides = children
        .filter((child) => child.name !== 'Relation')
        .map((child) => this.expression(child));
      return { kind: 'statement', statement: { kind: 'decision', sides, relations, ...span } };
    }
    return {
      kind: 'statement',
      statement: { kind: 'value', value: this.expression(node), ...span },
    };
  }

  private relation(node: SyntaxNode): Relation {
    const text = this.text(node);
    return RELATIONS[text] ?? (text as Relation);
  }

  private expression(node: SyntaxNode): Expression {
    const span = { from: node.from, to: node.to };
    switch (node.name) {
      case 'Number':
        return this.number(node);
      case 'Mark':
        return { kind: 'mark', name: this.text(node), ...span };
      case 'Constant':
        return { kind: 'constant', name: this.text(node) === 'i' ? 'i' : 'pi', ...span };
      case 'Unit':
        return this.unit(node);
      case 'Quantity': {
        const [number, unit] = this.exactly(node, 2);
        return {
          kind: 'quantity',
          numerator: this.number(number),
          denominator: null,
          unit: this.unitOrPower(unit),
          ...span,
        };
      }
      case 'Sum':
        return this.sum(node);
      case 'Product':
        return this.product(node);
      case 'Signed': {
        const [sign, value] = this.exactly(node, 2);
        const inner = this.expression(value);
        return this.text(sign) === '+' ? inner : { kind: 'negative', value: inner, ...span };
      }
      case 'Power':
        return this.power(node);
      case 'Call':
        return this.call(node);
      case 'Group': {
        const [, value] = this.exactly(node, 3);
        return { kind: 'group', value: this.expression(value), ...span };
      }
      case 'Root': {
        const [, value] = this.exactly(node, 2);
        return { kind: 'root', value: this.expression(value), ...span };
      }
      default:
        throw new Error(`The grammar has a node "${node.name}" that the reader does not know.`);
    }
  }

  private number(node: SyntaxNode): NumberNode {
    return { kind: 'number', text: this.text(node), from: node.from, to: node.to };
  }

  private unit(node: SyntaxNode): UnitNode {
    const text = this.text(node);
    return {
      kind: 'unit',
      name: text === '°' ? 'deg' : text,
      degreeSign: text === '°',
      from: node.from,
      to: node.to,
    };
  }

  private unitOrPower(node: SyntaxNode): UnitNode | PowerNode {
    return node.name === 'Unit' ? this.unit(node) : this.power(node);
  }

  private sum(node: SyntaxNode): Expression {
    const terms: { sign: '+' | '-'; value: Expression; operator: Span }[] = [];
    let sign: '+' | '-' = '+';
    let operator: Span = { from: node.from, to: node.from };
    for (const child of childrenOf(node)) {
      if (child.name === 'AddOp') {
        sign = this.text(child) === '+' ? '+' : '-';
        operator = { from: child.from, to: child.to };
      } else {
        terms.push({ sign, value: this.expression(child), operator });
      }
    }
    return { kind: 'sum', terms, from: node.from, to: node.to };
  }

  private product(node: SyntaxNode): Expression {
    const factors: ProductNode['factors'][number][] = [];
    let operator: '*' | '/' | 'implied' = '*';
    let at: Span = { from: node.from, to: node.from };
    for (const child of childrenOf(node)) {
      if (child.name === 'MulOp') {
        operator = '/÷'.includes(this.text(child)) ? '/' : '*';
        at = { from: child.from, to: child.to };
      } else {
        factors.push({ operator, value: this.expression(child), at });
        operator = 'implied';
        at = { from: child.to, to: child.to };
      }
    }
    const joined = joinFractions(factors);
    const [only] = joined;
    if (joined.length === 1 && only !== undefined) return only.value;
    return { kind: 'product', factors: joined, from: node.from, to: node.to };
  }

  private power(node: SyntaxNode): PowerNode {
    const children = childrenOf(node);
    const [base, raised] = children;
    const exponent = children[2];
    if (base === undefined || raised === undefined)
      throw new Error('A power has a base and an exponent.');
    const span = { from: node.from, to: node.to };
    if (exponent === undefined) {
      const text = this.text(raised) === '²' ? '2' : '3';
      const two: NumberNode = { kind: 'number', text, from: raised.from, to: raised.to };
      return {
        kind: 'power',
        base: this.expression(base),
        exponent: two,
        superscript: true,
        ...span,
      };
    }
    return {
      kind: 'power',
      base: this.expression(base),
      exponent: this.expression(exponent),
      superscript: false,
      ...span,
    };
  }

  private call(node: SyntaxNode): CallNode {
    const [name, list] = this.exactly(node, 2);
    const args = childrenOf(list).filter(
      (child) => !['OpenBracket', 'CloseBracket', 'Comma'].includes(child.name),
    );
    return {
      kind: 'call',
      name: this.text(name),
      args: args.map((arg) => this.expression(arg)),
      from: node.from,
      to: node.to,
    };
  }

  private exactly(node: SyntaxNode, count: 2): [SyntaxNode, SyntaxNode];
  private exactly(node: SyntaxNode, count: 3): [SyntaxNode, SyntaxNode, SyntaxNode];
  private exactly(node: SyntaxNode, count: number): SyntaxNode[] {
    const children = childrenOf(node);
    if (children.length !== count)
      throw new Error(`A ${node.name} has ${count} parts, not ${children.length}.`);
    return children;
  }

  private text(node: SyntaxNode): string {
    return this.source.slice(node.from, node.to);
  }
}

/**
 * `3/4 in` is three quarters of an inch, as on every rule, although `R / 4 in` divides by four inches: a whole number
 * over a whole number with a unit is one quantity, unless the first is itself a divisor.
 */
function joinFractions(
  factors: readonly ProductNode['factors'][number][],
): ProductNode['factors'][number][] {
  const joined: ProductNode['factors'][number][] = [];
  for (const factor of factors) {
    const before = joined.at(-1);
    if (
      factor.operator === '/' &&
      before !== undefined &&
      before.operator !== '/' &&
      isWhole(before.value) &&
      factor.value.kind === 'quantity' &&
      factor.value.denominator === null &&
      isWhole(factor.value.numerator)
    ) {
      const value: QuantityNode = {
        ...factor.value,
        numerator: before.value,
        denominator: factor.value.numerator,
        from: before.value.from,
      };
      joined[joined.length - 1] = { ...before, value };
    } else {
      joined.push(factor);
    }
  }
  return joined;
}

function isWhole(node: Expression): node is NumberNode {
  return node.kind === 'number' && !node.text.includes('.');
}

function keptWord(word: string, span: Span): Problem {
  const reason = describeWord(word);
  const message = `\`${word}\` is ${reason} and cannot be a mark; try \`${suggestMark(word)}\`.`;
  return { code: 'syntax', message, from: span.from, to: span.to };
}
