import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { buildParserFile } from '@lezer/generator';
import { describe, expect, it } from 'vitest';
import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';
import { parser } from '@/lib/language/parser/cell.parser';

const read = (path: string) =>
  readFileSync(fileURLToPath(new URL(`../../lib/language/${path}`, import.meta.url)), 'utf8');

describe('the generated parser', () => {
  it('is what the generator makes of the grammar now', () => {
    const made = buildParserFile(read('cell.grammar'), {
      fileName: 'cell.grammar',
      moduleStyle: 'es',
      typeScript: true,
    });
    expect(read('parser/cell.parser.ts').trim()).toBe(made.parser.trim());
    expect(read('parser/cell.parser.terms.ts').trim()).toBe(made.terms.trim());
  });

  it('knows every word of the name tables by its class and takes no other word for one', () => {
    const nodesFor = (source: string) => {
      const names: string[] = [];
      parser.parse(source).iterate({ enter: ({ name }) => void names.push(name) });
      return names.join(' ');
    };
    for (const { name } of FUNCTIONS)
      expect(nodesFor(`${name}(1)`)).toBe(
        'Cell Call FunctionName Arguments OpenBracket Number CloseBracket',
      );
    for (const { name } of UNITS) expect(nodesFor(name)).toBe('Cell Unit UnitName');
    for (const { name } of CONSTANTS) expect(nodesFor(name)).toBe('Cell Constant ConstantName');
    for (const name of ['constructor', 'toString', 'hasOwnProperty', 'sinh', 'mmm']) {
      expect(nodesFor(name)).toBe('Cell Mark');
    }
  });
});
