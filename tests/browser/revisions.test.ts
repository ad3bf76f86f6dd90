import { readFile } from 'node:fs/promises';
import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { baseUrl } from '../setup/server';
import { IDA, TAM, useBrowser } from './support/browser';

const { newVisitor } = useBrowser();

/** Opens one of the dialogs under “Hand over”. */
async function handOver(page: Page, name: string | RegExp) {
  await page.getByRole('button', { name: 'Hand over' }).click();
  await page.getByRole('button', { name }).click();
  return page.getByRole('dialog');
}

async function makeLink(page: Page, fields: Record<string, string>): Promise<string> {
  const dialog = await handOver(page, 'Client links');
  await dialog.getByText('Letters, last day, passphrase').click();
  for (const [label, value] of Object.entries(fields)) {
    await dialog.getByLabel(label, { exact: true }).fill(value);
  }
  await dialog.getByRole('button', { name: 'Make a link' }).click();
  const address = await dialog
    .getByRole('status')
    .getByText(/\/client\//)
    .innerText();
  await page.keyboard.press('Escape');
  return address;
}

describe('issuing in one browser and reading in another', () => {
  it('goes from a check to a client who has neither account nor script', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    const sheet = await ida.beginNotebook('Nine-light oculus');
    await ida.write('dimension', 'R = 1200 mm');
    await ida.page.keyboard.press('Enter');
    await ida.page.keyboard.type('bad = 1/0');
    await ida.page.keyboard.press('Escape');
    await ida.keep('first figures');
    await ida.page.getByText('Version 2, kept').waitFor();

    const added = await ida.context.request.post(`/api${new URL(sheet).pathname}/people`, {
      data: { email: TAM, role: 'editor' },
      headers: { origin: new URL(sheet).origin },
    });
    expect(added.status()).toBe(201);

    const address = await makeLink(ida.page, { 'For whom': 'The architect' });
    const client = await newVisitor({ javaScriptEnabled: false });
    const requests: string[] = [];
    client.page.on('request', (request) => requests.push(request.url()));
    expect((await client.page.goto(address))?.status()).toBe(200);
    await client.page.getByRole('heading', { name: 'Nothing has been issued yet' }).waitFor();

    const tam = await newVisitor();
    await tam.signIn(TAM);
    await tam.open(`${sheet}/versions/2`);
    await tam.page.getByRole('button', { name: 'I have checked version 2' }).click();
    await tam.page.getByLabel('Remark').fill('The fault is known.');
    await tam.page.getByRole('button', { name: 'I have checked it' }).click();
    await tam.page.getByText(/by Tam Orrowdale/).waitFor();
    await tam.open(`${sheet}/revisions`);
    expect(await tam.page.getByRole('button', { name: 'Issue a revision' }).count()).toBe(0);

    const issue = await handOver(ida.page, /^Issue a revision/);
    await issue.getByText('1 line has a fault').waitFor();
    await issue.getByLabel('Checked by').selectOption({ label: 'Tam Orrowdale' });
    await issue.getByLabel('Purpose').fill('for pricing');
    await issue.getByLabel('What is new').fill('Everything: it is the first.');
    await issue.getByRole('button', { name: 'Issue revision A' }).click();
    await ida.page.waitForURL(/\/revisions\/A$/);

    await client.page.goto(address);
    const text = await client.page.locator('main').innerText();
    for (const words of [
      'Revision A, for pricing',
      'checked by Tam Orrowdale',
      'Everything: it is the first.',
      'R = 1200 mm',
    ]) {
      expect(text).toContain(words);
    }
    expect(await client.page.locator('meta[name=robots]').getAttribute('content')).toContain(
      'noindex',
    );
    const [file] = await Promise.all([
      client.page.waitForEvent('download'),
      client.page.getByRole('link', { name: 'Marks as CSV' }).click(),
    ]);
    expect(await readFile(await file.path(), 'utf8')).toContain('R,length,1200,1200,mm');
    expect(new Set(requests.map((url) => new URL(url).origin))).toEqual(
      new Set([new URL(baseUrl()).origin]),
    );
    expect(await client.context.cookies()).toEqual([]);

    await ida.page.getByRole('button', { name: 'Work revision A out again' }).click();
    await ida.page.getByText('All equal').waitFor();
    expect([...ida.complaints, ...tam.complaints]).toEqual([]);
  });

  it('asks for the passphrase without a script, and ends at once when it is changed', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    const sheet = await ida.page
      .getByRole('link', { name: 'Seventeen-light window' })
      .getAttribute('href');
    await ida.open(String(sheet));
    const name = `Locked ${Date.now()}`;
    const address = await makeLink(ida.page, { 'For whom': name, Passphrase: 'lime and sand' });

    const client = await newVisitor({ javaScriptEnabled: false });
    const { page } = client;
    await page.goto(address);
    await page.getByLabel('Passphrase').fill('lime and salt');
    await page.getByRole('button', { name: 'Open the sheet' }).click();
    await page.getByText('This is not the passphrase of the link.').waitFor();
    await page.getByLabel('Passphrase').fill('lime and sand');
    await page.getByRole('button', { name: 'Open the sheet' }).click();
    await page.getByRole('heading', { level: 1, name: 'Seventeen-light window' }).waitFor();

    const dialog = await handOver(ida.page, 'Client links');
    await dialog.getByRole('button', { name: `More about the link ${name}` }).click();
    await dialog.getByText(address).waitFor();
    await dialog.getByLabel('Another passphrase').fill('sand and lime');
    await dialog.getByRole('button', { name: 'Change' }).click();
    await dialog.getByText('The passphrase is changed.').waitFor();
    await page.goto(address);
    await page.getByLabel('Passphrase').waitFor();

    await dialog.getByRole('button', { name: `Revoke the link ${name}` }).click();
    await dialog.getByText('revoked').first().waitFor();
    expect((await page.goto(address))?.status()).toBe(404);
    expect(ida.complaints).toEqual([]);
  });
});
