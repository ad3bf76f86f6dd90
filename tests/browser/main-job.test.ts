import { readFile } from 'node:fs/promises';
import type { Download, Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { baseUrl } from '../setup/server';
import { IDA, useBrowser } from './support/browser';

const { newVisitor } = useBrowser();

async function download(page: Page, name: string): Promise<string> {
  const [file] = await Promise.all<Download | void>([
    page.waitForEvent('download'),
    page.getByRole('link', { name }).click(),
  ]);
  return readFile(await (file as Download).path(), 'utf8');
}

interface Exported {
  cells: { results?: { source: string; exact?: { text: string }; degree?: number }[] }[];
}

describe('the main job', () => {
  it('goes from an empty sheet to figures in the hands of a client', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    const sheet = await ida.beginNotebook('Eight-light oculus');

    await ida.write('dimension', 'R = 1200 mm');
    await ida.page.keyboard.press('Enter');
    await ida.page.keyboard.type('s = R sqrt(2 - sqrt(2))');
    await ida.page.keyboard.press('Enter');
    await ida.page.keyboard.type('s == R sqrt(2-sqrt(2))');
    await ida.write('note', '# Ring\nStruck from centre O, with $s$ stepped eight times.');
    await ida.write('dimension', 'sqrt(5+2*sqrt(6))');
    await ida.page.keyboard.press('Escape');

    const sum = ida.entry('sqrt(5+2*sqrt(6))');
    await sum
      .locator('annotation', { hasText: '\\sqrt{2}+\\sqrt{3}' })
      .waitFor({ state: 'attached' });
    expect(await sum.locator('math').textContent()).toContain('2+3');
    expect(await sum.locator('dl').innerText()).toMatch(
      /Degree\s*4\s*Reach\s*straightedge and compass/,
    );
    // The side of a regular octagon is 0.765366864730 of its radius (Machinery's Handbook 31, p. 82: 0.7654).
    expect(await ida.entry('s = R sqrt(2 - sqrt(2))').locator('dl').innerText()).toContain(
      '918.440237',
    );
    expect(await ida.entry('s == R sqrt(2-sqrt(2))').innerText()).toContain('true, exactly');
    await ida.page.getByRole('heading', { level: 2, name: 'Ring' }).waitFor();
    const index = ida.page.getByRole('navigation', { name: 'Index of the sheet' });
    await index.getByRole('link', { name: /^R\s*1200 mm/ }).waitFor();

    await ida.keep('first figures');
    await ida.page.getByText(/^Version \d+, kept$/).waitFor();

    await ida.page.getByRole('button', { name: 'Hand over' }).click();
    await ida.page.getByRole('button', { name: /^Issue a revision/ }).click();
    await ida.page.getByRole('button', { name: 'Issue revision A' }).click();
    await ida.page.waitForURL(/\/revisions\/A$/);

    await ida.open(sheet);
    await ida.page.getByRole('button', { name: 'Hand over' }).click();
    await ida.page.getByRole('button', { name: 'Client links' }).click();
    const dialog = ida.page.getByRole('dialog', { name: 'Client links' });
    await dialog.getByLabel('For whom').fill('The architect');
    await dialog.getByRole('button', { name: 'Make a link' }).click();
    const address = await dialog.getByText(/\/client\//).innerText();

    const client = await newVisitor();
    await client.page.goto(address);
    expect((await client.context.cookies()).filter(({ name }) => name.includes('session'))).toEqual(
      [],
    );
    const read = client.entry('sqrt(5+2*sqrt(6))');
    await read
      .locator('annotation', { hasText: '\\sqrt{2}+\\sqrt{3}' })
      .waitFor({ state: 'attached' });
    expect(await read.locator('dl').innerText()).toMatch(/Degree\s*4/);
    expect(await client.page.getByRole('textbox').count()).toBe(0);
    expect(await client.page.locator('meta[name=robots]').getAttribute('content')).toContain(
      'noindex',
    );

    const json = JSON.parse(await download(client.page, 'Export JSON')) as Exported;
    const results = json.cells.flatMap((cell) => cell.results ?? []);
    const exported = results.find((result) => result.source === 'sqrt(5+2*sqrt(6))');
    expect(exported).toMatchObject({ exact: { text: 'sqrt(2)+sqrt(3)' }, degree: 4 });
    const tex = await download(client.page, 'Export TeX');
    expect(tex).toMatch(/^\\documentclass/m);
    expect(tex).toContain('\\sqrt{2}+\\sqrt{3}');

    await ida.open('/settings');
    await ida.page.getByLabel('What for').fill('Saw in bay 2');
    await ida.page.getByRole('button', { name: 'Make a key' }).click();
    const key = await ida.page.getByText(/^swk_/).innerText();
    const answer = await fetch(`${baseUrl()}/api/evaluate`, {
      method: 'POST',
      headers: { authorization: `Bearer ${key}`, 'content-type': 'application/json' },
      body: JSON.stringify({ expression: 'sqrt(5+2*sqrt(6))' }),
    });
    const { result } = (await answer.json()) as {
      result: { exact: { text: string }; degree: number };
    };
    expect(result).toMatchObject({ exact: { text: 'sqrt(2)+sqrt(3)' }, degree: 4 });
    await ida.page.getByText('Copy the example').waitFor();
    expect(await ida.page.locator('.cm-content').innerText()).toContain(
      `${baseUrl()}/api/evaluate`,
    );

    await ida.open(sheet);
    await ida.page.getByRole('button', { name: 'Hand over' }).click();
    await ida.page.getByRole('button', { name: 'Client links' }).click();
    await ida.page.getByRole('button', { name: 'Revoke the link The architect' }).click();
    await ida.page.getByText('revoked').waitFor();
    expect((await client.page.goto(address))?.status()).toBe(404);
    expect(ida.complaints).toEqual([]);
  });

  it('lists versions, shows an old one as superseded and keeps it again as the newest', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    const address = await ida.beginNotebook('Versions of a ring');
    await ida.write('dimension', 'R = 100 mm');
    await ida.page.keyboard.press('Escape');
    await ida.keep('first');
    await ida.page.getByText('Version 2, kept').waitFor();
    await ida.page.getByText('R = 100 mm').click();
    await ida.page.keyboard.press('End');
    await ida.page.keyboard.type(' + 1 mm');
    await ida.keep('wider');
    await ida.page.getByText('Version 3, kept').waitFor();

    await ida.open(`${address}/versions`);
    expect(await ida.page.getByRole('row').count()).toBe(4);
    await ida.page.getByRole('link', { name: 'Version 2', exact: true }).click();
    await ida.page.getByText('Superseded').waitFor();
    await ida.page.waitForLoadState('networkidle');
    await ida.awaken();
    expect(await ida.page.getByText('R = 100 mm', { exact: true }).count()).toBe(1);
    await ida.page.getByRole('button', { name: 'Keep version 2 again' }).click();
    await ida.page.getByRole('dialog').getByRole('button', { name: 'Keep as version 4' }).click();
    await ida.page.getByText('Version 4, kept').waitFor();
    await ida.page.getByText('R = 100 mm', { exact: true }).waitFor();
    expect(ida.complaints).toEqual([]);
  });
});
