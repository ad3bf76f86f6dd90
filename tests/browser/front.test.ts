import { describe, expect, it } from 'vitest';
import { useBrowser } from './support/browser';

const { newVisitor } = useBrowser();
const from = (address: string) => ({ extraHTTPHeaders: { 'x-forwarded-for': address } });

describe('the live cell of the front page', () => {
  it('shows what a visitor writes as an entry of the sheet', async () => {
    const visitor = await newVisitor(from('198.19.0.1'));
    const { page } = visitor;
    await visitor.open('/');
    await page.getByRole('heading', { level: 1 }).waitFor();
    await visitor.editor().click();
    await page.keyboard.press('ControlOrMeta+A');
    await page.keyboard.type('p = 2*1500 mm sin(turn/34)');
    const entry = page.locator('[data-row]');
    // The pitch of seventeen lights on a radius of 1500 mm is 551.248553450 mm.
    await entry.getByText('551.24855', { exact: false }).waitFor();
    await entry.getByText('551 mm').waitFor();
    expect(await entry.count()).toBe(1);
    await page.keyboard.type(' + 3 deg');
    await entry.locator('[data-fault]').waitFor();
    expect(await page.getByRole('group', { name: 'Last good value' }).count()).toBe(1);
    expect(visitor.complaints).toEqual([]);
  });

  it('takes a sample with one press, by keyboard too', async () => {
    const visitor = await newVisitor(from('198.19.0.2'));
    const { page } = visitor;
    await visitor.open('/');
    await visitor.editor().waitFor();
    await page.getByRole('link', { name: 'Roots that fold' }).focus();
    await page.keyboard.press('Enter');
    await page
      .locator('annotation', { hasText: '\\sqrt{2}+\\sqrt{3}' })
      .waitFor({ state: 'attached' });
    expect(await visitor.editor().innerText()).toBe('sqrt(5 + 2 sqrt(6))');
    expect(new URL(page.url()).search).toBe('');
  });

  it('can be left with the Tab key', async () => {
    const visitor = await newVisitor(from('198.19.0.3'));
    await visitor.open('/');
    await visitor.editor().click();
    await visitor.page.keyboard.press('Tab');
    await visitor.page.keyboard.press('Tab');
    expect(await visitor.editor().evaluate((node) => node.contains(document.activeElement))).toBe(
      false,
    );
  });

  it('says that no answer came and keeps what was written and the last figures', async () => {
    const visitor = await newVisitor(from('198.19.0.4'));
    const { page } = visitor;
    await visitor.open('/');
    await page.route('**/api/try', (route) => route.abort());
    await visitor.editor().click();
    await page.keyboard.press('ControlOrMeta+End');
    await page.keyboard.press('Enter');
    await page.keyboard.type('t = 2 s');
    await page.getByRole('alert').getByText('No answer came from the server').waitFor();
    expect(await visitor.editor().innerText()).toContain('t = 2 s');
    expect(await page.locator('[data-row]').count()).toBe(3);
  });

  it('works without scripts, by its form', async () => {
    const visitor = await newVisitor({ ...from('198.19.0.5'), javaScriptEnabled: false });
    const { page } = visitor;
    await page.goto('/');
    await page.getByLabel('Lines to work out').fill('c = chord(450 mm, turn/6)');
    await page.getByRole('button', { name: 'Work it out' }).click();
    await page.locator('[data-row]').getByText('450 mm').first().waitFor();
    expect(await page.locator('[data-row]').count()).toBe(1);
  });
});
