import type { Span } from './failure';
import { classOfWord } from './names';

/** The tokens of a line as the explanation of a fault sees them: coarser than those of the grammar, and never failing. */
export type TokenKind =
  | 'number'
  | 'name'
  | 'function'
  | 'unit'
  | 'constant'
  | 'where'
  | 'open'
  | 'close'
  | 'comma'
  | 'sign'
  | 'times'
  | 'caret'
  | 'superscript'
  | 'root'
  | 'relation'
  | 'equals'
  | 'part sign'
  | 'other'
  | 'end';

export interface Token extends Span {
  readonly kind: TokenKind;
  readonly text: string;
}

const PATTERN =
  /([ \t\u00a0\u2009\u202f]+|#.*)|(\d+(?:\.\d*)?|\.\d+)|([A-Za-zÀ-ÖØ-öø-ÿΑ-Ωα-ορ-ω][A-Za-zÀ-ÖØ-öø-ÿΑ-Ωα-ορ-ω0-9_]*)|(==|!=|<=|>=|[<>≤≥≠])|([^])/uy;

const SINGLE: Readonly<Record<string, TokenKind>> = {
  '(': 'open',
  ')': 'close',
  '[': 'open',
  ']': 'close',
  ',': 'comma',
  '+': 'sign',
  '-': 'sign',
  '−': 'sign',
  '*': 'times',
  '/': 'times',
  '×': 'times',
  '÷': 'times',
  '·': 'times',
  '⋅': 'times',
  '^': 'caret',
  '²': 'superscript',
  '³': 'superscript',
  '√': 'root',
  π: 'constant',
  '°': 'unit',
  "'": 'part sign',
  '′': 'part sign',
  '’': 'part sign',
  '"': 'part sign',
  '″': 'part sign',
  '”': 'part sign',
  '=': 'equals',
};

const WORDS = { function: 'function', unit: 'unit', constant: 'constant', word: 'where' } as const;

/** All tokens of a line, an `end` after the last; blanks and remarks are left out. */
export function tokenize(source: string): Token[] {
  const tokens: Token[] = [];
  PATTERN.lastIndex = 0;
  for (let match = PATTERN.exec(source); match !== null; match = PATTERN.exec(source)) {
    const [text, skipped, number, name, relation] = match;
    const from = match.index;
    if (skipped !== undefined) continue;
    let kind: TokenKind = SINGLE[text] ?? 'other';
    if (number !== undefined) kind = 'number';
    else if (name !== undefined) {
      const wordClass = classOfWord(name);
      kind = wordClass === null ? 'name' : WORDS[wordClass];
    } else if (relation !== undefined) kind = 'relation';
    tokens.push({ kind, text, from, to: from + text.length });
  }
  const end = tokens.at(-1)?.to ?? 0;
  tokens.push({ kind: 'end', text: '', from: end, to: end });
  return tokens;
}
