import { type Span, fail } from './failure';
import type { CompoundNode, NumberNode, PowerNode, QuantityNode, UnitNode } from './syntax';

interface Read extends Omit<QuantityNode, 'kind'> {
  /** What stands between the numbers of a fraction. */
  readonly sign: string | null;
}

/** A number, a fraction or a mixed number with its unit; refuses a mixed number where the trade has none. */
export function readQuantity({ sign, ...quantity }: Read): QuantityNode {
  const { whole, numerator, denominator, unit } = quantity;
  if (whole !== null) {
    if (sign !== '/') failSideBySide(whole, numerator);
    checkMixed(whole, numerator, denominator as NumberNode, unit);
  }
  return { kind: 'quantity', ...quantity };
}

function failSideBySide(before: NumberNode, after: NumberNode): never {
  return fail(
    'syntax',
    `Two numbers, \`${before.text}\` and \`${after.text}\`, stand side by side; an operator was expected between them, or a single point in a decimal.`,
    after,
  );
}

function checkMixed(
  whole: NumberNode,
  over: NumberNode,
  under: NumberNode,
  unit: UnitNode | PowerNode,
): void {
  const written = `${whole.text} ${over.text}/${under.text}`;
  const span = { from: whole.from, to: under.to };
  const { name } = (unit.kind === 'power' ? unit.base : unit) as UnitNode;
  if (name !== 'in' && name !== 'ft')
    fail(
      'syntax',
      `A mixed number such as \`${written}\` stands only before \`in\` or \`ft\`; write \`(${whole.text} + ${over.text}/${under.text}) ${name}\`.`,
      span,
    );
  const isWhole = [whole, over, under].every(({ text }) => !text.includes('.'));
  if (!isWhole || BigInt(over.text) >= BigInt(under.text))
    fail(
      'syntax',
      `\`${written}\` is no mixed number; a whole number and a proper fraction such as \`3 1/2\` were expected.`,
      span,
    );
}

/** Which units may follow which in one quantity, the larger first. */
const CHAINS: readonly (readonly string[])[] = [
  ['ft', 'in'],
  ['deg', 'min', 'sec'],
];

/** Feet and inches, or degrees, minutes and seconds; refuses every other row of quantities. */
export function readCompound(parts: readonly QuantityNode[], span: Span): CompoundNode {
  let chain: readonly string[] | undefined;
  let last = -1;
  parts.forEach((part, index) => {
    const name = part.unit.kind === 'unit' ? part.unit.name : '';
    chain ??= CHAINS.find(([first]) => first === name);
    const place = chain?.indexOf(name) ?? -1;
    if (place <= last) failChain(part, index, parts);
    last = place;
    const before = parts[index - 1];
    if (before !== undefined) checkInner(before);
  });
  return { kind: 'compound', parts, ...span };
}

function failChain(part: QuantityNode, index: number, parts: readonly QuantityNode[]): never {
  const [before, at] = index === 0 ? [part, parts[1] ?? part] : [parts[index - 1] ?? part, part];
  return fail(
    'syntax',
    `The number \`${at.numerator.text}\` stands directly after \`${before.numerator.text} ${nameOf(before)}\`; only feet and inches, or degrees, minutes and seconds, follow one another, so an operator was expected.`,
    at,
  );
}

function nameOf({ unit }: QuantityNode): string {
  return ((unit.kind === 'power' ? unit.base : unit) as UnitNode).name;
}

/** All but the last part of a compound are whole numbers. */
function checkInner(part: QuantityNode): void {
  if (part.whole === null && part.denominator === null && !part.numerator.text.includes('.'))
    return;
  fail(
    'syntax',
    `Only the last part has a fraction when a size is given in several units; a whole number of \`${nameOf(part)}\` was expected.`,
    part,
  );
}
