import type { SyntaxNode, Tree } from '@lezer/common';
import { attachCalls } from './attach-calls';
import { type Span, fail } from './failure';
import { classOfWord, findFunction } from './names';
import { readCompound, readQuantity } from './read-quantity';
import type {
  DefinitionStatement,
  Expression,
  Factor,
  GroupNode,
  Local,
  NumberNode,
  Parameter,
  PowerNode,
  QuantityNode,
  Relation,
  Statement,
  UnitNode,
} from './syntax';
import { partsOf, sidesOf } from './syntax';
import { describeWord, suggestMark } from './words';

const RELATIONS: Readonly<Record<string, Relation>> = { '≤': '<=', '≥': '>=', '≠': '!=' };
const UNIT_SIGNS: Readonly<Record<string, string>> = {
  '°': 'deg',
  "'": 'min',
  '′': 'min',
  '’': 'min',
  '"': 'sec',
  '″': 'sec',
  '”': 'sec',
};

/**
 * The syntax tree of a line that parses without errors; null for a blank one. What the grammar lets through and the
 * language does not is thrown as a `Failure` with its place. Recursion is bounded by the nesting limit, which the caller
 * has checked.
 */
export function readStatement(source: string, tree: Tree): Statement | null {
  const [first, where] = childrenOf(tree.topNode);
  if (first === undefined) return null;
  const statement = new TreeReader(source).statement(first, where);
  const attached = attachCalls(statement, (_, several) => several);
  sidesOf(attached).forEach((side) => refuseLooseCommas(side, source));
  return attached;
}

/** Children that carry meaning; a remark may stand between any two tokens at the end of a line. */
function childrenOf(node: SyntaxNode): SyntaxNode[] {
  const children: SyntaxNode[] = [];
  for (let child = node.firstChild; child !== null; child = child.nextSibling) {
    if (child.name !== 'Remark') children.push(child);
  }
  return children;
}

const SEPARATORS = new Set(['OpenBracket', 'CloseBracket', 'OpenSquare', 'CloseSquare', 'Comma']);

function contentOf(node: SyntaxNode): SyntaxNode[] {
  return childrenOf(node).filter((child) => !SEPARATORS.has(child.name));
}

const spanOf = ({ from, to }: Span): Span => ({ from, to });

class TreeReader {
  constructor(private readonly source: string) {}

  statement(node: SyntaxNode, whereNode: SyntaxNode | undefined): Statement {
    const span = { from: node.from, to: whereNode?.to ?? node.to };
    const where = whereNode === undefined ? [] : this.locals(whereNode);
    switch (node.name) {
      case 'Definition':
        return { ...this.definition(node), where, ...span };
      case 'FunctionDefinition': {
        const [head, , value] = this.exactly(node, 3);
        const [target, ...names] = contentOf(head);
        if (target === undefined) throw new Error('The head of a function begins with its name.');
        const parameters = names.map((name) => ({ name: this.text(name), ...spanOf(name) }));
        refuseTwice([...parameters, ...where.map(nameOfLocal)]);
        return {
          kind: 'function',
          mark: this.text(target),
          markSpan: spanOf(target),
          parameters,
          value: this.expression(value),
          where,
          ...span,
        };
      }
      case 'Decision': {
        const children = childrenOf(node);
        const relations = children
          .filter((child) => child.name === 'Relation')
          .map((child) => this.relation(child));
        const sides = children
          .filter((child) => child.name !== 'Relation')
          .map((child) => this.expression(child));
        return { kind: 'decision', sides, relations, where, ...span };
      }
      default:
        return { kind: 'value', value: this.expression(node), where, ...span };
    }
  }

  private definition(node: SyntaxNode): DefinitionStatement {
    const [target, , value] = this.exactly(node, 3);
    return {
      kind: 'definition',
      mark: this.freeName(target, 'mark'),
      markSpan: spanOf(target),
      value: this.expression(value),
      where: [],
      ...spanOf(node),
    };
  }

  private locals(node: SyntaxNode): Local[] {
    const [, ...children] = childrenOf(node);
    const locals = children
      .filter((child) => child.name !== 'Comma')
      .map((child): Local => {
        const [target, , value] = this.exactly(child, 3);
        const name = this.freeName(target, 'local name');
        return { name, nameSpan: spanOf(target), value: this.expression(value), ...spanOf(child) };
      });
    refuseTwice(locals.map(nameOfLocal));
    return locals;
  }

  private freeName(node: SyntaxNode, use: string): string {
    const name = this.text(node);
    if (classOfWord(name) === null) return name;
    return fail(
      'syntax',
      `\`${name}\` is ${describeWord(name)} and cannot be a ${use}; try \`${suggestMark(name)}\`.`,
      node,
    );
  }

  private relation(node: SyntaxNode): Relation {
    const text = this.text(node);
    return RELATIONS[text] ?? (text as Relation);
  }

  private expression(node: SyntaxNode): Expression {
    const span = spanOf(node);
    switch (node.name) {
      case 'Number':
        return this.number(node);
      case 'Mark':
        return { kind: 'mark', name: this.text(node), ...span };
      case 'Constant':
        return { kind: 'constant', name: this.text(node) === 'i' ? 'i' : 'pi', ...span };
      case 'Unit':
        return this.unit(node);
      case 'Quantity':
        return this.quantity(node);
      case 'Compound':
        return readCompound(
          childrenOf(node).map((child) => this.quantity(child)),
          span,
        );
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
      case 'Group':
        return this.group(node);
      case 'List':
        return { kind: 'list', items: this.expressions(contentOf(node)), ...span };
      case 'Index': {
        const [list, subscript] = this.exactly(node, 2);
        const index = this.expression(contentOf(subscript)[0] as SyntaxNode);
        return { kind: 'index', list: this.expression(list), index, ...span };
      }
      case 'Root': {
        const [, value] = this.exactly(node, 2);
        return { kind: 'root', value: this.expression(value), ...span };
      }
      default:
        throw new Error(`The grammar has a node "${node.name}" that the reader does not know.`);
    }
  }

  private expressions(nodes: readonly SyntaxNode[]): Expression[] {
    return nodes.map((node) => this.expression(node));
  }

  private number(node: SyntaxNode): NumberNode {
    return { kind: 'number', text: this.text(node), ...spanOf(node) };
  }

  private unit(node: SyntaxNode): UnitNode {
    const text = this.text(node);
    const named = UNIT_SIGNS[text];
    return { kind: 'unit', name: named ?? text, sign: named !== undefined, ...spanOf(node) };
  }

  private quantity(node: SyntaxNode): QuantityNode {
    const [count, unit] = this.exactly(node, 2);
    const [first, fraction] = count.name === 'Mixed' ? this.exactly(count, 2) : [null, count];
    const [over, sign, under] = fraction.name === 'Fraction' ? childrenOf(fraction) : [fraction];
    if (over === undefined) throw new Error('A fraction has two numbers.');
    return readQuantity({
      whole: first === null ? null : this.number(first),
      numerator: this.number(over),
      sign: sign === undefined ? null : this.text(sign),
      denominator: under === undefined ? null : this.number(under),
      unit: unit.name === 'Unit' ? this.unit(unit) : this.power(unit),
      ...spanOf(node),
    });
  }

  private sum(node: SyntaxNode): Expression {
    const terms: { sign: '+' | '-'; value: Expression; operator: Span }[] = [];
    let sign: '+' | '-' = '+';
    let operator: Span = { from: node.from, to: node.from };
    for (const child of childrenOf(node)) {
      if (child.name === 'AddOp') {
        sign = this.text(child) === '+' ? '+' : '-';
        operator = spanOf(child);
      } else {
        terms.push({ sign, value: this.expression(child), operator });
      }
    }
    return { kind: 'sum', terms, ...spanOf(node) };
  }

  private product(node: SyntaxNode): Expression {
    const factors: Factor[] = [];
    let operator: Factor['operator'] = '*';
    let at: Span = { from: node.from, to: node.from };
    for (const child of childrenOf(node)) {
      if (child.name === 'MulOp') {
        operator = '/÷'.includes(this.text(child)) ? '/' : '*';
        at = spanOf(child);
      } else {
        factors.push({ operator, value: this.expression(child), at });
        operator = 'implied';
        at = { from: child.to, to: child.to };
      }
    }
    const joined = joinFractions(factors);
    const [only] = joined;
    if (joined.length === 1 && only !== undefined) return only.value;
    return { kind: 'product', factors: joined, ...spanOf(node) };
  }

  private power(node: SyntaxNode): PowerNode {
    const [base, raised, exponent] = childrenOf(node);
    if (base === undefined || raised === undefined)
      throw new Error('A power has a base and an exponent.');
    const common = { kind: 'power', base: this.expression(base), ...spanOf(node) } as const;
    if (exponent !== undefined)
      return { ...common, exponent: this.expression(exponent), superscript: false };
    const text = this.text(raised) === '²' ? '2' : '3';
    return { ...common, exponent: { kind: 'number', text, ...spanOf(raised) }, superscript: true };
  }

  private call(node: SyntaxNode): Expression {
    const [nameNode, list] = this.exactly(node, 2);
    const name = this.text(nameNode);
    const nodes = contentOf(list);
    if (name === 'each') return this.each(node, nodes);
    const args = nodes.map((arg) =>
      arg.name === 'Equation' ? this.equation(arg, name) : this.expression(arg),
    );
    return { kind: 'call', name, args, ...spanOf(node) };
  }

  private equation(node: SyntaxNode, name: string): Expression {
    const [left, relation, right] = this.exactly(node, 3);
    const sign = this.text(relation);
    if (findFunction(name)?.equation !== true || sign !== '==')
      fail(
        'syntax',
        `\`${sign}\` compares whole sides of a line and cannot stand inside brackets.`,
        relation,
      );
    return {
      kind: 'equation',
      left: this.expression(left),
      right: this.expression(right),
      ...spanOf(node),
    };
  }

  private each(node: SyntaxNode, nodes: readonly SyntaxNode[]): Expression {
    const equation = nodes.find(({ name }) => name === 'Equation');
    if (equation !== undefined) return this.equation(equation, 'each');
    const [counterNode, first, last, value, surplus] = nodes;
    const signature = findFunction('each')?.signature ?? 'each';
    if (value === undefined || surplus !== undefined) {
      const given = `${nodes.length} ${nodes.length === 1 ? 'was' : 'were'} given`;
      return fail('syntax', `\`${signature}\` takes 4 arguments; ${given}.`, node);
    }
    return {
      kind: 'each',
      counter: this.counter(counterNode as SyntaxNode, signature),
      first: this.expression(first as SyntaxNode),
      last: this.expression(last as SyntaxNode),
      value: this.expression(value),
      ...spanOf(node),
    };
  }

  private counter(node: SyntaxNode, signature: string): Parameter {
    if (node.name === 'Mark') return { name: this.text(node), ...spanOf(node) };
    if (node.name === 'Constant' || node.name === 'Unit') this.freeName(node, 'counter');
    return fail(
      'syntax',
      `\`${signature}\` begins with the name of its counter, and this is no single name.`,
      node,
    );
  }

  private group(node: SyntaxNode): GroupNode {
    const [value, ...more] = this.expressions(contentOf(node));
    if (value === undefined) throw new Error('A bracket has a value in it.');
    return { kind: 'group', value, more, ...spanOf(node) };
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

const nameOfLocal = ({ name, nameSpan }: Local): Parameter => ({ name, ...nameSpan });

/** The parameters and local names of a line differ from each other. */
function refuseTwice(names: readonly Parameter[]): void {
  names.forEach(({ name, from, to }, index) => {
    if (names.findIndex((other) => other.name === name) < index)
      fail(
        'duplicate-mark',
        `\`${name}\` is given twice in this line; a local name has one meaning.`,
        { from, to },
      );
  });
}

/** Several values in a bracket are left over when no name of a function stands before it. */
function refuseLooseCommas(node: Expression, source: string): void {
  const [second] = node.kind === 'group' ? node.more : [];
  if (node.kind === 'group' && second !== undefined) {
    const [first, next] = [node.value, second];
    const message =
      first.kind === 'number' && next.kind === 'number'
        ? `A decimal is written with a point: \`${first.text}.${next.text}\`; a list stands in square brackets.`
        : 'A comma parts the arguments of a function or the items of a list, as in `[a, b]`; an operator was expected.';
    const at = source.indexOf(',', first.to);
    fail('syntax', message, { from: at, to: at + 1 });
  }
  for (const part of partsOf(node)) refuseLooseCommas(part, source);
}

/**
 * `3/4 in` is three quarters of an inch, as on every rule, although `R / 4 in` divides by four inches: a whole number
 * over a whole number with a unit is one quantity, unless the first is itself a divisor.
 */
function joinFractions(factors: readonly Factor[]): Factor[] {
  const joined: Factor[] = [];
  for (const factor of factors) {
    const before = joined.at(-1);
    if (
      factor.operator === '/' &&
      before !== undefined &&
      before.operator !== '/' &&
      isWhole(before.value) &&
      factor.value.kind === 'quantity' &&
      factor.value.whole === null &&
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
