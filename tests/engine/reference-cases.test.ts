import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createEngine, type Decimal, type Engine } from '../../lib/engine/index';
import { evaluateWith } from './expression';

interface Case {
  id: string;
  expression: string;
  rhs?: string;
  equal?: boolean;
  zero?: boolean;
  sign?: number;
  value?: string;
  imaginary?: string;
  degree?: number;
  minimalPolynomial?: string[] | null;
  error?: string;
  source: string;
}

const file = new URL('../reference/engine-cases.json', import.meta.url);
const { cases } = JSON.parse(readFileSync(file, 'utf8')) as { cases: Case[] };

/** Runs `check` inside an attempt and fails unless it ends in a value. */
function inside(check: (e: Engine) => void): void {
  const e = createEngine();
  const outcome = e.attempt(() => {
    check(e);
  });
  expect(outcome.kind).toBe('value');
}

/** The reference gives 60 digits padded with zeros. */
function sameDecimal(ours: string, theirs: string): void {
  const strip = (s: string): string =>
    s.includes('.') && !s.includes('e') ? s.replace(/\.?0+$/, '') : s;
  const [m, x] = theirs.split('e') as [string, string | undefined];
  const [n, y] = ours.split('e') as [string, string | undefined];
  expect(strip(n)).toBe(strip(m));
  expect(Number(y ?? 0)).toBe(Number(x ?? 0));
}

describe('values computed by other programs', () => {
  it.each(cases.filter((c) => c.error === undefined))('$id $expression', (c) => {
    inside((e) => {
      const v = evaluateWith(e, c.expression);
      if (c.value !== undefined && !c.value.includes('e')) sameParts(e.decimal(v, 60), c);
      if (c.sign !== undefined && e.isReal(v)) expect(e.sign(v)).toBe(c.sign);
      if (c.zero !== undefined) expect(e.isZero(v)).toBe(c.zero);
      if (c.degree !== undefined) expect(e.degree(v)).toBe(c.degree);
      if (c.minimalPolynomial)
        expect(e.minimalPolynomial(v).join()).toBe(c.minimalPolynomial.join());
      const text = e.write(v).text;
      expect(e.equal(evaluateWith(e, text), v)).toBe(true);
      if (c.rhs !== undefined) {
        const right = evaluateWith(e, c.rhs);
        expect(e.equal(v, right)).toBe(c.equal);
        expect(e.write(right).text === text).toBe(c.equal);
      }
    });
  });

  it.each(cases.filter((c) => c.error !== undefined))('$id divides by an exact zero', (c) => {
    const e = createEngine();
    expect(e.attempt(() => evaluateWith(e, c.expression))).toMatchObject({
      kind: 'outside-domain',
      code: 'division-by-zero',
    });
  });
});

function sameParts(d: Decimal, c: Case): void {
  if (d.re !== '0') sameDecimal(d.re, c.value as string);
  if (c.imaginary !== undefined && d.im !== null) sameDecimal(d.im, c.imaginary);
}
