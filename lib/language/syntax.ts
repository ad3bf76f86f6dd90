import type { Span } from './failure';

/** The syntax tree of one line. Sums and products are flat; brackets stay in the tree so that a line is set as typed. */
export type Statement =
  DefinitionStatement | FunctionStatement | DecisionStatement | ValueStatement;

interface Whole extends Span {
  /** Local names of the line, in order: each reads those before it. Mostly empty. */
  readonly where: readonly Local[];
}

export interface DefinitionStatement extends Whole {
  readonly kind: 'definition';
  readonly mark: string;
  readonly markSpan: Span;
  readonly value: Expression;
}

export interface FunctionStatement extends Whole {
  readonly kind: 'function';
  /** Functions and marks share one set of names. */
  readonly mark: string;
  readonly markSpan: Span;
  readonly parameters: readonly Parameter[];
  readonly value: Expression;
}

export interface DecisionStatement extends Whole {
  readonly kind: 'decision';
  /** One more side than relations: `a < b <= c` has three sides. */
  readonly sides: readonly Expression[];
  readonly relations: readonly Relation[];
}

export interface ValueStatement extends Whole {
  readonly kind: 'value';
  readonly value: Expression;
}

export type Parameter = { readonly name: string } & Span;

export type Local = {
  readonly name: string;
  readonly nameSpan: Span;
  readonly value: Expression;
} & Span;

export type Relation = '==' | '!=' | '<' | '<=' | '>' | '>=';

export type Expression =
  | NumberNode
  | MarkNode
  | ({ readonly kind: 'constant'; readonly name: 'i' | 'pi' } & Span)
  | UnitNode
  | QuantityNode
  | CompoundNode
  | SumNode
  | ProductNode
  | ({ readonly kind: 'negative'; readonly value: Expression } & Span)
  | PowerNode
  | CallNode
  | ApplicationNode
  | EachNode
  | EquationNode
  | ListNode
  | IndexNode
  | GroupNode
  | ({ readonly kind: 'root'; readonly value: Expression } & Span);

/** A decimal literal: `12`, `0.5`, `.5`, `2.`. */
export type NumberNode = { readonly kind: 'number'; readonly text: string } & Span;

export type MarkNode = { readonly kind: 'mark'; readonly name: string } & Span;

export type UnitNode = {
  readonly kind: 'unit';
  /** A name of the table of units or, inside a compound, `min` or `sec`. */
  readonly name: string;
  /** Whether it was typed as a sign: `°`, `′`, `″`. */
  readonly sign: boolean;
} & Span;

/** A number with its unit, read as one: `1200 mm`, `3/4 in`, `3 1/2 in`, `5 mm^2`. */
export type QuantityNode = {
  readonly kind: 'quantity';
  /** The 3 of `3 1/2 in`. */
  readonly whole: NumberNode | null;
  readonly numerator: NumberNode;
  readonly denominator: NumberNode | null;
  readonly unit: UnitNode | PowerNode;
} & Span;

/** Feet and inches, or degrees, minutes and seconds, read as one: `5 ft 3 1/2 in`, `51° 30' 15.5"`. */
export type CompoundNode = {
  readonly kind: 'compound';
  readonly parts: readonly QuantityNode[];
} & Span;

export type SumNode = {
  readonly kind: 'sum';
  /** The first term always has the sign `+`; a line that starts with a minus has a `negative` there. */
  readonly terms: readonly {
    readonly sign: '+' | '-';
    readonly value: Expression;
    readonly operator: Span;
  }[];
} & Span;

export type ProductNode = {
  readonly kind: 'product';
  /** `implied` is multiplication by standing side by side. The first factor has the operator `*`. */
  readonly factors: readonly Factor[];
} & Span;

export interface Factor {
  readonly operator: '*' | '/' | 'implied';
  readonly value: Expression;
  readonly at: Span;
}

export type PowerNode = {
  readonly kind: 'power';
  readonly base: Expression;
  readonly exponent: Expression;
  readonly superscript: boolean;
} & Span;

/** A function of the language's own. */
export type CallNode = {
  readonly kind: 'call';
  readonly name: string;
  readonly args: readonly Expression[];
} & Span;

/** A function that the notebook defines. */
export type ApplicationNode = {
  readonly kind: 'application';
  readonly callee: MarkNode;
  readonly args: readonly Expression[];
} & Span;

/** `each(k, 1, 8, value)`: the list of the values that the last expression has as the counter goes up. */
export type EachNode = {
  readonly kind: 'each';
  readonly counter: Parameter;
  readonly first: Expression;
  readonly last: Expression;
  readonly value: Expression;
} & Span;

/** Two sides held to be equal, as an argument of a function that looks for what makes them so. */
export type EquationNode = {
  readonly kind: 'equation';
  readonly left: Expression;
  readonly right: Expression;
} & Span;

export type ListNode = { readonly kind: 'list'; readonly items: readonly Expression[] } & Span;

export type IndexNode = {
  readonly kind: 'index';
  readonly list: Expression;
  readonly index: Expression;
} & Span;

export type GroupNode = {
  readonly kind: 'group';
  readonly value: Expression;
  /** What stands after commas. Only while a line is read: several values are always arguments. */
  readonly more: readonly Expression[];
} & Span;

/** The expressions directly inside this one. */
export function partsOf(node: Expression): readonly Expression[] {
  switch (node.kind) {
    case 'number':
    case 'mark':
    case 'constant':
    case 'unit':
      return [];
    case 'quantity':
      return [node.whole, node.numerator, node.denominator, node.unit].filter(
        (part) => part !== null,
      );
    case 'compound':
      return node.parts;
    case 'sum':
      return node.terms.map((term) => term.value);
    case 'product':
      return node.factors.map((factor) => factor.value);
    case 'power':
      return [node.base, node.exponent];
    case 'call':
    case 'application':
      return node.args;
    case 'each':
      return [node.first, node.last, node.value];
    case 'equation':
      return [node.left, node.right];
    case 'list':
      return node.items;
    case 'index':
      return [node.list, node.index];
    case 'group':
      return [node.value, ...node.more];
    case 'negative':
    case 'root':
      return [node.value];
  }
}

/** Names that a node gives a meaning of its own inside its part of this position. */
export function namesBoundIn(node: Expression, part: number): readonly string[] {
  if (node.kind === 'each') return part === 2 ? [node.counter.name] : [];
  if (node.kind !== 'call') return [];
  // The polynomial of `root` is in x.
  if (node.name === 'root') return part === 0 ? ['x'] : [];
  // The unknown of an equation is named by the second argument.
  const unknown = node.name === 'solve' && part < 2 ? node.args[1] : undefined;
  return unknown?.kind === 'mark' ? [unknown.name] : [];
}

/** The expressions that a statement consists of, left to right, local ones last. */
export function sidesOf(statement: Statement): readonly Expression[] {
  const sides = statement.kind === 'decision' ? statement.sides : [statement.value];
  return [...sides, ...statement.where.map((local) => local.value)];
}

/** The mark or function that a statement defines, or null. */
export function markDefinedBy(statement: Statement): string | null {
  return statement.kind === 'definition' || statement.kind === 'function' ? statement.mark : null;
}

/**
 * Every mark and every function of the notebook that a statement reads, each place once. Parameters, local names,
 * counters and the `x` of a polynomial are none.
 */
export function marksReadBy(statement: Statement): MarkNode[] {
  const found: MarkNode[] = [];
  const visit = (node: Expression, bound: ReadonlySet<string>): void => {
    if (node.kind === 'mark') {
      if (!bound.has(node.name)) found.push(node);
      return;
    }
    if (node.kind === 'application') found.push(node.callee);
    partsOf(node).forEach((part, index) => {
      const names = namesBoundIn(node, index);
      visit(part, names.length === 0 ? bound : new Set([...bound, ...names]));
    });
  };
  const bound = new Set(
    statement.kind === 'function' ? statement.parameters.map(({ name }) => name) : [],
  );
  for (const local of statement.where) {
    visit(local.value, new Set(bound));
    bound.add(local.name);
  }
  const sides = statement.kind === 'decision' ? statement.sides : [statement.value];
  for (const side of sides) visit(side, bound);
  return found.sort((a, b) => a.from - b.from);
}
