import { spawn } from 'node:child_process';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const program = fileURLToPath(new URL('../../lib/evaluation/evaluate.mjs', import.meta.url));
const root = fileURLToPath(new URL('../..', import.meta.url));

interface Answer {
  id?: string | number | null;
  result?: { kind: string; exact?: { text: string }; error?: { code: string } };
  cells?: { id: string; results: { kind: string }[] }[];
  problem?: { code: string; message: string };
}

/** Runs the program as `npm run -s evaluate` does, and gives all that it writes to standard output, line by line. */
async function run(lines: readonly string[]): Promise<{ answers: Answer[]; code: number | null }> {
  const child = spawn(process.execPath, [program], {
    cwd: root,
    stdio: ['pipe', 'pipe', 'inherit'],
  });
  const ended = new Promise<number | null>((resolve) => child.once('close', resolve));
  child.stdin.end(lines.map((line) => `${line}\n`).join(''));
  const answers: Answer[] = [];
  for await (const line of createInterface({ input: child.stdout }))
    answers.push(JSON.parse(line) as Answer);
  return { answers, code: await ended };
}

describe('the command line', () => {
  it('answers each request on one line, in order, good and bad', async () => {
    const { answers, code } = await run([
      JSON.stringify({ id: 'first', expression: 'sqrt(5+2*sqrt(6))' }),
      '',
      'not JSON',
      JSON.stringify({ id: 2, cells: [{ id: 'a', source: 'R = 2\nR + S' }] }),
      JSON.stringify({ id: 'bad', expression: '1', cells: [] }),
      JSON.stringify({ id: { not: 'an id' }, expression: '1' }),
      JSON.stringify([1]),
      JSON.stringify({ expression: '1/0' }),
      JSON.stringify({ id: 0, expression: '1', settings: { digits: -1 } }),
    ]);
    expect(code).toBe(0);
    expect(answers.map(({ id }) => id)).toEqual([
      'first',
      null,
      2,
      'bad',
      null,
      null,
      undefined,
      0,
    ]);
    expect(answers[0]).toMatchObject({
      schema: 1,
      result: { kind: 'number', exact: { text: 'sqrt(2)+sqrt(3)' } },
    });
    expect(answers[1]?.problem?.code).toBe('syntax');
    expect(answers[2]?.cells?.[0]?.results.map(({ kind }) => kind)).toEqual(['number', 'error']);
    expect(answers[3]?.problem).toEqual({
      code: 'bad-request',
      message: 'Either `expression` or `cells` was expected, and not both.',
    });
    expect(answers[6]?.result?.error?.code).toBe('division-by-zero');
    expect(answers[7]?.problem?.message).toContain('settings.digits');
  });

  it('answers a request while its input stays open', async () => {
    const child = spawn(process.execPath, [program], {
      cwd: root,
      stdio: ['pipe', 'pipe', 'inherit'],
    });
    const ended = new Promise((resolve) => child.once('close', resolve));
    const answers = createInterface({ input: child.stdout })[Symbol.asyncIterator]();
    for (const id of [1, 2]) {
      child.stdin.write(`${JSON.stringify({ id, expression: String(id) })}\n`);
      const { value } = (await answers.next()) as { value: string };
      expect(JSON.parse(value)).toMatchObject({ id, result: { exact: { text: String(id) } } });
    }
    child.stdin.end();
    await ended;
  });

  it('keeps the order when a slow request comes before quick ones', async () => {
    const slow = Array.from(
      { length: 6 },
      (_, index) => `sqrt(${[15, 33, 47, 17, 31, 46][index] ?? 2})`,
    ).join('+');
    const { answers } = await run(
      [slow, '1', '2', '3', '4', '5'].map((expression, id) => JSON.stringify({ id, expression })),
    );
    expect(answers.map(({ id }) => id)).toEqual([0, 1, 2, 3, 4, 5]);
    expect(answers.every(({ result }) => result?.kind === 'number')).toBe(true);
  });
});
