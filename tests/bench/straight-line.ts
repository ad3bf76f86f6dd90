/**
 * Straight-line programs, the one form in which every library is given the same task.
 *
 * A line `name = RPN` defines a value: integers, `+ - * /`, `S` principal square root, `I` the imaginary unit, `~` negation,
 * `Up/q` = e^(2πip/q), `Cp/q` = cos(πp/q), `$name` an earlier value. Any other line is a query: EQUAL a b, ZERO a, SIGN a,
 * MINPOLY a, SHOW a. What follows `#` is the answer expected.
 */

import { createEngine, type Engine, type Num } from '../../lib/engine/index';

export type Line =
  | { kind: 'value'; name: string; tokens: string[] }
  | { kind: 'query'; query: string; names: string[]; expected: string | null };

export function parseProgram(source: string): Line[] {
  const out: Line[] = [];
  for (const raw of source.split('\n')) {
    const [body, remark] = raw.split('#') as [string, string | undefined];
    const line = body.trim();
    if (line === '') continue;
    const at = line.indexOf(' = ');
    if (at > 0)
      out.push({ kind: 'value', name: line.slice(0, at), tokens: line.slice(at + 3).split(' ') });
    else {
      const [query, ...names] = line.split(' ') as [string, ...string[]];
      out.push({ kind: 'query', query, names, expected: remark?.trim() ?? null });
    }
  }
  return out;
}

/** Runs a program with a fresh engine; returns the answers in order and fails on an unexpected one. */
export function runProgram(program: readonly Line[]): string[] {
  const e = createEngine();
  const values = new Map<string, Num>();
  const answers: string[] = [];
  for (const line of program) {
    const outcome = e.attempt(() => {
      if (line.kind === 'value') values.set(line.name, evaluate(e, line.tokens, values));
      else {
        const answer = ask(
          e,
          line.query,
          line.names.map((n) => values.get(n) as Num),
        );
        if (line.expected !== null && line.expected !== answer) {
          throw new Error(
            `${line.query} ${line.names.join(' ')}: ${answer}, expected ${line.expected}`,
          );
        }
        answers.push(answer);
      }
    });
    if (outcome.kind !== 'value') throw new Error(outcome.message);
  }
  return answers;
}

function evaluate(e: Engine, tokens: readonly string[], values: Map<string, Num>): Num {
  const stack: Num[] = [];
  const pop = (): Num => stack.pop() as Num;
  for (const t of tokens) {
    if (t === '+' || t === '-' || t === '*' || t === '/') {
      const b = pop();
      const a = pop();
      stack.push(
        t === '+' ? e.add(a, b) : t === '-' ? e.sub(a, b) : t === '*' ? e.mul(a, b) : e.div(a, b),
      );
    } else if (t === '~') stack.push(e.neg(pop()));
    else if (t === 'S') stack.push(e.sqrt(pop()));
    else if (t === 'I') stack.push(e.i);
    else if (t.startsWith('$')) stack.push(values.get(t.slice(1)) as Num);
    else if (t.startsWith('U') || t.startsWith('C')) {
      const [p, q] = t.slice(1).split('/').map(BigInt) as [bigint, bigint];
      stack.push(t.startsWith('U') ? e.rootOfUnity(p, q) : e.cosTurn(p, 2n * q));
    } else stack.push(e.integer(t.length < 16 ? Number(t) : BigInt(t)));
  }
  return pop();
}

function ask(e: Engine, query: string, args: Num[]): string {
  const [a, b] = args as [Num, Num];
  if (query === 'EQUAL') return e.equal(a, b) ? '1' : '0';
  if (query === 'ZERO') return e.isZero(a) ? '1' : '0';
  if (query === 'SIGN') return String(e.sign(a));
  if (query === 'MINPOLY') return String(e.minimalPolynomial(a).length - 1);
  return e.write(a).text;
}
