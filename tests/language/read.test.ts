import { describe, expect, it } from 'vitest';
import { LANGUAGE_LIMITS } from '@/lib/language/limits';
import { parser } from '@/lib/language/parser/cell.parser';
import { readLine } from '@/lib/language/read';
import { readCases } from './cases';
import { shapeOf } from './shape';

describe('lines that parse', () => {
  it.each(readCases('accept.txt'))('%s', (source, shape) => {
    const reading = readLine(source);
    expect(reading.kind === 'statement' ? shapeOf(reading.statement) : reading).toBe(shape);
  });
});

describe('lines that do not parse', () => {
  it.each(readCases('reject.txt'))('%s', (source, expected) => {
    const reading = readLine(source);
    if (reading.kind !== 'problem') throw new Error(`The line was read as ${reading.kind}.`);
    const { code, from, to, message } = reading.problem;
    expect(`${from}-${to} ${message}`).toBe(expected);
    expect(code).toBe('syntax');
  });
});

describe('the editor recovers', () => {
  it.each(readCases('recover.txt'))('%s', (cell, expected) => {
    const source = cell.replaceAll('|', '\n');
    const seen: string[] = [];
    for (
      let node = parser.parse(source).topNode.firstChild;
      node !== null;
      node = node.nextSibling
    ) {
      if (node.name === 'Remark') continue;
      let broken = false;
      node.toTree().iterate({ enter: ({ type }) => void (broken ||= type.isError) });
      if (node.type.isError && seen.length > 0 && !source.slice(0, node.from).endsWith('\n'))
        seen[seen.length - 1] = `${(seen.at(-1) ?? '').replace('!', '')}!`;
      else seen.push(node.type.isError ? '!' : `${node.name}${broken ? '!' : ''}`);
    }
    expect(seen.join(' ')).toBe(expected);
  });
});

describe('readLine', () => {
  it('takes blank lines and remarks for nothing', () => {
    for (const source of ['', '   ', '# remark', '  # R = 2', '\t'])
      expect(readLine(source).kind).toBe('blank');
  });

  it('accepts the deepest nesting that is allowed and names the limit one level further', () => {
    const nested = (depth: number) => readLine('('.repeat(depth) + '1' + ')'.repeat(depth));
    expect(nested(LANGUAGE_LIMITS.nesting).kind).toBe('statement');
    const beyond = nested(LANGUAGE_LIMITS.nesting + 1);
    expect(beyond).toMatchObject({ kind: 'problem', problem: { code: 'limit-size' } });
    expect(beyond.kind === 'problem' && beyond.problem.message).toContain(
      'nested 201 deep; the limit is 200',
    );
  });

  it.each([
    ['brackets', '('.repeat(5000) + '1' + ')'.repeat(5000), 5000],
    ['signs', '-'.repeat(5000) + '1', 201],
    ['roots', '√'.repeat(5000) + '1', 201],
    ['powers', '2^'.repeat(5000) + '1', 201],
    ['calls', 'sqrt('.repeat(3000) + '1' + ')'.repeat(3000), 3000],
  ])('answers %s nested thousands deep with limit-size', (_, source, least) => {
    const reading = readLine(source);
    if (reading.kind !== 'problem') throw new Error(`The line was read as ${reading.kind}.`);
    expect(reading.problem.code).toBe('limit-size');
    expect(Number(/nested (\d+) deep/.exec(reading.problem.message)?.[1])).toBeGreaterThanOrEqual(
      least,
    );
  });

  it('reads a flat sum of ten thousand terms', () => {
    const reading = readLine(Array(10_000).fill('1').join('+'));
    expect(
      reading.kind === 'statement' &&
        reading.statement.kind === 'value' &&
        reading.statement.value.kind === 'sum' &&
        reading.statement.value.terms.length,
    ).toBe(10_000);
  });

  it('names the limit on the length of a line and the place where it is passed', () => {
    const source = 'R'.padEnd(LANGUAGE_LIMITS.lineLength + 5, '+');
    expect(readLine(source)).toMatchObject({
      kind: 'problem',
      problem: { code: 'limit-size', from: 20_000, to: 20_005 },
    });
  });

  it('never throws and keeps its places within the line, whatever the characters', () => {
    const characters = [
      '(',
      ')',
      '+',
      '*',
      '^',
      '²',
      '√',
      '=',
      '==',
      '<',
      ',',
      '1',
      '.5',
      'R',
      'mm',
      'sqrt',
      'π',
      '°',
      '#',
      '@',
      '\u0000',
      '𝟙',
      ' ',
      '[',
      ']',
      '/',
      "'",
      '"',
      'ft',
      'in',
      ' where ',
    ];
    for (let first = 0; first < characters.length; first += 1)
      for (let second = 0; second < characters.length; second += 1)
        for (let third = 0; third < characters.length; third += 1) {
          const source = `${characters[first] ?? ''}${characters[second] ?? ''}${characters[third] ?? ''}`;
          const reading = readLine(source);
          if (reading.kind !== 'problem') continue;
          const { from, to, message } = reading.problem;
          if (
            !(0 <= from && from < to && to <= source.length) ||
            message.includes('cannot be read')
          )
            throw new Error(`${JSON.stringify(source)}: ${from}-${to} ${message}`);
        }
  });
});
