import { describe, expect, it } from 'vitest';
import { evaluateCells } from '@/lib/language/index';
import {
  CONSTANTS,
  DEGREE_PARTS,
  FORMS,
  FUNCTIONS,
  GROUPS,
  UNITS,
  classOfWord,
} from '@/lib/language/names';

const WORDS = [...FUNCTIONS, ...UNITS, ...DEGREE_PARTS, ...CONSTANTS, ...FORMS];

describe('the table of words and forms', () => {
  it.each(WORDS.map(({ name, example }) => [name, example]))(
    'the example of %s evaluates without an error or a notice',
    (_, example) => {
      const [cell] = evaluateCells([{ id: 'example', source: example }], { digits: 12 });
      expect(cell?.results.length).toBeGreaterThan(0);
      for (const result of cell?.results ?? []) {
        expect(result.kind === 'error' ? result.error.message : '').toBe('');
        if (result.kind === 'truth') expect(result.truth.reason).toMatch(/^Both sides|^All/);
      }
    },
  );

  it('the example of a function calls it', () => {
    for (const { name, example } of FUNCTIONS) expect(example).toContain(`${name}(`);
  });

  it('the example of a unit or constant has it in it', () => {
    for (const { name, example } of [...UNITS, ...CONSTANTS])
      expect(` ${example} `).toMatch(new RegExp(`[^A-Za-z]${name}[^A-Za-z]`));
  });

  it('no name stands for two things, apart from minutes and seconds of arc', () => {
    const names = [...FUNCTIONS, ...UNITS, ...CONSTANTS].map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
    for (const { name } of DEGREE_PARTS) expect(classOfWord(name)).toBe('function');
  });

  it('every group of the reference has functions, and every function a group', () => {
    const used = new Set(FUNCTIONS.map(({ group }) => group));
    expect(GROUPS.map(({ name }) => name).filter((name) => !used.has(name))).toEqual([]);
    expect(GROUPS.length).toBe(used.size);
  });

  it('parameters that are explained stand in the signature', () => {
    for (const { signature, parameters } of FUNCTIONS)
      for (const name of Object.keys(parameters))
        expect(signature).toMatch(new RegExp(`[(, ]${name}[,)]`));
  });

  it('the number of arguments in the signature lies between the least and the most', () => {
    for (const { signature, least, most } of FUNCTIONS) {
      if (most === null) continue;
      const count = signature.split(',').length;
      expect(count).toBeGreaterThanOrEqual(least);
      expect(count).toBeLessThanOrEqual(most);
    }
  });
});
