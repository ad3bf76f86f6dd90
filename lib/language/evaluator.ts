import type { Engine, Num } from '../engine/index';
import { fractionOfLiteral } from './decimals';
import { Failure, type Problem, type Span, fail } from './failure';
import { ACTIONS } from './functions/index';
import { nearestRoot } from './functions/polynomial-root';
import { raise } from './functions/roots';
import { solveCall } from './functions/solve';
import { LANGUAGE_LIMITS } from './limits';
import { countsBetween, itemByItem, itemOf, list } from './lists';
import { findDegreePart, findFunction, findUnit } from './names';
import { fromNum, pi } from './pi-sum';
import { readPolynomial } from './polynomial';
import { signatureOf } from './print';
import type { Notice } from './result';
import type { Proposer } from './solve/proposal';
import {
  type ApplicationNode,
  type CallNode,
  type DefinitionStatement,
  type EachNode,
  type Expression,
  type FunctionStatement,
  type Local,
  type MarkNode,
  type NumberNode,
  type PowerNode,
  type ProductNode,
  type QuantityNode,
  type Statement,
  type SumNode,
  type ValueStatement,
  partsOf,
  sidesOf,
} from './syntax';
import {
  type LineValue,
  type Single,
  type Value,
  add,
  angle,
  divide,
  multiply,
  needAlgebraic,
  negate,
  number,
  squareRoot,
  subtract,
} from './values';

/** Finds what a name of the notebook stands for, read or called at a place; it fails where there is nothing. */
export type MarkLookup = (name: string, at: MarkNode, use: 'mark' | 'function') => LineValue;

/**
 * Evaluates syntax trees in one engine. `at` always names the operation in hand, so that a failure inside the engine,
 * which knows nothing of sources, can be shown at its place; inside a function of the notebook it stays at the call.
 * Recursion and work are bounded by the limits on depth and operations.
 */
export class Evaluator {
  private place: Span = { from: 0, to: 0 };
  private locals: ReadonlyMap<string, Value> = new Map();
  private operations = 0;
  private depth = 0;
  private readonly calls: string[] = [];
  private remarks: Notice[] = [];

  /** `propose` is asked for what equations that are not solved here might have as solutions. */
  constructor(
    private readonly engine: Engine,
    private readonly findMark: MarkLookup,
    private readonly propose: Proposer | null = null,
  ) {}

  /** What a reader must know of values that came up since the line was opened. */
  get notices(): readonly Notice[] {
    return this.remarks;
  }

  get at(): Span {
    return this.place;
  }

  set at(span: Span) {
    if (this.calls.length === 0) this.place = span;
  }

  /** Begins the evaluation of a line: its local names first. */
  open(statement: Statement): void {
    this.calls.length = 0;
    this.remarks = [];
    this.operations = 0;
    this.depth = 0;
    this.place = statement;
    this.locals = new Map();
    this.define(statement.where);
  }

  /** The value of a line, its local names before it. */
  lineValue(statement: DefinitionStatement | ValueStatement): Value {
    this.open(statement);
    return this.value(statement.value);
  }

  /** A failure as it is shown: at its place, or at the call of the function inside which it came up. */
  problemOf({ code, message, span }: Failure): Problem {
    const [name] = this.calls;
    const { from, to } = name === undefined ? (span ?? this.place) : this.place;
    const inside = name === undefined ? '' : `In \`${name}\`: `;
    return { code, message: inside + message, from, to };
  }

  private define(where: readonly Local[]): void {
    for (const { name, value } of where)
      this.locals = new Map(this.locals).set(name, this.value(value));
  }

  value(node: Expression): Value {
    this.begin();
    this.at = node;
    const value = this.valueOf(node);
    this.end();
    return value;
  }

  /** Counts an operation that may do others before its `end`; fails beyond the limits on their number and depth. */
  begin(): void {
    this.operations += 1;
    this.depth += 1;
    this.checkWork();
  }

  end(): void {
    this.depth -= 1;
  }

  private checkWork(): void {
    const { operations, depth } = LANGUAGE_LIMITS;
    if (this.operations > operations)
      fail(
        'limit-time',
        `The line takes more than ${operations} operations with the functions that it calls; that is the limit.`,
      );
    if (this.depth > depth)
      fail(
        'limit-size',
        `Functions call one another until operations are nested more than ${depth} deep; that is the limit.`,
      );
  }

  private valueOf(node: Expression): Value {
    switch (node.kind) {
      case 'number':
        return number(fromNum(this.engine, this.literal(node)));
      case 'mark':
        return this.mark(node);
      case 'constant':
        return number(node.name === 'i' ? fromNum(this.engine, this.engine.i) : pi(this.engine));
      case 'unit':
        return this.unit(node.name);
      case 'quantity':
        return this.quantity(node);
      case 'compound':
        return this.join(node, node.parts, ([first, ...rest]) =>
          rest.reduce<Single>((total, part) => add(this.engine, total, part), first as Single),
        );
      case 'sum':
        return this.sum(node);
      case 'product':
        return this.product(node);
      case 'negative':
        return this.join(node, [node.value], ([value]) => negate(this.engine, value as Single));
      case 'power':
        return this.power(node);
      case 'call':
        return this.call(node);
      case 'application':
        return this.application(node);
      case 'each':
        return this.each(node);
      case 'list': {
        const items = this.values(node.items);
        this.at = node;
        return list(items);
      }
      case 'index': {
        const [of, index] = [this.value(node.list), this.value(node.index)];
        this.at = of.kind === 'list' ? node.index : node.list;
        return itemOf(this.engine, of, index);
      }
      case 'group':
        return this.value(node.value);
      case 'root':
        return this.join(node, [node.value], ([value]) => squareRoot(this.engine, value as Single));
      case 'equation':
        throw new Error('An equation stands only where a function looks for what solves it.');
    }
  }

  /** A loop and no `map`: each frame counts when functions call one another. */
  private values(nodes: readonly Expression[]): Value[] {
    const values: Value[] = [];
    for (const node of nodes) values.push(this.value(node));
    return values;
  }

  /** Evaluates the parts and then applies an action, item by item where lists stand among them. */
  private join(
    node: Expression,
    parts: readonly Expression[],
    action: (values: readonly Single[]) => Value,
  ): Value {
    const values = this.values(parts);
    this.at = node;
    return itemByItem(values, action);
  }

  private mark(node: MarkNode): Value {
    const local = this.locals.get(node.name);
    if (local !== undefined) return local;
    const found = this.findMark(node.name, node, 'mark');
    if (found.kind !== 'function') return found;
    return fail(
      'syntax',
      `\`${node.name}\` is a function; its arguments were expected in brackets, as in \`${signatureOf(found.definition)}\`.`,
      node,
    );
  }

  private literal(node: NumberNode): Num {
    const { n, d } = fractionOfLiteral(node.text);
    return this.engine.rational(n, d);
  }

  private unit(name: string): Single {
    const unit = findUnit(name) ?? findDegreePart(name);
    if (unit === undefined)
      throw new Error(`The grammar has a unit "${name}" that the name table does not know.`);
    const size = this.engine.rational(unit.size.n, unit.size.d);
    return unit.of === 'angle' ? angle(size) : number(fromNum(this.engine, size), 1);
  }

  private quantity(node: QuantityNode): Value {
    let count = this.literal(node.numerator);
    this.at = node;
    if (node.denominator !== null) count = this.engine.div(count, this.literal(node.denominator));
    if (node.whole !== null) count = this.engine.add(this.literal(node.whole), count);
    const factor = number(fromNum(this.engine, count));
    return itemByItem([this.value(node.unit)], ([unit]) =>
      multiply(this.engine, factor, unit as Single),
    );
  }

  private sum(node: SumNode): Value {
    const [first, ...rest] = node.terms;
    if (first === undefined) throw new Error('A sum has at least one term.');
    let total = this.value(first.value);
    for (const term of rest) {
      const value = this.value(term.value);
      this.at = { from: node.from, to: term.value.to };
      const action = term.sign === '+' ? add : subtract;
      total = itemByItem([total, value], ([a, b]) => action(this.engine, a as Single, b as Single));
    }
    return total;
  }

  private product(node: ProductNode): Value {
    const [first, ...rest] = node.factors;
    if (first === undefined) throw new Error('A product has at least one factor.');
    let total = this.value(first.value);
    for (const factor of rest) {
      const value = this.value(factor.value);
      // A division is shown at its divisor: that is where the 0 stands.
      this.at = factor.operator === '/' ? factor.value : { from: node.from, to: factor.value.to };
      const action = factor.operator === '/' ? divide : multiply;
      total = itemByItem([total, value], ([a, b]) => action(this.engine, a as Single, b as Single));
    }
    return total;
  }

  private power(node: PowerNode): Value {
    return this.join(node, [node.base, node.exponent], ([base, exponent]) =>
      raise(this.engine, base as Single, exponent as Single),
    );
  }

  private call(node: CallNode): Value {
    const word = checkArguments(node);
    const [first, second] = node.args;
    if (node.name === 'root' && first !== undefined && second !== undefined) {
      const polynomial = readPolynomial(this.engine, this, first);
      const near = needAlgebraic(
        this.engine,
        this.value(second),
        'The place near the root is a plain number',
      );
      this.at = node;
      return number(fromNum(this.engine, nearestRoot(this.engine, polynomial, near)));
    }
    if (node.name === 'solve') return this.solve(node);
    const action = ACTIONS.get(node.name);
    if (action === undefined)
      throw new Error(`The function "${node.name}" of the name table has no action.`);
    if (word.itemByItem) return this.join(node, node.args, (values) => action(this.engine, values));
    const values = this.values(node.args);
    this.at = node;
    return action(this.engine, values);
  }

  private solve(node: CallNode): Value {
    const around = {
      engine: this.engine,
      locals: this.locals,
      valueIn: (locals: ReadonlyMap<string, Value>, part: Expression) => this.valueIn(locals, part),
      functionOf: (called: ApplicationNode) => this.functionOf(called),
    };
    const { value, notice } = solveCall(node, around, this.propose);
    this.at = node;
    if (notice !== null) this.remarks.push({ message: notice, from: node.from, to: node.to });
    return value;
  }

  /** Restores the names and the depth even when it fails, as a failure may be one of several tries. */
  private valueIn(locals: ReadonlyMap<string, Value>, node: Expression): Value {
    const outer = { locals: this.locals, depth: this.depth, calls: this.calls.length };
    this.locals = locals;
    try {
      return this.value(node);
    } catch (error) {
      if (!(error instanceof Failure) || this.calls.length === outer.calls) throw error;
      const { code, message, from, to } = this.problemOf(error);
      throw new Failure(code, message, { from, to });
    } finally {
      this.locals = outer.locals;
      this.depth = outer.depth;
      this.calls.length = outer.calls;
    }
  }

  private each(node: EachNode): Value {
    const [first, last] = [this.value(node.first), this.value(node.last)];
    this.at = node;
    const counts = countsBetween(this.engine, first, last);
    const outer = this.locals;
    const items = counts.map((count) => {
      const counted = number(fromNum(this.engine, this.engine.integer(count)));
      this.locals = new Map(outer).set(node.counter.name, counted);
      return this.value(node.value);
    });
    this.locals = outer;
    this.at = node;
    return list(items);
  }

  private application(node: ApplicationNode): Value {
    const { parameters, where, value } = this.functionOf(node);
    const args = this.values(node.args);
    const outer = this.enter(node);
    this.locals = new Map(parameters.map(({ name }, index) => [name, args[index] as Value]));
    this.define(where);
    const result = this.value(value);
    this.leave(node, outer);
    return result;
  }

  /** Goes into a function of the notebook, where the local names of the calling line are not seen; gives these names. */
  enter(node: ApplicationNode): ReadonlyMap<string, Value> {
    const outer = this.locals;
    this.at = node;
    this.calls.push(node.callee.name);
    this.locals = new Map();
    return outer;
  }

  leave(node: ApplicationNode, outer: ReadonlyMap<string, Value>): void {
    this.calls.pop();
    this.locals = outer;
    this.at = node;
  }

  /** The definition of a function that is called with as many arguments as it has parameters. */
  functionOf(node: ApplicationNode): FunctionStatement {
    const { name } = node.callee;
    const found = this.findMark(name, node.callee, 'function');
    if (found.kind !== 'function')
      return fail(
        'syntax',
        `\`${name}\` is a mark and no function; a bracket after it multiplies and holds one value.`,
        node,
      );
    const { parameters } = found.definition;
    checkCount(signatureOf(found.definition), parameters.length, parameters.length, node);
    return found.definition;
  }

  /**
   * Looks over a function before it is called: everything that its value reads is there, and every call in it has the
   * arguments that it needs.
   */
  checkFunction(statement: FunctionStatement, reads: readonly MarkNode[]): void {
    this.open({ ...statement, where: [] });
    const called = new Set<MarkNode>();
    const visit = (node: Expression): void => {
      if (node.kind === 'call') checkArguments(node);
      if (node.kind === 'application') {
        called.add(node.callee);
        this.functionOf(node);
      }
      partsOf(node).forEach(visit);
    };
    sidesOf(statement).forEach(visit);
    for (const read of reads) if (!called.has(read)) this.mark(read);
  }
}

function checkArguments(node: CallNode) {
  const word = findFunction(node.name);
  if (word === undefined)
    throw new Error(`The grammar has a function "${node.name}" that the name table does not know.`);
  checkCount(word.signature, word.least, word.most, node);
  return word;
}

function checkCount(
  signature: string,
  least: number,
  most: number | null,
  node: CallNode | ApplicationNode,
): void {
  const count = node.args.length;
  if (count >= least && (most === null || count <= most)) return;
  const expected = most === least ? `${least}` : `${least} to ${most ?? 'any number'}`;
  const plural = most === 1 ? 'argument' : 'arguments';
  fail(
    'syntax',
    `\`${signature}\` takes ${expected} ${plural}; ${count} ${count === 1 ? 'was' : 'were'} given.`,
    node,
  );
}
