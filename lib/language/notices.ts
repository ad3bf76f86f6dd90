import type { Notice } from './result';
import { type Expression, type ProductNode, type Statement, partsOf, sidesOf } from './syntax';

/** Places where the reading by the rules of precedence may not be what the writer had in mind. */
export function noticesOf(statement: Statement, source: string): Notice[] {
  const notices: Notice[] = [];
  const text = (node: Expression): string => source.slice(node.from, node.to);
  const visit = (node: Expression): void => {
    if (node.kind === 'product') noticesOfProduct(node, text, notices);
    if (node.kind === 'power' && node.base.kind === 'root') {
      const message = `\`${text(node)}\` is read as a power of \`${text(node.base)}\`; for the root of a power put the power in brackets.`;
      notices.push({ message, from: node.from, to: node.to });
    }
    for (const part of partsOf(node)) visit(part);
  };
  for (const side of sidesOf(statement)) visit(side);
  return notices;
}

function noticesOfProduct(
  node: ProductNode,
  text: (node: Expression) => string,
  notices: Notice[],
): void {
  node.factors.forEach((factor, index) => {
    if (factor.operator !== '/') return;
    const next = node.factors[index + 1];
    if (next?.operator === 'implied') {
      const [below, beside] = [text(factor.value), text(next.value)];
      const message = `\`/ ${below} ${beside}\` divides by \`${below}\` and then multiplies by \`${beside}\`; to divide by both write \`/ (${below} ${beside})\`.`;
      notices.push({ message, from: factor.value.from, to: next.value.to });
    }
    const before = node.factors.slice(0, index);
    if (factor.value.kind === 'quantity' && before.every((earlier) => isPlain(earlier.value))) {
      const below = text(factor.value);
      const message = `A number and its unit are one quantity, so this divides by \`${below}\`; to give the whole value the unit put what stands before it in brackets.`;
      notices.push({ message, from: factor.value.from, to: factor.value.to });
    }
  });
}

/** Without marks and units, so that a unit after it was probably meant for the whole. */
function isPlain(node: Expression): boolean {
  if (node.kind === 'mark' || node.kind === 'unit' || node.kind === 'quantity') return false;
  return partsOf(node).every(isPlain);
}
