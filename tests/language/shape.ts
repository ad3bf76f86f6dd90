import { type Expression, type Statement, partsOf } from '@/lib/language/syntax';

/** A syntax tree with every operation in brackets, so that a test can see how a line was read. */
export function shapeOf(statement: Statement): string {
  const locals = statement.where.map(({ name, value }) => `${name} = ${shape(value)}`);
  return shapeBeforeWhere(statement) + (locals.length === 0 ? '' : ` where ${locals.join(', ')}`);
}

function shapeBeforeWhere(statement: Statement): string {
  switch (statement.kind) {
    case 'definition':
      return `${statement.mark} = ${shape(statement.value)}`;
    case 'function':
      return `${statement.mark}<${statement.parameters.map(({ name }) => name).join(', ')}> = ${shape(statement.value)}`;
    case 'value':
      return shape(statement.value);
    case 'decision':
      return statement.sides
        .map(
          (side, index) =>
            (index === 0 ? '' : ` ${statement.relations[index - 1] ?? ''} `) + shape(side),
        )
        .join('');
  }
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
      return `[${node.whole === null ? '' : `${node.whole.text}+`}${node.numerator.text}${node.denominator === null ? '' : `/${node.denominator.text}`} ${shape(node.unit)}]`;
    case 'compound':
      return `[${node.parts.map(shape).join('')}]`;
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
    case 'application':
      return `${node.callee.name}<${node.args.map(shape).join(', ')}>`;
    case 'each':
      return `each<${node.counter.name}: ${partsOf(node).map(shape).join(', ')}>`;
    case 'equation':
      return `${shape(node.left)} == ${shape(node.right)}`;
    case 'list':
      return `{${node.items.map(shape).join(', ')}}`;
    case 'index':
      return `${shape(node.list)}#${shape(node.index)}`;
    case 'group':
      return shape(node.value);
    case 'root':
      return `√${shape(node.value)}`;
  }
}
