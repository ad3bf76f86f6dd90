import { describe, expect, it } from 'vitest';
import { KnownValues } from '@/lib/evaluation/known-values';
import { OutcomeMemory, findOutcomes } from '@/lib/evaluation/outcomes';
import { type Outcome, evaluateSource } from '@/lib/language/index';

const outcome = (text: string): Outcome => ({
  kind: 'missing',
  typeset: text,
  name: 'a',
  use: 'mark',
  at: { from: 0, to: 1 },
});
const SIZE = JSON.stringify(outcome('12')).length;

function valueOf(source: string) {
  const { value } = evaluateSource(source, new Set(), null, () => null);
  if (value === null) throw new Error(`${source} has no value.`);
  return value;
}

describe('outcomes in memory', () => {
  it('are found as they were kept, and not where none was', () => {
    const memory = new OutcomeMemory(10_000);
    memory.keep('a', outcome('1'));
    expect(memory.find('a')).toEqual(outcome('1'));
    expect(memory.find('b')).toBeUndefined();
  });

  it('those not asked for longest are forgotten first', () => {
    const memory = new OutcomeMemory(10 * SIZE);
    for (const name of ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h', 'i', 'j', 'k']) {
      memory.keep(name, outcome('12'));
      memory.find('a');
    }
    expect(memory.find('a')).toBeDefined();
    expect(memory.find('b')).toBeUndefined();
    expect(memory.find('k')).toBeDefined();
  });

  it('one kept twice counts once, and none is kept that would fill an eighth of the memory', () => {
    const memory = new OutcomeMemory(10 * SIZE);
    for (let time = 0; time < 30; time += 1) memory.keep('a', outcome('12'));
    memory.keep('b', outcome('12'));
    memory.keep('large', outcome('x'.repeat(2 * SIZE)));
    expect(memory.find('a')).toBeDefined();
    expect(memory.find('b')).toBeDefined();
    expect(memory.find('large')).toBeUndefined();
  });
});

describe('finding outcomes', () => {
  it('asks the lasting store once, for what memory lacks, and remembers it', async () => {
    const memory = new OutcomeMemory(10_000);
    memory.keep('near', outcome('1'));
    const asked: (readonly string[])[] = [];
    const lasting = {
      read: (names: readonly string[]) => {
        asked.push(names);
        return Promise.resolve(new Map([['far', outcome('2')]]));
      },
      write: () => Promise.resolve(),
    };
    const names = new Set(['near', 'far', 'nowhere']);
    const found = await findOutcomes(names, memory, lasting);
    expect([...found.keys()].sort()).toEqual(['far', 'near']);
    await findOutcomes(new Set(['near', 'far']), memory, lasting);
    expect(asked).toEqual([['far', 'nowhere']]);
  });

  it('does without a store that does not answer', async () => {
    const broken = {
      read: () => Promise.reject(new Error('no database')),
      write: () => Promise.resolve(),
    };
    const found = await findOutcomes(new Set(['a']), new OutcomeMemory(10_000), broken);
    expect(found.size).toBe(0);
  });
});

describe('values known to a child', () => {
  it('include those of lines without a value, which is not the same as not being known', () => {
    const known = new KnownValues(10_000);
    known.keep('a', valueOf('a = sqrt(2)'));
    known.keep('b', null);
    expect(known.find('a')).toEqual(valueOf('a = sqrt(2)'));
    expect(known.find('b')).toBeNull();
    expect(known.find('c')).toBeUndefined();
  });

  it('stay within their size, however many are kept', () => {
    const known = new KnownValues(1_000);
    for (let k = 0; k < 500; k += 1) known.keep(`v${k}`, valueOf(`a = ${k} + sqrt(3)`));
    const left = Array.from({ length: 500 }, (_, k) => known.find(`v${k}`)).filter(Boolean);
    expect(left.length).toBeGreaterThan(0);
    expect(left.length).toBeLessThan(100);
    expect(known.find('v499')).toBeDefined();
  });
});
