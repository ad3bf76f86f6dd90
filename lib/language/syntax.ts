import type { Span } from './failure';

/** The syntax tree of one line. Sums and products are flat; brackets stay in the tree so that a line is set as typed. */
export type Statement =
  | ({
      readonly kind: 'definition';
      readonly mark: string;
      readonly markSpan: Span;
      readonly value: Expression;
    } & Span)
  | ({
      readonly kind: 'decision';
      /** One more side than relations: `a < b <= c` has three sides. */
      readonly sides: readonly Expression[];
      readonly relations: readonly Relation[];
    } & Span)
  | ({ readonly kind: 'value'; readonly value: Expression } & Span);

export type Relation = '==' | '!=' | '<' | '<=' | '>' | '>=';

export type Expression =
  | NumberNode
  | MarkNode
  | ({ readonly kind: 'constant'; readonly name: 'i' | 'pi' } & Span)
  | UnitNode
  | QuantityNode
  | SumNode
  | ProductNode
  | ({ readonly kind: 'negative'; readonly value: Expression } & Span)
  | PowerNode
  | CallNode
  | ({ readonly kind: 'group'; readonly value: Expression } & Span)
  | ({ readonly kind: 'root'; readonly value: Expression } & Span);

/** A decimal literal: `12`, `0.5`, `.5`, `2.`. */
export type NumberNode = { readonly kind: 'number'; readonly text: string } & Span;

export type MarkNode = { readonly kind: 'mark'; readonly name: string } & Span;

export type UnitNode = {
  readonly kind: 'unit';
  readonly name: string;
  readonly degreeSign: boolean;
} & Span;

/** A number with its unit, read as one: `1200 mm`, `3/4 in`, `5 mm^2`. */
export type QuantityNode = {
  readonly kind: 'quantity';
  readonly numerator: NumberNode;
  readonly denominator: NumberNode | null;
  readonly unit: UnitNode | PowerNode;
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
  readonly factors: readonly {
    readonly operator: '*' | '/' | 'implied';
    readonly value: Expression;
    readonly at: Span;
  }[];
} & Span;

export type PowerNode = {
  readonly kind: 'power';
  readonly base: Expression;
  readonly exponent: Expression;
  readonly superscript: boolean;
} & Span;

export type CallNode = {
  readonly kind: 'call';
  readonly name: string;
  readonly args: readonly Expression[];
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
      return node.denominator === null
        ? [node.numerator, node.unit]
        : [node.numerator, node.denominator, node.unit];
    case 'sum':
      return node.terms.map((term) => term.value);
    case 'product':
      return node.factors.map((factor) => factor.value);
    case 'power':
      return [node.base, node.exponent];
    case 'call':
      return node.args;
    case 'negative':
    case 'group':
    case 'root':
      return [node.value];
  }
}

/** The expressions that a statement consists of, left to right. */
export function sidesOf(statement: Statement): readonly Expression[] {
  return statement.kind === 'decision' ? statement.sides : [statement.value];
}

/** Every mark that a statement reads, each place once, in order. The `x` of a polynomial in `root` is none. */
export function marksReadBy(statement: Statement): MarkNode[] {
  const found: MarkNode[] = [];
  const visit = (node: Expression, polynomial: boolean): void => {
    if (node.kind === 'mark') {
      if (!(polynomial && node.name === 'x')) found.push(node);
      return;
    }
    partsOf(node).forEach((part, index) => {
      visit(part, polynomial || (node.kind === 'call' && node.name === 'root' && index === 0));
    });
  };
  for (const side of sidesOf(statement)) visit(side, false);
  return found;
}
