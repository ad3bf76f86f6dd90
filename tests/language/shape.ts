import type { Expression, Statement } from '@/lib/language/syntax';

/** A syntax tree with every operation in brackets, so that a test can see how a line was read. */
export function shapeOf(statement: Statement): string {
  if (statement.kind === 'definition') return `${statement.mark} = ${shape(statement.value)}`;
  if (statement.kind === 'value') return shape(statement.value);
  return statement.sides
    .map(
      (side, index) =>
        (index === 0 ? '' : ` ${statement.relations[index - 1] ?? ''} `) + shape(side),
    )
    .join('');
}

export function shape(node: Expression): string {
  switch (node.kind) {
    case 'number':
      return node.text;
    case 'mark':
    case 'constant':
    case 'unit':
      return node.name;
    case 'quantity':
      return `[${node.numerator.text}${node.denominator === null ? '' : `/${node.denominator.text}`} ${shape(node.unit)}]`;
    case 'sum':
      return node.terms
        .map((term) => [term.sign, shape(term.value)] as const)
        .reduce(
          (left, [sign, right], index) => (index === 0 ? right : `(${left} ${sign} ${right})`),
          '',
        );
    case 'product':
      return node.factors
        .map(
          (factor) =>
            [factor.operator === 'implied' ? '.' : factor.operator, shape(factor.value)] as const,
        )
        .reduce(
          (left, [operator, right], index) =>
            index === 0 ? right : `(${left} ${operator} ${right})`,
          '',
        );
    case 'negative':
      return `(- ${shape(node.value)})`;
    case 'power':
      return `(${shape(node.base)} ^ ${shape(node.exponent)})`;
    case 'call':
      return `${node.name}(${node.args.map(shape).join(', ')})`;
    case 'group':
      return shape(node.value);
    case 'root':
      return `√${shape(node.value)}`;
  }
}
