import type { Expression, FunctionStatement, Statement } from './syntax';
import { partsOf } from './syntax';

/**
 * Writes a statement in the cell language, in one plain way: `*` for every multiplication, `sqrt()` for √, `deg` for °,
 * no remarks. Reading what is written gives the same tree again, places and signs of writing aside.
 */
export function printStatement(statement: Statement): string {
  const locals = statement.where.map(({ name, value }) => `${name} = ${printExpression(value)}`);
  return printBeforeWhere(statement) + (locals.length === 0 ? '' : ` where ${locals.join(', ')}`);
}

function printBeforeWhere(statement: Statement): string {
  switch (statement.kind) {
    case 'definition':
      return `${statement.mark} = ${printExpression(statement.value)}`;
    case 'function':
      return `${signatureOf(statement)} = ${printExpression(statement.value)}`;
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

/** `f(x, y)` */
export function signatureOf({ mark, parameters }: FunctionStatement): string {
  return `${mark}(${parameters.map(({ name }) => name).join(', ')})`;
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
      return `${node.whole === null ? '' : `${node.whole.text} `}${node.numerator.text}${node.denominator === null ? '' : `/${node.denominator.text}`} ${printExpression(node.unit)}`;
    case 'compound':
      return node.parts.map(printExpression).join(' ');
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
    case 'application':
      return `${node.callee.name}(${node.args.map(printExpression).join(', ')})`;
    case 'each':
      return `each(${node.counter.name}, ${partsOf(node).map(printExpression).join(', ')})`;
    case 'equation':
      return `${printExpression(node.left)} == ${printExpression(node.right)}`;
    case 'list':
      return `[${node.items.map(printExpression).join(', ')}]`;
    case 'index':
      return `${printExpression(node.list)}[${printExpression(node.index)}]`;
    case 'group':
      return `(${[node.value, ...node.more].map(printExpression).join(', ')})`;
    case 'root':
      return `√${printExpression(node.value)}`;
  }
}
