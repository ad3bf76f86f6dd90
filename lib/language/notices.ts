import type { Notice } from './result';
import {
  type CompoundNode,
  type Expression,
  type ProductNode,
  type Statement,
  partsOf,
  sidesOf,
} from './syntax';

type Text = (node: Expression) => string;
type Add = (message: string, from: number, to: number) => void;

/** Places where the reading by the rules of precedence may not be what the writer had in mind. */
export function noticesOf(statement: Statement, source: string): Notice[] {
  const notices: Notice[] = [];
  const add: Add = (message, from, to) => notices.push({ message, from, to });
  const text: Text = (node) => source.slice(node.from, node.to);
  const visit = (node: Expression): void => {
    if (node.kind === 'product') noticesOfProduct(node, text, add);
    if (node.kind === 'compound') noticesOfCompound(node, text, add);
    if (node.kind === 'power' && node.base.kind === 'root') {
      const message = `\`${text(node)}\` is read as a power of \`${text(node.base)}\`; for the root of a power put the power in brackets.`;
      add(message, node.from, node.to);
    }
    for (const part of partsOf(node)) visit(part);
  };
  for (const side of sidesOf(statement)) visit(side);
  return notices;
}

function noticesOfProduct(node: ProductNode, text: Text, add: Add): void {
  node.factors.forEach((factor, index) => {
    const before = node.factors[index - 1];
    const next = node.factors[index + 1];
    if (factor.operator === 'implied' && before !== undefined)
      noticeOfRoot(before.value, factor.value, text, add);
    if (factor.operator !== '/') return;
    if (next?.operator === 'implied') {
      const [below, beside] = [text(factor.value), text(next.value)];
      const message = `\`/ ${below} ${beside}\` divides by \`${below}\` and then multiplies by \`${beside}\`; to divide by both write \`/ (${below} ${beside})\`.`;
      add(message, factor.value.from, next.value.to);
    }
    if (before !== undefined) noticeOfExponent(before.value, factor.value, text, add);
    const isQuantity = factor.value.kind === 'quantity' || factor.value.kind === 'compound';
    if (isQuantity && node.factors.slice(0, index).every((earlier) => isPlain(earlier.value))) {
      const below = text(factor.value);
      const message = `A number and its unit are one quantity, so this divides by \`${below}\`; to give the whole value the unit put what stands before it in brackets.`;
      add(message, factor.value.from, factor.value.to);
    }
  });
}

/** `√2R`, written without a space, looks as if the root went over both. */
function noticeOfRoot(before: Expression, after: Expression, text: Text, add: Add): void {
  if (before.kind !== 'root' || before.value.kind === 'group' || before.to !== after.from) return;
  const [root, beside] = [text(before), text(after)];
  const message = `\`${root}${beside}\` is \`${root}\` times \`${beside}\`; for the root of both write \`√(${text(before.value)} ${beside})\`.`;
  add(message, before.from, after.to);
}

/** `x^1/2`, written without a space, looks as if the fraction were the exponent. */
function noticeOfExponent(before: Expression, below: Expression, text: Text, add: Add): void {
  if (before.kind !== 'power' || before.superscript || below.kind !== 'number') return;
  if (before.exponent.kind !== 'number' || before.to + 1 !== below.from) return;
  const [base, over, under] = [text(before.base), text(before.exponent), below.text];
  const message = `\`${base}^${over}/${under}\` is \`(${base}^${over})/${under}\`; for a fraction as exponent write \`${base}^(${over}/${under})\`.`;
  add(message, before.from, below.to);
}

/** How many of a smaller unit make one of the next larger. */
const FULL: Readonly<Record<string, readonly [count: number, larger: string]>> = {
  in: [12, 'foot'],
  min: [60, 'degree'],
  sec: [60, 'minute'],
};

function noticesOfCompound(node: CompoundNode, text: Text, add: Add): void {
  for (const part of node.parts.slice(1)) {
    const full = part.unit.kind === 'unit' ? FULL[part.unit.name] : undefined;
    const whole = part.whole ?? (part.denominator === null ? part.numerator : null);
    if (full === undefined || whole === null || Number.parseInt(whole.text, 10) < full[0]) continue;
    add(`\`${text(part)}\` is a whole ${full[1]} or more.`, part.from, part.to);
  }
}

/** Without marks and units, so that a unit after it was probably meant for the whole. */
function isPlain(node: Expression): boolean {
  if (['mark', 'unit', 'quantity', 'compound', 'application'].includes(node.kind)) return false;
  return partsOf(node).every(isPlain);
}
