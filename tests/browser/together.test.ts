import { describe, expect, it } from 'vitest';
import type { NotebookContent } from '@/lib/notebooks/content';
import { baseUrl } from '../setup/server';
import { IDA, TAM, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();

const content = (...sources: string[]): NotebookContent => ({
  format: 1,
  settings: { digits: 30, unit: 'mm', step: '1 mm', rounding: 'half-even' },
  cells: sources.map((source, at) => ({ id: `c${at}`, kind: 'dimension', source })),
});

/** A notebook of Ida's on which Tam is an editor, open in both browsers. */
async function twoAtOne(...sources: string[]) {
  const [ida, tam] = [await newVisitor(), await newVisitor()];
  await ida.signIn(IDA);
  await tam.signIn(TAM);
  const headers = { origin: baseUrl().replace(/\/$/, '') };
  const post = (path: string, data: unknown) => ida.page.request.post(path, { headers, data });
  const made = await post('/api/notebooks', { title: 'Two hands', content: content(...sources) });
  const { id } = (await made.json()) as { id: string };
  await post(`/api/notebooks/${id}/people`, { email: TAM, role: 'editor' });
  await ida.open(`/notebooks/${id}`);
  await tam.open(`/notebooks/${id}`);
  const patch = (data: unknown) =>
    ida.page.request.patch(`/api/notebooks/${id}`, { headers, data });
  return { id, ida, tam, patch, headers };
}

/** Opens a line at its end and types on. */
async function writeOn({ page }: Visitor, source: string, text: string) {
  await page.getByText(source, { exact: true }).first().click();
  await page.locator('.cm-content').waitFor();
  await page.keyboard.press('End');
  await page.keyboard.type(text);
}

const shows = ({ page }: Visitor, source: string) =>
  page.getByText(source, { exact: true }).first().waitFor({ timeout: 20_000 });

describe('two people on one sheet', () => {
  it('see each other, and what the other wrote in another cell, without a press of any button', async () => {
    const { id, ida, tam } = await twoAtOne('R = 1200 mm', 'n = 8', 's = R/n');
    await ida.page.getByRole('list', { name: 'Here now' }).getByText('TO').waitFor();
    await tam.page.getByRole('list', { name: 'Here now' }).waitFor();

    await writeOn(ida, 'R = 1200 mm', ' + 1 mm');
    await writeOn(tam, 'n = 8', ' + 1');
    await ida.page.getByText(/^Saved as version [23]$/).waitFor();
    const saved = Date.now();
    await shows(tam, 'R = 1200 mm + 1 mm');
    expect(Date.now() - saved).toBeLessThan(12_000);
    await shows(ida, 'n = 8 + 1');
    // The line in hand stays open with its cursor, and goes on.
    await ida.page.keyboard.type(' + 2 mm');
    await expect.poll(() => ida.editor().innerText()).toBe('R = 1200 mm + 1 mm + 2 mm');
    await shows(tam, 'R = 1200 mm + 1 mm + 2 mm');
    expect(await tam.editor().innerText()).toBe('n = 8 + 1');

    await ida.page.keyboard.press('Escape');
    await ida.page.keyboard.press('Control+z');
    await shows(ida, 'R = 1200 mm + 1 mm');
    await shows(ida, 'n = 8 + 1');
    await tam.open(`/notebooks/${id}/versions`);
    await tam.page
      .getByText(/changed n from 8 to 8 \+ 1/)
      .first()
      .waitFor();
    expect([...ida.complaints, ...tam.complaints]).toEqual([]);
  });

  it('who write the same line are asked with both texts and results, and what is chosen is saved', async () => {
    const { id, ida, tam } = await twoAtOne('R = 1200 mm', 'n = 8');
    await Promise.all([
      writeOn(ida, 'R = 1200 mm', ' + 300 mm'),
      writeOn(tam, 'R = 1200 mm', ' + 20 mm'),
    ]);
    const asked = async (visitor: Visitor) =>
      visitor.page.getByRole('button', { name: 'Compare and choose' }).isVisible();
    await expect
      .poll(async () => (await asked(ida)) || (await asked(tam)), { timeout: 20_000 })
      .toBe(true);
    const [late, other] = (await asked(ida)) ? [ida, tam] : [tam, ida];
    const own = late === ida ? 'R = 1200 mm + 300 mm' : 'R = 1200 mm + 20 mm';
    const theirs = late === ida ? 'R = 1200 mm + 20 mm' : 'R = 1200 mm + 300 mm';
    expect(await late.editor().innerText()).toBe(own);

    // Other work is saved meanwhile, and the question is not.
    await writeOn(late, 'n = 8', ' + 1');
    await shows(other, 'n = 8 + 1');
    await shows(other, theirs);

    await late.page.reload();
    await late.awaken();
    await shows(late, own);
    await late.page.getByRole('button', { name: 'Compare and choose' }).click();
    const dialog = late.page.getByRole('dialog', { name: /changed the same in version/ });
    await dialog.getByText(own, { exact: true }).waitFor();
    await dialog.getByText(theirs, { exact: true }).waitFor();
    await dialog.getByText(/1500 mm/).waitFor();
    await dialog.getByText(/1220 mm/).waitFor();
    await dialog.getByRole('button', { name: 'Save what is chosen' }).click();
    await shows(other, own);
    await late.page.getByText(/^Saved as version \d+$/).waitFor();
    const { versions } = (await (
      await late.page.request.get(`/api/notebooks/${id}/versions`)
    ).json()) as { versions: { number: number }[] };
    const texts = await Promise.all(
      versions.map(async ({ number }) =>
        (await late.page.request.get(`/api/notebooks/${id}/versions/${number}`)).text(),
      ),
    );
    expect(texts.some((text) => text.includes(theirs))).toBe(true);
    expect(texts[0]).toContain(own);
  });
});

describe('a sheet that cannot be saved', () => {
  it('whose notebook is archived meanwhile says why, and the text stays', async () => {
    const { tam, patch } = await twoAtOne('R = 1200 mm');
    await patch({ archived: true });
    await writeOn(tam, 'R = 1200 mm', ' + 5 mm');
    await tam.page.getByText(/Not saved: This notebook is archived/).waitFor();
    expect(await tam.editor().innerText()).toBe('R = 1200 mm + 5 mm');
    await tam.page.reload();
    await shows(tam, 'R = 1200 mm');
  });

  it('whose person has lost the role says so in a sentence, and the text stays', async () => {
    const { id, ida, tam, headers } = await twoAtOne('R = 1200 mm');
    const { people } = (await (
      await ida.page.request.get(`/api/notebooks/${id}/people`)
    ).json()) as { people: { id: string; email: string }[] };
    const person = people.find(({ email }) => email === TAM);
    await ida.page.request.delete(`/api/notebooks/${id}/people/${person?.id}`, { headers });
    await writeOn(tam, 'R = 1200 mm', ' + 5 mm');
    await tam.page.getByText(/Not saved: There is no such notebook/).waitFor();
    expect(await tam.editor().innerText()).toBe('R = 1200 mm + 5 mm');
  });

  it('is saved by itself when the connection is back, once', async () => {
    const { id, ida } = await twoAtOne('R = 1200 mm');
    await ida.page.route('**/versions', (route) => route.abort());
    await writeOn(ida, 'R = 1200 mm', ' + 5 mm');
    await ida.page.getByText(/it is tried again/).waitFor();
    await ida.page.unroute('**/versions');
    await ida.page.getByText('Saved as version 2').waitFor();
    const list = await ida.page.request.get(`/api/notebooks/${id}/versions`);
    expect(((await list.json()) as { versions: unknown[] }).versions).toHaveLength(2);
  });
});

describe('coming back', () => {
  it('one reads what the others changed since one looked, until it is dismissed', async () => {
    const { id, ida, tam } = await twoAtOne('R = 1200 mm', 's = R/8', 't = s/2');
    await ida.page.waitForTimeout(3_500);
    await ida.open('/notebooks');
    await writeOn(tam, 'R = 1200 mm', ' - 50 mm');
    await tam.page.getByText('Saved as version 2').waitFor();
    await ida.open(`/notebooks/${id}`);
    await ida.page
      .getByText(
        'Since you looked (version 1): Tam Orrowdale changed R from 1200 mm to 1200 mm - 50 mm; 2 values follow.',
      )
      .waitFor();
    await ida.page.getByRole('link', { name: 'Compare' }).click();
    await ida.page.getByRole('heading', { name: 'Version 1 and version 2' }).waitFor();
    await ida.page.getByText('cut 50 mm less').waitFor();
    await ida.page.getByText('written alike; its values follow').first().waitFor();
    await ida.page.goBack();
    await ida.page.getByRole('button', { name: 'Seen' }).click();
    await ida.page.getByText('Since you looked').waitFor({ state: 'detached' });
  });
});
