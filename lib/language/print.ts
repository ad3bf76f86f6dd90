import type { Expression, Statement } from './syntax';

/**
 * Writes a statement in the cell language, in one plain way: `*` for every multiplication, `sqrt()` for √, `deg` for °,
 * no remarks. Reading what is written gives the same tree again, places and signs of writing aside.
 */
export function printStatement(statement: Statement): string {
  switch (statement.kind) {
    case 'definition':
      return `${statement.mark} = ${printExpression(statement.value)}`;
    case 'value':
      return printExpression(statement.value);
    case 'decision':
      return statement.sides
        .map(
          (side, index) =>
            (index === 0 ? '' : ` ${statement.relations[index - 1] ?? '=='} `) +
            printExpression(side),
        )
        .join('');
  }
}

export function printExpression(node: Expression): string {
  switch (node.kind) {
    case 'number':
      return node.text;
    case 'mark':
    case 'constant':
    case 'unit':
      return node.name;
    case 'quantity':
      return `${node.numerator.text}${node.denominator === null ? '' : `/${node.denominator.text}`} ${printExpression(node.unit)}`;
    case 'sum':
      return node.terms
        .map((term, index) => (index === 0 ? '' : ` ${term.sign} `) + printExpression(term.value))
        .join('');
    case 'product':
      return node.factors
        .map(
          (factor, index) =>
            (index === 0 ? '' : factor.operator === '/' ? ' / ' : ' * ') +
            printExpression(factor.value),
        )
        .join('');
    case 'negative':
      return `-${printExpression(node.value)}`;
    case 'power':
      return `${printExpression(node.base)}^${printExpression(node.exponent)}`;
    case 'call':
      return `${node.name}(${node.args.map(printExpression).join(', ')})`;
    case 'group':
      return `(${printExpression(node.value)})`;
    case 'root':
      return `√${printExpression(node.value)}`;
  }
}
