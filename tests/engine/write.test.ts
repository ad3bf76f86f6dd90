import { describe, expect, it } from 'vitest';
import { createEngine } from '../../lib/engine/index';
import { evaluateWith } from './expression';

/** Expression, its text, its TeX. Common practice: integers pulled out, one denominator, positive term first, lowest nesting. */
const WRITTEN: [string, string, string][] = [
  ['0', '0', '0'],
  ['-3/4', '-3/4', '-\\frac{3}{4}'],
  ['sqrt(12)', '2*sqrt(3)', '2\\sqrt{3}'],
  ['1/sqrt(2)', 'sqrt(2)/2', '\\frac{\\sqrt{2}}{2}'],
  ['(1+sqrt(5))/2', '(1+sqrt(5))/2', '\\frac{1+\\sqrt{5}}{2}'],
  ['(sqrt(6)-sqrt(2))/4', '(sqrt(6)-sqrt(2))/4', '\\frac{\\sqrt{6}-\\sqrt{2}}{4}'],
  ['sqrt(2)*sqrt(3)', 'sqrt(6)', '\\sqrt{6}'],
  ['sqrt(5+2*sqrt(6))', 'sqrt(2)+sqrt(3)', '\\sqrt{2}+\\sqrt{3}'],
  ['sqrt(2+sqrt(2+sqrt(2)))', 'sqrt(2+sqrt(2+sqrt(2)))', '\\sqrt{2+\\sqrt{2+\\sqrt{2}}}'],
  ['sqrt((1+sqrt(5))/2)', 'sqrt(2+2*sqrt(5))/2', '\\frac{\\sqrt{2+2\\sqrt{5}}}{2}'],
  ['-1/2-sqrt(2)/2', '-(1+sqrt(2))/2', '-\\frac{1+\\sqrt{2}}{2}'],
  ['-sqrt(2)-sqrt(3)', '-sqrt(2)-sqrt(3)', '-\\sqrt{2}-\\sqrt{3}'],
  [
    'sqrt(1+sqrt(2))*sqrt(1+sqrt(3))',
    'sqrt(1+sqrt(2)+sqrt(3)+sqrt(6))',
    '\\sqrt{1+\\sqrt{2}+\\sqrt{3}+\\sqrt{6}}',
  ],
  ['sqrt(-2)', 'i*sqrt(2)', 'i \\sqrt{2}'],
  ['i/2', 'i/2', '\\frac{i}{2}'],
  ['3-2*i', '3-2*i', '3-2i'],
  ['(-1+i*sqrt(3))/2', '(-1+i*sqrt(3))/2', '\\frac{-1+i \\sqrt{3}}{2}'],
  ['sqrt(1+i)', 'sqrt(1+i)', '\\sqrt{1+i}'],
  ['sqrt(1+sqrt(1+sqrt(1+i)))', 'sqrt(1+sqrt(1+sqrt(1+i)))', '\\sqrt{1+\\sqrt{1+\\sqrt{1+i}}}'],
  ['-sqrt(1-i)/2', '-sqrt(1-i)/2', '-\\frac{\\sqrt{1-i}}{2}'],
];

/** Nests that can be written lower, after Borodin, Fagin, Hopcroft and Tompa (1985) and Shanks (1974). */
const LOWER: [string, string][] = [
  ['sqrt(10+2*sqrt(6)+2*sqrt(10)+2*sqrt(15))', 'sqrt(2)+sqrt(3)+sqrt(5)'],
  ['sqrt(16-2*sqrt(29)+2*sqrt(55-10*sqrt(29)))', 'sqrt(5)+sqrt(11-2*sqrt(29))'],
  ['sqrt(8+2*sqrt(10+2*sqrt(5)))', '(sqrt(2)+sqrt(10)+2*sqrt(5-sqrt(5)))/2'],
  ['sqrt(2+2*sqrt(2+sqrt(3)))', 'sqrt(2+sqrt(2)+sqrt(6))'],
  ['sqrt(1+2*sqrt(1+3*sqrt(1+4*sqrt(1+5*sqrt(1+6*8)))))', '3'],
  ['sqrt(3*sqrt(3)+2*sqrt(6))', 'sqrt(3*sqrt(3)+2*sqrt(6))'],
];

describe('values in writing', () => {
  it.each(WRITTEN)('%s is written %s', (source, text, tex) => {
    const e = createEngine();
    expect(e.write(evaluateWith(e, source))).toEqual({ text, tex, staged: false });
  });

  it.each(LOWER)('%s is written %s', (source, text) => {
    const e = createEngine();
    expect(e.write(evaluateWith(e, source)).text).toBe(text);
  });

  it('the fourth-root form keeps the tower simple, and both ways of writing it agree', () => {
    const e = createEngine();
    const a = evaluateWith(e, 'sqrt(3*sqrt(3)+2*sqrt(6))');
    const b = evaluateWith(e, 'sqrt(sqrt(3))*(1+sqrt(2))');
    expect(e.equal(a, b)).toBe(true);
    expect(e.write(a)).toEqual(e.write(b));
  });

  it('a value too wide to read is staged, and its text parses back', () => {
    const e = createEngine();
    for (const v of [
      e.cosTurn(3n, 257n),
      evaluateWith(e, '1/(sqrt(1+sqrt(2))+sqrt(1+sqrt(3))+sqrt(1+sqrt(5)))'),
    ]) {
      const w = e.write(v);
      expect(w.staged).toBe(true);
      expect(w.text).toMatch(/^r1 = sqrt\(\d+\); r2 = /);
      expect(w.tex).toMatch(/^\\begin\{gathered\}r_\{1\}=\\sqrt/);
      expect(e.equal(evaluateWith(e, w.text), v)).toBe(true);
    }
  });

  it('lists the roots of the tower, lowest first and no more than the degree asks', () => {
    const e = createEngine();
    const tower = (s: string): string[] =>
      (e.tower(evaluateWith(e, s)) ?? []).map((t) => `${t.name} ${t.radicand}`);
    expect(tower('3/4')).toEqual([]);
    expect(tower('sqrt(6)')).toEqual(['r1 6']);
    expect(tower('sqrt(2)+sqrt(3)+sqrt(6)')).toEqual(['r1 2', 'r2 3']);
    expect(tower('sqrt(3)+sqrt(1+sqrt(2))')).toEqual(['r1 3', 'r2 2', 'r3 1+sqrt(2)']);
    expect(tower('sqrt(1+i)')).toEqual(['r1 -1', 'r2 1+i']);
    expect(tower('sqrt(11+2*sqrt(29))+sqrt(16-2*sqrt(29)+2*sqrt(55-10*sqrt(29)))')).toEqual([
      'r1 5',
      'r2 22+2*sqrt(5)',
    ]);
  });
});
