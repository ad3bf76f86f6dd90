/** A small reader of plain expressions for tests: + − * / ^, sqrt(), cos(), sin(), tan() of parts of pi, i, pi only inside those, and staged text. */

import type { Engine, Num } from '../../lib/engine/index';

/** Evaluates an expression with the given engine; throws on anything it does not know. */
export function evaluateWith(e: Engine, source: string, names: Record<string, Num> = {}): Num {
  const marks = { ...names };
  const lines = source.split(';');
  for (const line of lines.slice(0, -1)) {
    const [name, body] = line.split('=') as [string, string];
    marks[name.trim()] = new Reader(e, body, marks).all();
  }
  return new Reader(e, lines.at(-1) as string, marks).all();
}

type Value = { num: Num; pi?: undefined } | { num?: undefined; pi: { n: bigint; d: bigint } };

class Reader {
  private at = 0;
  private readonly tokens: string[];

  constructor(
    private readonly e: Engine,
    source: string,
    private readonly marks: Record<string, Num>,
  ) {
    this.tokens = source.match(/\d+|[a-z]+\d*|[-+*/^()]/g) ?? [];
  }

  all(): Num {
    const v = this.sum();
    if (this.at !== this.tokens.length) throw new Error(`unexpected ${this.tokens[this.at]}`);
    return this.plain(v);
  }

  private take(token: string): boolean {
    if (this.tokens[this.at] !== token) return false;
    this.at++;
    return true;
  }

  private plain(v: Value): Num {
    if (v.num === undefined) throw new Error('pi outside an angle');
    return v.num;
  }

  private sum(): Value {
    let v = this.take('-') ? this.negate(this.product()) : this.product();
    for (;;) {
      if (this.take('+')) v = { num: this.e.add(this.plain(v), this.plain(this.product())) };
      else if (this.take('-')) v = { num: this.e.sub(this.plain(v), this.plain(this.product())) };
      else return v;
    }
  }

  private negate(v: Value): Value {
    return v.num
      ? { num: this.e.neg(v.num) }
      : { pi: { n: -(v.pi as { n: bigint }).n, d: (v.pi as { d: bigint }).d } };
  }

  private product(): Value {
    let v = this.power();
    for (;;) {
      if (this.take('*')) {
        const w = this.power();
        if (w.pi) v = { pi: { n: this.whole(v) * w.pi.n, d: w.pi.d } };
        else v = { num: this.e.mul(this.plain(v), this.plain(w)) };
      } else if (this.take('/')) {
        const w = this.power();
        if (v.pi) v = { pi: { n: v.pi.n, d: v.pi.d * this.whole(w) } };
        else v = { num: this.e.div(this.plain(v), this.plain(w)) };
      } else return v;
    }
  }

  private whole(v: Value): bigint {
    const r = this.e.asRational(this.plain(v));
    if (r === null || r.d !== 1n) throw new Error('a whole number was expected');
    return r.n;
  }

  private power(): Value {
    if (this.take('-')) return this.negate(this.power());
    const base = this.atom();
    if (!this.take('^')) return base;
    const exponent = this.e.asRational(this.plain(this.power()));
    if (exponent === null) throw new Error('an irrational power');
    let b = this.plain(base);
    if (exponent.d === 2n) b = this.e.sqrt(b);
    else if (exponent.d !== 1n) throw new Error('a power that is no square root');
    return { num: this.e.pow(b, exponent.n) };
  }

  private atom(): Value {
    const token = this.tokens[this.at++];
    if (token === undefined) throw new Error('the expression ends too early');
    if (token === '(') {
      const v = this.sum();
      if (!this.take(')')) throw new Error('a bracket is open');
      return v;
    }
    if (/^\d/.test(token)) return { num: this.e.integer(BigInt(token)) };
    if (token === 'i') return { num: this.e.i };
    if (token === 'pi') return { pi: { n: 1n, d: 1n } };
    const mark = this.marks[token];
    if (mark !== undefined) return { num: mark };
    const argument = this.atom();
    if (token === 'sqrt') return { num: this.e.sqrt(this.plain(argument)) };
    const { n, d } = argument.pi as { n: bigint; d: bigint };
    const cos = this.e.cosTurn(n, 2n * d);
    const sin = this.e.sinTurn(n, 2n * d);
    if (token === 'cos') return { num: cos };
    if (token === 'sin') return { num: sin };
    if (token === 'tan') return { num: this.e.div(sin, cos) };
    throw new Error(`unknown name ${token}`);
  }
}
