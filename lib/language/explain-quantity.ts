import type { Finding } from './explain-head';
import type { Token } from './tokens';

/** A number with what belongs to it, from a place on: how many tokens it takes, or what is wrong with it. */
export type NumberReading =
  | { readonly kind: 'read'; readonly length: number }
  | { readonly kind: 'finding'; readonly finding: Finding };

const isInchOrFoot = (token: Token | undefined): boolean =>
  token?.text === 'in' || token?.text === 'ft';

/**
 * Reads a number that may begin a mixed number, or a size in several units; other numbers are one token long, and what
 * follows them is for the caller to judge.
 */
export function readNumber(tokens: readonly Token[], at: number): NumberReading {
  const at3 = (offset: number): Token | undefined => tokens[at + offset];
  const [first, second] = [tokens[at] as Token, at3(1)];
  if (second?.kind === 'number') {
    if (at3(2)?.text !== '/' || at3(3)?.kind !== 'number')
      return { kind: 'finding', finding: sideBySide(first, second) };
    if (!isInchOrFoot(at3(4))) return { kind: 'finding', finding: mixed(tokens, at) };
    return afterUnit(tokens, at, 5);
  }
  return second?.kind === 'unit' && at3(2)?.kind === 'number'
    ? afterUnit(tokens, at, 2)
    : { kind: 'read', length: 1 };
}

function sideBySide(first: Token, second: Token): Finding {
  return {
    message: `Two numbers, \`${first.text}\` and \`${second.text}\`, stand side by side; an operator was expected between them, or a single point in a decimal.`,
    span: second,
  };
}

function mixed(tokens: readonly Token[], at: number): Finding {
  const [whole, over, , under, unit] = tokens.slice(at, at + 5) as [
    Token,
    Token,
    Token,
    Token,
    Token | undefined,
  ];
  const written = `${whole.text} ${over.text}/${under.text}`;
  const sum = `(${whole.text} + ${over.text}/${under.text})`;
  const instead = unit?.kind === 'unit' && unit.text !== '°' ? `${sum} ${unit.text}` : sum;
  return {
    message: `A mixed number such as \`${written}\` stands only before \`in\` or \`ft\`; write \`${instead}\`.`,
    span: { from: whole.from, to: under.to },
  };
}

const PART_WORDS = new Set(['in', 'ft', 'min', 'sec']);

/** After a quantity a number goes on with it only when a smaller unit follows: `5 ft 3 1/2 in`, `51° 30′`. */
function afterUnit(tokens: readonly Token[], at: number, taken: number): NumberReading {
  let length = taken;
  for (;;) {
    const number = tokens[at + length];
    const unit = tokens[at + length - 1] as Token;
    if (number?.kind !== 'number') return { kind: 'read', length };
    const counts = [/^number $/, /^number \/ number $/, /^number number \/ number $/];
    const found = [1, 3, 4].find((size, index) => {
      const part = tokens.slice(at + length, at + length + size);
      const shape = part.map(({ kind, text }) => `${kind === 'number' ? kind : text} `).join('');
      const next = tokens[at + length + size];
      const ends =
        next?.kind === 'part sign' || next?.kind === 'unit' || PART_WORDS.has(next?.text ?? '');
      return counts[index]?.test(shape) === true && ends;
    });
    if (found === undefined) return { kind: 'finding', finding: needsUnit(number, unit) };
    length += found + 1;
  }
}

function needsUnit(number: Token, unit: Token): Finding {
  const smaller: Readonly<Record<string, string>> = { ft: 'in', '°': '′', deg: 'min' };
  const part = smaller[unit.text];
  const hint =
    part === undefined
      ? 'an operator was expected between them'
      : `an operator was expected, or a smaller unit after it, as in \`${number.text} ${part}\``;
  return {
    message: `The number \`${number.text}\` stands directly after \`${unit.text}\`; ${hint}.`,
    span: number,
  };
}
