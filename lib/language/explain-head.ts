import type { Span } from './failure';
import type { Token } from './tokens';
import { describeWord, suggestMark } from './words';

export interface Finding {
  readonly message: string;
  readonly span: Span;
}

/** How a line begins: where its value starts, and what is wrong with the name or the head before the sign `=`. */
export interface Beginning {
  readonly defines: boolean;
  /** Number of tokens before the value. */
  readonly length: number;
  readonly finding: Finding | null;
}

const NAMES = new Set(['name', 'function', 'unit', 'constant', 'where']);

/** Reads a mark, or a function with its parameters, and the sign `=` after it, whether or not the names are allowed. */
export function readBeginning(tokens: readonly Token[]): Beginning {
  const [first, second] = tokens;
  const none: Beginning = { defines: false, length: 0, finding: null };
  if (first === undefined || !NAMES.has(first.kind)) return none;
  if (second?.kind === 'equals')
    return { defines: true, length: 2, finding: nameFinding(first, 'mark') };
  if (second?.text !== '(') return none;
  const close = tokens.findIndex(({ text }) => text === ')');
  if (close === -1 || tokens[close + 1]?.kind !== 'equals') return none;
  const finding =
    nameFinding(first, 'function') ?? parametersFinding(tokens.slice(2, close), second);
  return { defines: true, length: close + 2, finding };
}

function nameFinding(token: Token, use: 'mark' | 'function' | 'parameter'): Finding | null {
  if (token.kind === 'name') return null;
  const what = use === 'function' ? 'the name of a function of yours' : `a ${use}`;
  const message =
    /^\p{L}/u.test(token.text) && token.text !== 'π'
      ? `\`${token.text}\` is ${describeWord(token.text)} and cannot be ${what}; try \`${suggestMark(token.text)}\`.`
      : `\`${token.text}\` cannot be ${what}; a ${use === 'function' ? 'name' : use} begins with a letter.`;
  return { message, span: token };
}

/** Parameters are names with commas between them. */
function parametersFinding(tokens: readonly Token[], open: Token): Finding | null {
  if (tokens.length === 0)
    return {
      message:
        'A function has at least one parameter, as in `f(x) = x^2`; a value without one is a mark.',
      span: { from: open.from, to: open.to + 1 },
    };
  for (const [index, token] of tokens.entries()) {
    if (index % 2 === 1 && token.kind !== 'comma')
      return {
        message: `Found \`${token.text}\` where a comma between two parameters was expected.`,
        span: token,
      };
    if (index % 2 === 0 && !NAMES.has(token.kind))
      return {
        message: `Found \`${token.text}\` where the name of a parameter was expected, as in \`f(x) = x^2\`.`,
        span: token,
      };
    const finding = index % 2 === 0 ? nameFinding(token, 'parameter') : null;
    if (finding !== null) return finding;
  }
  const last = tokens.at(-1);
  return last?.kind === 'comma'
    ? { message: 'The name of a parameter was expected after `,`.', span: last }
    : null;
}
