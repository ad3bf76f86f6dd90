import { type Finding, readBeginning } from './explain-head';
import { readNumber } from './explain-quantity';
import type { Problem, Span } from './failure';
import { findFunction } from './names';
import { type Token, tokenize } from './tokens';
import { describeWord, suggestMark } from './words';

/**
 * Says in words why a line does not parse: what stands there, what was expected and, where one is likely, the mend.
 * The parser only knows where it got stuck; this walks the same line with a two-state reader (a value is due, or an
 * operator is due) and a stack of open brackets, and speaks of the first thing that is out of place.
 * Accepts a line that the parser refused and the place where it did. Cost: linear.
 */
export function explainSyntax(source: string, refused: Span): Problem {
  const found = new Explainer(tokenize(source)).run();
  const { message, span } = found ?? {
    message: 'This part of the line cannot be read; an expression was expected.',
    span: refused,
  };
  const to = Math.max(span.to, Math.min(span.from + 1, source.length));
  return { code: 'syntax', message, from: Math.min(span.from, to), to };
}

/** Characters that people type for something the language writes otherwise. */
const MENDS: Readonly<Record<string, string>> = {
  ';': 'write one statement on each line',
  ':': 'a mark is defined with `=`, as in `R = 1200 mm`',
  '{': 'use round brackets `( )`, or square ones for a list',
  '}': 'use round brackets `( )`, or square ones for a list',
  '%': 'write a hundredth part as `/100`',
  º: 'the degree sign is `°`; `deg` means the same',
  '–': 'write minus as `-`',
  '—': 'write minus as `-`',
  '‘': 'write feet as `ft`, and minutes of arc as `′`',
  '“': 'write inches as `in`, and seconds of arc as `″`',
  '∛': 'write a cube root as `cbrt(x)`',
  '⁄': 'write a fraction with `/`',
  '∕': 'write a fraction with `/`',
  '½': 'write `1/2`',
  '¼': 'write `1/4`',
  '¾': 'write `3/4`',
  '⅛': 'write `1/8`',
  '⅜': 'write `3/8`',
  '⅝': 'write `5/8`',
  '⅞': 'write `7/8`',
  '⅓': 'write `1/3`',
  '⅔': 'write `2/3`',
  '¹': 'write a power with `^`',
  '⁴': 'write a power with `^`, as in `x^4`',
  _: 'a mark begins with a letter',
  '!': 'two values are unequal when `!=` holds between them',
  $: 'prices have no place here; a mark begins with a letter',
};

type Due = 'value' | 'operator';
type BracketUse = 'group' | 'call' | 'list' | 'index';

const CLOSES: Readonly<Record<string, string>> = { '(': ')', '[': ']' };

class Explainer {
  private index = 0;
  private readonly open: { token: Token; use: BracketUse }[] = [];
  private defines = false;
  private where = false;

  constructor(private readonly tokens: readonly Token[]) {}

  run(): Finding | null {
    const beginning = readBeginning(this.tokens);
    if (beginning.finding !== null) return beginning.finding;
    this.defines = beginning.defines;
    this.index = beginning.length;
    let due: Due = 'value';
    for (;;) {
      const token = this.current();
      const step: Finding | Due | null =
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

  private next(): Token | undefined {
    return this.tokens[this.index + 1];
  }

  private valueDue(token: Token): Finding | Due {
    switch (token.kind) {
      case 'number':
        return this.number();
      case 'name':
      case 'unit':
      case 'constant':
        return 'operator';
      case 'function': {
        if (this.next()?.text === '(') return 'value';
        const message = `\`${token.text}\` needs its argument in brackets, as in \`${findFunction(token.text)?.signature ?? token.text}\`.`;
        return { message, span: token };
      }
      case 'open':
        this.open.push({ token, use: this.useOfBracket(token, 'value') });
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
      case 'close':
        return this.closeTooEarly(token);
      case 'times':
        if (this.previous()?.text === '*' && token.text === '*') {
          return {
            message: 'A power is written with `^`, not with `**`.',
            span: { from: token.from - 1, to: token.to },
          };
        }
        return this.noValue(token);
      case 'end': {
        const before = this.previous();
        if (before === undefined)
          return { message: 'A value was expected, and the line is empty.', span: token };
        return {
          message: `The line ends${this.afterPrevious()}; a value was expected.`,
          span: before,
        };
      }
      case 'part sign':
      case 'other':
        return this.foreign(token, 'a value');
      default:
        return this.noValue(token);
    }
  }

  private number(): Finding | Due {
    const reading = readNumber(this.tokens, this.index);
    if (reading.kind === 'finding') return reading.finding;
    this.index += reading.length - 1;
    return 'operator';
  }

  private noValue(token: Token): Finding {
    return {
      message: `Found \`${token.text}\` where a value was expected${this.afterPrevious()}.`,
      span: token,
    };
  }

  private useOfBracket(token: Token, due: Due): BracketUse {
    if (token.text === '[') return due === 'operator' ? 'index' : 'list';
    const before = this.previous();
    const called = before?.kind === 'function' || (due === 'operator' && before?.kind === 'name');
    return called ? 'call' : 'group';
  }

  private closeTooEarly(token: Token): Finding {
    const before = this.previous();
    if (before?.kind === 'open')
      return {
        message: 'There is nothing between these brackets; a value was expected.',
        span: { from: before.from, to: token.to },
      };
    if (this.open.length === 0) return neverOpened(token);
    return {
      message: `A value was expected before \`${token.text}\`${this.afterPrevious()}.`,
      span: token,
    };
  }

  private operatorDue(token: Token): Finding | Due | null {
    switch (token.kind) {
      case 'number':
        return this.numberAfterValue(token);
      case 'name':
      case 'unit':
      case 'constant':
        return 'operator';
      case 'open':
        return this.openAfterValue(token);
      case 'function':
      case 'root':
        return this.functionAfterValue(token);
      case 'superscript':
      case 'caret':
        if (this.previous()?.kind === 'superscript')
          return {
            message: 'Two exponents stand side by side; put the first power in brackets.',
            span: token,
          };
        return token.kind === 'caret' ? 'value' : 'operator';
      case 'close': {
        const opened = this.open.pop();
        if (opened === undefined) return neverOpened(token);
        const expected = CLOSES[opened.token.text] ?? ')';
        return expected === token.text ? 'operator' : mismatched(token, opened.token, expected);
      }
      case 'sign':
      case 'times':
        return 'value';
      case 'comma':
        return this.comma(token);
      case 'where':
        return this.beginWhere(token);
      case 'equals':
        return this.equals(token);
      case 'relation':
        return this.relation(token);
      case 'end':
        return this.unclosed(token);
      case 'part sign':
      case 'other':
        return this.foreign(token, 'an operator');
    }
  }

  private numberAfterValue(token: Token): Finding {
    const before = this.previous();
    const earlier = this.tokens[this.index - 2];
    if (
      /^[xX]$/.test(before?.text ?? '') &&
      (earlier?.kind === 'number' || earlier?.kind === 'unit')
    ) {
      return {
        message: `A product is written with \`*\` or \`×\`, not with the letter \`${before?.text ?? ''}\`.`,
        span: before ?? token,
      };
    }
    return {
      message: `The number \`${token.text}\` stands directly after a value; write \`*\` between them, or the number first.`,
      span: token,
    };
  }

  private openAfterValue(token: Token): Finding | Due {
    const before = this.previous();
    const indexable = before?.kind === 'name' || before?.kind === 'close';
    if (token.text === '[' && !indexable)
      return {
        message: `\`[\` after \`${before?.text ?? ''}\` is no index, as only a list has items; to multiply by a list write \`*\`.`,
        span: token,
      };
    this.open.push({ token, use: this.useOfBracket(token, 'operator') });
    return 'value';
  }

  private functionAfterValue(token: Token): Finding | Due {
    if (['min', 'sec'].includes(token.text) && this.previous()?.kind === 'number') {
      if (this.next()?.text !== '(')
        return {
          message: `\`${token.text}\` of arc stands only after degrees, as in \`0 deg ${this.previous()?.text ?? ''} ${token.text}\`.`,
          span: token,
        };
    }
    return this.valueDue(token);
  }

  private comma(token: Token): Finding | Due {
    const opened = this.open.at(-1);
    if (opened?.use === 'call' || opened?.use === 'list') return 'value';
    if (opened === undefined && this.where) return this.local(token);
    const before = this.previous();
    const after = this.next();
    if (before?.kind === 'number' && after?.kind === 'number')
      return { message: decimalComma(before.text, after.text), span: token };
    const message =
      opened?.use === 'index'
        ? 'An index is one whole number; an item of a list inside a list is `L[2][3]`.'
        : 'A comma parts the arguments of a function or the items of a list, as in `[a, b]`; an operator was expected.';
    return { message, span: token };
  }

  private beginWhere(token: Token): Finding | Due {
    if (this.open.length > 0)
      return {
        message:
          '`where` gives names for the whole line and cannot stand inside brackets; a bracket is still open.',
        span: token,
      };
    if (this.where)
      return {
        message: 'A line has one `where`; further names follow after a comma.',
        span: token,
      };
    this.where = true;
    return this.local(token);
  }

  /** After `where`, or a comma behind it: a name, the sign `=`, and then a value. */
  private local(token: Token): Finding | Due {
    const [name, sign] = [this.next(), this.tokens[this.index + 2]];
    if (name?.kind !== 'name') {
      const kept = name !== undefined && /^\p{L}/u.test(name.text) && name.kind !== 'end';
      return {
        message: kept
          ? `\`${name.text}\` is ${describeWord(name.text)} and cannot be a local name; try \`${suggestMark(name.text)}\`.`
          : `After \`${token.text}\` a local name and its value were expected, as in \`where r = 5 mm\`.`,
        span: kept ? name : token,
      };
    }
    if (sign?.kind !== 'equals')
      return {
        message: `\`=\` and a value were expected after the local name \`${name.text}\`.`,
        span: sign === undefined || sign.kind === 'end' ? name : sign,
      };
    this.index += 2;
    return 'value';
  }

  private equals(token: Token): Finding {
    const decide = 'to decide whether two values are equal write `==`.';
    if (this.where)
      return {
        message: `Each local name has one \`=\`, and a comma stands before the next name; ${decide}`,
        span: token,
      };
    return {
      message: this.defines
        ? `A line has one \`=\`, after the mark that it defines; ${decide}`
        : `\`=\` defines a mark and needs a single name before it; ${decide}`,
      span: token,
    };
  }

  private relation(token: Token): Finding | Due {
    const inCall = this.open.at(-1)?.use === 'call';
    if (this.open.length > 0 && !inCall)
      return {
        message: `\`${token.text}\` compares whole sides of a line and cannot stand inside brackets.`,
        span: token,
      };
    if (this.where || (this.defines && !inCall))
      return {
        message: `A mark holds a value; \`${token.text}\` decides and needs a line of its own.`,
        span: token,
      };
    return 'value';
  }

  private unclosed(end: Token): Finding | null {
    const innermost = this.open.at(-1)?.token;
    if (innermost === undefined) return null;
    const message = `A \`${CLOSES[innermost.text] ?? ')'}\` is missing for the bracket opened at column ${innermost.from + 1}.`;
    return { message, span: { from: innermost.from, to: end.to } };
  }

  private foreign(token: Token, expected: string): Finding {
    if (token.kind === 'part sign') return partSign(token, this.previous());
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

function neverOpened(token: Token): Finding {
  return {
    message: `This \`${token.text}\` closes a bracket that was never opened.`,
    span: token,
  };
}

function mismatched(token: Token, opened: Token, expected: string): Finding {
  return {
    message: `\`${token.text}\` does not close the \`${opened.text}\` opened at column ${opened.from + 1}; \`${expected}\` was expected.`,
    span: token,
  };
}

/** `2,5` is meant as a decimal; `1,200` may as well be meant as a whole number. */
function decimalComma(before: string, after: string): string {
  const thousands = /^\d{3}$/.test(after) && /^\d{1,3}$/.test(before);
  return thousands
    ? `A comma stands neither in a decimal nor between thousands; write \`${before}.${after}\` or \`${before}${after}\`.`
    : `A decimal is written with a point: \`${before}.${after}\`.`;
}

function partSign(token: Token, before: Token | undefined): Finding {
  const minute = "'′’".includes(token.text);
  const [unit, name] = minute ? ['ft', 'feet'] : ['in', 'inches'];
  const example = `0° ${before?.kind === 'number' ? before.text : '30'}${minute ? '′' : '″'}`;
  const message = `\`${token.text}\` means ${minute ? 'minutes' : 'seconds'} of arc and stands only after degrees, as in \`${example}\`; write ${name} as \`${unit}\`.`;
  return { message, span: token };
}
