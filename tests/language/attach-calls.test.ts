import { describe, expect, it } from 'vitest';
import { attachCalls } from '@/lib/language/attach-calls';
import { readLine } from '@/lib/language/read';
import { type Statement, marksReadBy } from '@/lib/language/syntax';
import { shapeOf } from './shape';

function read(source: string): Statement {
  const reading = readLine(source);
  if (reading.kind !== 'statement') throw new Error(`${source} was read as ${reading.kind}.`);
  return attachCalls(reading.statement, (name) => name === 'f' || name === 'g');
}

describe('a name of a function before a bracket', () => {
  it.each([
    ['f(3)', 'f<3>'],
    ['f (3)', 'f<3>'],
    ['R(3)', '(R . 3)'],
    ['2 f(3)', '(2 . f<3>)'],
    ['2f(3)', '(2 . f<3>)'],
    ['f(3)^2', '(f<3> ^ 2)'],
    ['f(3)²', '(f<3> ^ 2)'],
    ['R(3)^2', '(R . (3 ^ 2))'],
    ['√f(3)', '√f<3>'],
    ['√f(3)^2', '(√f<3> ^ 2)'],
    ['√√f(3)', '√√f<3>'],
    ['2^f(3)', '(2 ^ f<3>)'],
    ['2^f(3)^2', '(2 ^ (f<3> ^ 2))'],
    ['2^-f(3)', '(2 ^ (- f<3>))'],
    ['-f(3)', '(- f<3>)'],
    ['a*-f(3)', '(a * (- f<3>))'],
    ['a / f(3) b', '((a / f<3>) . b)'],
    ['f(3) g(4)', '(f<3> . g<4>)'],
    ['f(g(2))', 'f<g<2>>'],
    ['f(3)(4)', '(f<3> . 4)'],
    ['f(3)[2]', 'f<3>#2'],
    ['√f(3)[2]', '√f<3>#2'],
    ['f(3)[2]^2', '(f<3>#2 ^ 2)'],
    ['[f(1), R(2)]', '{f<1>, (R . 2)}'],
    ['L[f(1)]', 'L#f<1>'],
    ['sqrt(f(2))', 'sqrt(f<2>)'],
    ['f + 3', '(f + 3)'],
    ['3 f', '(3 . f)'],
    ['f(x) = g(x) + 1', 'f<x> = (g<x> + 1)'],
    ['f(1) == g(2)', 'f<1> == g<2>'],
    ['f(a) where a = g(2)', 'f<a> where a = g<2>'],
  ])('%s', (source, shape) => {
    expect(shapeOf(read(source))).toBe(shape);
  });

  it.each([
    ['h(f) = f(2)', 'h<f> = (f . 2)'],
    ['f(2) where f = 3', '(f . 2) where f = 3'],
    ['g(2) where f = 3, h = f(2)', 'g<2> where f = 3, h = (f . 2)'],
    ['each(f, 1, 3, f(2))', 'each<f: 1, 3, (f . 2)>'],
    ['each(f, 1, f(2), f(2))', 'each<f: 1, f<2>, (f . 2)>'],
  ])('stays a product where the name is a local one: %s', (source, shape) => {
    expect(shapeOf(read(source))).toBe(shape);
  });

  it('leaves a statement as it is where nothing changes', () => {
    const reading = readLine('2 R(3) + sqrt(R[2])');
    if (reading.kind !== 'statement') throw new Error(reading.kind);
    expect(attachCalls(reading.statement, () => false)).toBe(reading.statement);
  });
});

describe('what a statement reads', () => {
  it.each([
    ['f(a) + b', 'f a b'],
    ['h(a, b) = a + b + c', 'c'],
    ['v = r + s where r = s, s = r', 's'],
    ['r where r = r + 1', 'r'],
    ['each(k, k, n, k + w)', 'k n w'],
    ['root(x^2 - a, x)', 'a x'],
    ['each(k, 1, 2, f(k))', 'f'],
    ['h(a) = root(x - a, b)', 'b'],
    ['L[k]', 'L k'],
  ])('%s', (source, names) => {
    const reads = marksReadBy(read(source));
    expect(
      reads
        .map(({ name }) => name)
        .join(' ')
        .trim(),
    ).toBe(names);
  });
});
