import { describe, expect, it } from 'vitest';
import { IDA, useBrowser } from './support/browser';

const { newVisitor } = useBrowser();

describe('the keyboard alone', () => {
  it('writes, moves, deletes, undoes and keeps a sheet', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.beginNotebook('Without a mouse');
    const { page } = ida;
    const press = (key: string) => page.keyboard.press(key);
    const sources = () => page.locator('[data-row]').allInnerTexts();

    await page.getByRole('button', { name: 'Add a dimension' }).focus();
    await press('Enter');
    await ida.editor().waitFor();
    await page.keyboard.type('R = 1200 mm');
    await press('Enter');
    await page.keyboard.type('s = R/2');
    await press('Control+Enter');
    await page.keyboard.type('t = R/3');
    await press('Control+Shift+Enter');
    await page.keyboard.type('A note');
    await press('Escape');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('Write');
    await page.getByText('A note', { exact: true }).waitFor();

    // Back up to the second dimension cell, before the first with it, and away; then undo twice.
    await press('ArrowUp');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('t = R/3');
    await press('Alt+ArrowUp');
    await expect.poll(async () => (await sources())[0]).toContain('t = R/3');
    await press('Delete');
    await expect.poll(async () => (await sources()).join()).not.toContain('t = R/3');
    await press('Control+z');
    await expect.poll(async () => (await sources())[0]).toContain('t = R/3');
    await press('Control+z');
    await expect.poll(async () => (await sources())[0]).toContain('R = 1200 mm');
    await press('Control+Shift+z');
    await expect.poll(async () => (await sources())[0]).toContain('t = R/3');

    await press('Control+s');
    await page.getByRole('dialog', { name: /^Keep as version \d+$/ }).waitFor();
    await page.keyboard.type('by keyboard');
    await press('Enter');
    await page.getByText(/^Version \d+, kept$/).waitFor();
    expect(ida.complaints).toEqual([]);
  });

  it('breaks and joins lines, and goes from one to the next, as in any text', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.beginNotebook('Lines');
    const { page } = ida;
    const press = (key: string) => page.keyboard.press(key);
    await ida.write('dimension', 'R = 1200 mm');
    await press('Enter');
    await page.keyboard.type('s = R/2');
    await press('ArrowUp');
    await expect.poll(() => ida.editor().innerText()).toBe('R = 1200 mm');
    await press('ArrowDown');
    await expect.poll(() => ida.editor().innerText()).toBe('s = R/2');
    await press('Home');
    await press('Backspace');
    await expect.poll(() => ida.editor().innerText()).toBe('R = 1200 mms = R/2');
    await press('Control+z');
    await press('Escape');
    await ida.entry('s = R/2').waitFor();
    await ida.entry('R = 1200 mm').waitFor();
  });

  it('skips to the content, and every control that has the focus shows it', async () => {
    const visitor = await newVisitor();
    const { page } = visitor;
    await page.goto('/sign-in');
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe(
      'Skip to the content',
    );
    await page.keyboard.press('Enter');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('content');
    const seen = new Set<string>();
    for (let step = 0; step < 8; step += 1) {
      await page.keyboard.press('Tab');
      const focus = await page.evaluate(() => {
        const active = document.activeElement;
        if (!active || active === document.body) return null;
        const { outlineStyle, outlineWidth } = getComputedStyle(active);
        return {
          name: active.outerHTML.slice(0, 60),
          shown: outlineStyle !== 'none' && outlineWidth !== '0px',
        };
      });
      if (focus === null) break;
      seen.add(focus.name);
      expect(focus.shown, focus.name).toBe(true);
    }
    expect(seen.size).toBeGreaterThan(3);
  });
});
