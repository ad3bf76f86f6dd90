import type { Engine, Num } from '../engine/index';
import { fractionOfLiteral } from './decimals';
import { fail, type Span } from './failure';
import { ACTIONS } from './functions/index';
import { nearestRoot } from './functions/polynomial-root';
import { raise } from './functions/roots';
import { findFunction, findUnit } from './names';
import { fromNum, pi } from './pi-sum';
import { readPolynomial } from './polynomial';
import type { CallNode, Expression, NumberNode, PowerNode, ProductNode, SumNode } from './syntax';
import {
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

/** Finds the value of a mark at a place; it fails where there is none. */
export type MarkLookup = (name: string, at: Span) => Value;

/**
 * Evaluates syntax trees in one engine. `at` always names the operation in hand, so that a failure inside the engine,
 * which knows nothing of sources, can be shown at its place. Recursion is bounded by the nesting limit of the reader.
 */
export class Evaluator {
  at: Span = { from: 0, to: 0 };

  constructor(
    private readonly engine: Engine,
    private readonly findMark: MarkLookup,
  ) {}

  value(node: Expression): Value {
    this.at = node;
    switch (node.kind) {
      case 'number':
        return number(fromNum(this.engine, this.literal(node)));
      case 'mark':
        return this.findMark(node.name, node);
      case 'constant':
        return number(node.name === 'i' ? fromNum(this.engine, this.engine.i) : pi(this.engine));
      case 'unit':
        return this.unit(node.name);
      case 'quantity':
        return this.quantity(node);
      case 'sum':
        return this.sum(node);
      case 'product':
        return this.product(node);
      case 'negative':
        return this.apply(node, [node.value], ([value]) => negate(this.engine, value as Value));
      case 'power':
        return this.power(node);
      case 'call':
        return this.call(node);
      case 'group':
        return this.value(node.value);
      case 'root':
        return this.apply(node, [node.value], ([value]) => squareRoot(this.engine, value as Value));
    }
  }

  private apply(
    node: Expression,
    parts: readonly Expression[],
    action: (values: Value[]) => Value,
  ): Value {
    const values = parts.map((part) => this.value(part));
    this.at = node;
    return action(values);
  }

  private literal(node: NumberNode): Num {
    const { n, d } = fractionOfLiteral(node.text);
    return this.engine.rational(n, d);
  }

  private unit(name: string): Value {
    const unit = findUnit(name);
    if (unit === undefined)
      throw new Error(`The grammar has a unit "${name}" that the name table does not know.`);
    const size = this.engine.rational(unit.size.n, unit.size.d);
    return unit.of === 'angle' ? angle(size) : number(fromNum(this.engine, size), 1);
  }

  private quantity(node: Extract<Expression, { kind: 'quantity' }>): Value {
    const numerator = this.literal(node.numerator);
    this.at = node;
    const count =
      node.denominator === null
        ? numerator
        : this.engine.div(numerator, this.literal(node.denominator));
    return multiply(this.engine, number(fromNum(this.engine, count)), this.value(node.unit));
  }

  private sum(node: SumNode): Value {
    const [first, ...rest] = node.terms;
    if (first === undefined) throw new Error('A sum has at least one term.');
    let total = this.value(first.value);
    for (const term of rest) {
      const value = this.value(term.value);
      this.at = { from: node.from, to: term.value.to };
      total = (term.sign === '+' ? add : subtract)(this.engine, total, value);
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
      total = (factor.operator === '/' ? divide : multiply)(this.engine, total, value);
    }
    return total;
  }

  private power(node: PowerNode): Value {
    const base = this.value(node.base);
    const exponent = this.value(node.exponent);
    this.at = node;
    return raise(this.engine, base, exponent);
  }

  private call(node: CallNode): Value {
    this.checkArguments(node);
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
    const action = ACTIONS.get(node.name);
    if (action === undefined)
      throw new Error(`The function "${node.name}" of the name table has no action.`);
    return this.apply(node, node.args, (values) => action(this.engine, values));
  }

  private checkArguments(node: CallNode): void {
    const word = findFunction(node.name);
    if (word === undefined)
      throw new Error(
        `The grammar has a function "${node.name}" that the name table does not know.`,
      );
    const count = node.args.length;
    if (count >= word.least && (word.most === null || count <= word.most)) return;
    const expected =
      word.most === word.least ? `${word.least}` : `${word.least} to ${word.most ?? 'any number'}`;
    const plural = word.most === 1 ? 'argument' : 'arguments';
    fail(
      'syntax',
      `\`${word.signature}\` takes ${expected} ${plural}; ${count} ${count === 1 ? 'was' : 'were'} given.`,
      node,
    );
  }
}
