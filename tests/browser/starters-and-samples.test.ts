import { describe, expect, it } from 'vitest';
import { IDA, useBrowser } from './support/browser';

const { newVisitor } = useBrowser();

describe('a starter', () => {
  it('makes a notebook whose figures all come out', async () => {
    const ida = await newVisitor();
    const { page } = ida;
    await ida.signIn(IDA);
    await page.getByRole('button', { name: 'New notebook' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('Title').fill('Court from a starter');
    await dialog.getByRole('radio', { name: 'A pavement field' }).check();
    await dialog.getByRole('button', { name: 'Begin' }).click();
    await page.waitForURL(/\/notebooks\/[^/]+$/);
    // The outer edge of fifteen slabs on a radius of 6000 mm is 2494.94028981 mm.
    await ida.entry('a4 = chord(R4, part)').getByText('2494.9 mm').waitFor();
    await page.getByRole('heading', { level: 2, name: 'Closing' }).waitFor();
    expect(await page.locator('[data-fault]').count()).toBe(0);
    await page.getByText('Version 1, kept').waitFor();
    expect(ida.complaints).toEqual([]);
  });
});

describe('a sample of the reference', () => {
  it('goes as a new version into the notebook that is chosen, and the next press goes there too', async () => {
    const ida = await newVisitor();
    const { page } = ida;
    await ida.signIn(IDA);
    const address = await ida.beginNotebook('Samples put in');
    await ida.open('/help');
    await page.getByLabel('Look for').fill('sagitta');
    await page.getByRole('button', { name: 'Put sagitta(R, angle) into my notebook' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('Notebook').selectOption({ label: 'Samples put in' });
    await dialog.getByRole('button', { name: 'Put it in' }).click();
    await page.getByText('On “Samples put in” as version 2.').waitFor();
    await page.getByLabel('Look for').fill('versine');
    await page.getByRole('button', { name: 'Put versine(angle) into my notebook' }).click();
    await page.getByText('On “Samples put in” as version 3.').waitFor();
    await page.getByRole('link', { name: 'Go there' }).click();
    await page.waitForURL(address);
    await page.locator('[data-row]').nth(1).waitFor();
    expect(await page.locator('[data-row]').count()).toBe(2);
    expect(ida.complaints).toEqual([]);
  });

  it('waits on the sheet it was opened from when that has unkept changes', async () => {
    const ida = await newVisitor();
    const { page } = ida;
    await ida.signIn(IDA);
    const address = await ida.beginNotebook('Half done');
    await ida.write('dimension', 'R = 5 mm');
    await page.keyboard.press('Escape');
    await page.getByRole('link', { name: 'How to write cells' }).click();
    await page.waitForURL(/\/help\?from=/);
    await ida.awaken();
    await page.getByRole('button', { name: 'Put chord(R, angle) into my notebook' }).click();
    await page.getByText('On the sheet “Half done”, with your other changes').waitFor();
    await page.goto(address);
    await page.getByText('R = 5 mm', { exact: true }).waitFor();
    await page.locator('[data-row]').nth(1).waitFor();
    await page.getByText(/^(Changed since version 1|Saved as version 2)$/).waitFor();
  });
});
