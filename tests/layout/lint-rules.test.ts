import { ESLint } from 'eslint';
import { beforeAll, describe, expect, test } from 'vitest';

const eslint = new ESLint({ overrideConfigFile: '.eslint.config.mjs' });

/** Ids of the rules that a text breaks when it stands in a file of the project. */
async function brokenRules(text: string, filePath: string): Promise<(string | null)[]> {
  const [result] = await eslint.lintText(text, { filePath });
  return (result?.messages ?? []).map(({ ruleId }) => ruleId);
}

/** Reading the whole project's types once takes most of the time. */
const TYPES_READ_MS = 180_000;

describe('lint rules', () => {
  beforeAll(async () => {
    await brokenRules('export {};\n', 'lib/env.ts');
  }, TYPES_READ_MS);

  const reading = 'export const url = process.env.DATABASE_URL;\n';

  test.each(['lib/access/can.ts', 'db/client.ts', 'proxy.ts', 'app/layout.tsx'])(
    '%s may not read the environment',
    async (file) => {
      expect(await brokenRules(reading, file)).toContain('no-restricted-properties');
      const imported =
        "import { env } from 'node:process';\nexport const url = env.DATABASE_URL;\n";
      expect(await brokenRules(imported, file)).toContain('no-restricted-imports');
    },
  );

  test('lib/env.ts may', async () => {
    expect(await brokenRules(reading, 'lib/env.ts')).toEqual([]);
  });

  test('a promise may not be left lying', async () => {
    const text = 'async function save(): Promise<void> {}\nsave();\n';
    expect(await brokenRules(text, 'lib/env.ts')).toContain(
      '@typescript-eslint/no-floating-promises',
    );
  });

  test('a test may not be left out', async () => {
    const leftOut = ['test', 'skip'].join('.');
    const text = `import { test } from 'vitest';\n${leftOut}('later', () => undefined);\n`;
    expect(await brokenRules(text, 'tests/layout/imports.test.ts')).toContain(
      'no-restricted-syntax',
    );
  });

  test('a rule may not be switched off in place', async () => {
    const comment = ['/* eslint', 'disable */'].join('-');
    expect(await brokenRules(`${comment}\n${reading}`, 'lib/access/can.ts')).toContain(
      'no-restricted-properties',
    );
  });
});
