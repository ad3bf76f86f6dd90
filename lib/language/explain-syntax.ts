import type { Problem, Span } from './failure';
import { findFunction } from './names';
import { findNearest } from './words';

/**
 * Says in words why a line does not parse: what stands there, what was expected and, where one is likely, the mend.
 * The parser only knows where it got stuck; this walks the same line with a two-state reader (a value is due, or an
 * operator is due) and a stack of open brackets, and speaks of the first thing that is out of place.
 * Accepts a line that the parser refused and the place where it did. Cost: linear.
 */
export function explainSyntax(source: string, refused: Span): Problem {
  const found = new Explainer(tokenize(source)).run();
  const {
    message,
    span,
    code = 'syntax',
  } = found ?? {
    message: 'This part of the line cannot be read; an expression was expected.',
    span: refused,
  };
  const to = Math.max(span.to, Math.min(span.from + 1, source.length));
  return { code, message, from: Math.min(span.from, to), to };
}

type TokenKind =
  | 'number'
  | 'name'
  | 'function'
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
  | 'value'
  | 'other'
  | 'end';

interface Token extends Span {
  readonly kind: TokenKind;
  readonly text: string;
}

const PATTERN =
  /([ \t\u00a0\u2009\u202f]+|#.*)|(\d+(?:\.\d*)?|\.\d+)|([A-Za-zÀ-ÖØ-öø-ÿΑ-Ωα-ορ-ω][A-Za-zÀ-ÖØ-öø-ÿΑ-Ωα-ορ-ω0-9_]*)|(==|!=|<=|>=|[<>≤≥≠])|([^])/uy;

const SINGLE: Readonly<Record<string, TokenKind>> = {
  '(': 'open',
  ')': 'close',
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
  π: 'value',
  '°': 'value',
  '=': 'equals',
};

function tokenize(source: string): Token[] {
  const tokens: Token[] = [];
  PATTERN.lastIndex = 0;
  for (let match = PATTERN.exec(source); match !== null; match = PATTERN.exec(source)) {
    const [text, skipped, number, name, relation] = match;
    const from = match.index;
    if (skipped !== undefined) continue;
    let kind: TokenKind = SINGLE[text] ?? 'other';
    if (number !== undefined) kind = 'number';
    else if (name !== undefined) kind = findFunction(name) === undefined ? 'name' : 'function';
    else if (relation !== undefined) kind = 'relation';
    tokens.push({ kind, text, from, to: from + text.length });
  }
  const end = tokens.at(-1)?.to ?? 0;
  tokens.push({ kind: 'end', text: '', from: end, to: end });
  return tokens;
}

/** Characters that people type for something the language writes otherwise. */
const MENDS: Readonly<Record<string, string>> = {
  ';': 'write one statement on each line',
  ':': 'a mark is defined with `=`, as in `R = 1200 mm`',
  '[': 'use round brackets `( )`',
  ']': 'use round brackets `( )`',
  '{': 'use round brackets `( )`',
  '}': 'use round brackets `( )`',
  '"': 'write inches as `in`',
  '″': 'write inches as `in`',
  "'": 'write feet as `ft`',
  '′': 'write feet as `ft`',
  '%': 'write a hundredth part as `/100`',
  º: 'the degree sign is `°`; `deg` means the same',
  '–': 'write minus as `-`',
  '—': 'write minus as `-`',
  '∛': 'write a cube root as `cbrt(x)`',
  '⁄': 'write a fraction with `/`',
  '∕': 'write a fraction with `/`',
  '½': 'write `1/2`',
  '¼': 'write `1/4`',
  '¾': 'write `3/4`',
  '¹': 'write a power with `^`',
  '⁴': 'write a power with `^`, as in `x^4`',
  _: 'a mark begins with a letter',
  '!': 'two values are unequal when `!=` holds between them',
  $: 'prices have no place here; a mark begins with a letter',
};

interface Finding {
  readonly message: string;
  readonly span: Span;
  readonly code?: 'unknown-name';
}

class Explainer {
  private index = 0;
  private readonly open: { token: Token; call: boolean }[] = [];
  private defines = false;

  constructor(private readonly tokens: readonly Token[]) {}

  run(): Finding | null {
    const [first, second] = this.tokens;
    if (
      first !== undefined &&
      second?.kind === 'equals' &&
      ['name', 'function', 'value'].includes(first.kind)
    ) {
      this.defines = true;
      this.index = 2;
      if (first.kind === 'value')
        return {
          message: `\`${first.text}\` cannot be a mark; a mark begins with a letter.`,
          span: first,
        };
    }
    let due: 'value' | 'operator' = 'value';
    for (;;) {
      const token = this.current();
      const step: Finding | 'value' | 'operator' | null =
        due === 'value' ? this.valueDue(token) : this.operatorDue(token);
      if (step === null || typeof step === 'object') return step;
      due = step;
      this.index += 1;
    }
  }

  private current(): Token {
    return this.tokens[Math.min(this.index, this.tokens.length - 1)] as Token;
  }

  private previous(): Token | undefined {
    return this.tokens[this.index - 1];
  }

  private valueDue(token: Token): Finding | 'value' | 'operator' {
    switch (token.kind) {
      case 'number':
      case 'name':
      case 'value':
        return 'operator';
      case 'function': {
        const next = this.tokens[this.index + 1];
        if (next?.kind === 'open') return 'value';
        const message = `\`${token.text}\` needs its argument in brackets, as in \`${findFunction(token.text)?.signature ?? token.text}\`.`;
        return { message, span: token };
      }
      case 'open':
        this.open.push({ token, call: this.previous()?.kind === 'function' });
        return 'value';
      case 'sign':
        if (this.previous()?.kind === 'root')
          return {
            message: `\`√\` takes the next number, name or bracket; put what starts with \`${token.text}\` in brackets.`,
            span: token,
          };
        return 'value';
      case 'root':
        return 'value';
      case 'close': {
        const before = this.previous();
        if (before?.kind === 'open')
          return {
            message: 'There is nothing between these brackets; a value was expected.',
            span: { from: before.from, to: token.to },
          };
        if (this.open.length === 0)
          return { message: 'This `)` closes a bracket that was never opened.', span: token };
        return {
          message: `A value was expected before \`)\`${this.afterPrevious()}.`,
          span: token,
        };
      }
      case 'times':
        if (this.previous()?.text === '*' && token.text === '*') {
          return {
            message: 'A power is written with `^`, not with `**`.',
            span: { from: token.from - 1, to: token.to },
          };
        }
        return {
          message: `Found \`${token.text}\` where a value was expected${this.afterPrevious()}.`,
          span: token,
        };
      case 'end': {
        const before = this.previous();
        if (before === undefined)
          return { message: 'A value was expected, and the line is empty.', span: token };
        return {
          message: `The line ends${this.afterPrevious()}; a value was expected.`,
          span: before,
        };
      }
      case 'other':
        return this.foreign(token, 'a value');
      default:
        return {
          message: `Found \`${token.text}\` where a value was expected${this.afterPrevious()}.`,
          span: token,
        };
    }
  }

  private operatorDue(token: Token): Finding | 'value' | 'operator' | null {
    switch (token.kind) {
      case 'number': {
        const before = this.previous();
        const message =
          before?.kind === 'number'
            ? `Two numbers, \`${before.text}\` and \`${token.text}\`, stand side by side; an operator was expected between them, or a single point in a decimal.`
            : `The number \`${token.text}\` stands directly after a value; write \`*\` between them, or the number first.`;
        return { message, span: token };
      }
      case 'name':
      case 'value':
        return 'operator';
      case 'function':
      case 'open':
      case 'root':
        return this.valueDue(token);
      case 'superscript':
        return this.previous()?.kind === 'superscript'
          ? {
              message: 'Two exponents stand side by side; put the first power in brackets.',
              span: token,
            }
          : 'operator';
      case 'close':
        if (this.open.pop() === undefined)
          return { message: 'This `)` closes a bracket that was never opened.', span: token };
        return 'operator';
      case 'sign':
      case 'times':
        return 'value';
      case 'caret':
        return this.previous()?.kind === 'superscript'
          ? {
              message: 'Two exponents stand side by side; put the first power in brackets.',
              span: token,
            }
          : 'value';
      case 'comma':
        return this.open.at(-1)?.call === true ? 'value' : this.comma(token);
      case 'equals':
        return {
          message: this.defines
            ? 'A line has one `=`, after the mark that it defines; to decide whether two values are equal write `==`.'
            : '`=` defines a mark and needs a single name before it; to decide whether two values are equal write `==`.',
          span: token,
        };
      case 'relation':
        if (this.open.length > 0)
          return {
            message: `\`${token.text}\` compares whole sides of a line and cannot stand inside brackets.`,
            span: token,
          };
        if (this.defines)
          return {
            message: `A mark holds a value; \`${token.text}\` decides and needs a line of its own.`,
            span: token,
          };
        return 'value';
      case 'end':
        return this.unclosed(token);
      case 'other':
        return this.foreign(token, 'an operator');
    }
  }

  private comma(token: Token): Finding {
    const before = this.previous();
    const after = this.tokens[this.index + 1];
    const opened = this.open.at(-1);
    const called =
      opened === undefined ? undefined : this.tokens[this.tokens.indexOf(opened.token) - 1];
    if (called?.kind === 'name') {
      const nearest = findNearest(called.text, []);
      const hint = nearest === null ? '.' : `; did you mean \`${nearest}\`?`;
      return {
        code: 'unknown-name',
        message: `There is no function \`${called.text}\`${hint}`,
        span: called,
      };
    }
    const message =
      before?.kind === 'number' && after?.kind === 'number'
        ? `A decimal is written with a point: \`${before.text}.${after.text}\`.`
        : 'A comma only separates the arguments of a function; an operator was expected.';
    return { message, span: token };
  }

  private unclosed(end: Token): Finding | null {
    const innermost = this.open.at(-1);
    if (innermost === undefined) return null;
    const message = `A \`)\` is missing for the bracket opened at column ${innermost.token.from + 1}.`;
    return { message, span: { from: innermost.token.from, to: end.to } };
  }

  private foreign(token: Token, expected: string): Finding {
    const mend = MENDS[token.text];
    const message =
      mend === undefined
        ? `The character \`${token.text}\` has no meaning here; ${expected} was expected.`
        : `The character \`${token.text}\` has no meaning here: ${mend}.`;
    return { message, span: token };
  }

  private afterPrevious(): string {
    const before = this.previous();
    return before === undefined ? '' : ` after \`${before.text}\``;
  }
}
