import { AxeBuilder } from '@axe-core/playwright';
import type { Locator, Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { KEYS } from '@/components/sheet/cell-keys';
import { IDA, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();

async function begin(title: string) {
  const ida = await newVisitor();
  await ida.signIn(IDA);
  await ida.beginNotebook(title);
  const { page } = ida;
  return {
    ida,
    page,
    press: (key: string) => page.keyboard.press(key),
    type: (text: string) => page.keyboard.type(text),
    source: () => ida.editor().innerText(),
  };
}

/** Writes a cell of each source, one below the other, and leaves the last one open. */
async function writeCells(ida: Visitor, sources: readonly string[]) {
  for (const [index, source] of sources.entries()) {
    if (index === 0) await ida.write('dimension', '');
    else await ida.page.keyboard.press('Control+Enter');
    await ida.page.keyboard.type(source);
  }
}

describe('the source in hand', () => {
  it('offers marks, functions and units; Tab takes the chosen one, and brackets close themselves', async () => {
    const { ida, page, press, type, source } = await begin('Offers');
    await writeCells(ida, ['springing = 1200 mm']);
    await page.getByText('Degree', { exact: true }).first().waitFor();
    await press('Control+Enter');
    await type('s = sag');
    const offers = page.locator('.cm-tooltip-autocomplete');
    await offers.getByText('sagitta').waitFor();
    await press('ArrowDown');
    await page.getByText('From the middle of that chord to the arc').waitFor();
    await press('Tab');
    expect(await source()).toBe('s = sagitta()');

    const signature = page.locator('.signature-line');
    await expect.poll(() => signature.locator('b').innerText()).toBe('R');
    await type('spri');
    await offers.getByText('springing').waitFor();
    await press('ArrowDown');
    await press('Enter');
    await type(', turn/16)');
    expect(await source()).toBe('s = sagitta(springing, turn/16)');
    expect(await signature.count()).toBe(0);
    await press('ArrowLeft');
    await expect.poll(() => signature.locator('b').innerText()).toBe('angle');

    await press('End');
    await type(' + 5 c');
    await offers.getByText('centimetre').waitFor();
    expect(await offers.getByRole('option').first().innerText()).toContain('cm');
    await press('Escape');
    expect(await source()).toContain('5 c');
    expect(ida.complaints).toEqual([]);
  });

  it('says what a name is, by pointer and by key, with the exact value typeset', async () => {
    const { ida, page, press } = await begin('Cards');
    await writeCells(ida, ['r = 600 mm sqrt(2)', 't = r/2 + chord(r, turn/8)']);
    await page.getByText('Degree', { exact: true }).nth(1).waitFor();
    const card = page.locator('.word-card');

    await page.locator('.cm-line').getByText('chord').hover();
    await card.getByText('The straight line between two points').waitFor();
    await page.mouse.move(5, 5);
    await expect.poll(() => card.count()).toBe(0);

    await press('Home');
    for (let step = 0; step < 4; step += 1) await press('ArrowRight');
    await press('Shift+F1');
    await card.getByText('defined in cell 1, line 1').waitFor();
    expect(await card.locator('math').count()).toBe(1);
    expect(await card.innerText()).toContain('848.528137423857');
    await press('Escape');
    await expect.poll(() => card.count()).toBe(0);
    expect(await ida.editor().count()).toBe(1);

    // The same on a source at rest.
    await press('Escape');
    const resting = page.locator('[data-entry] code').nth(1);
    const box = await resting.boundingBox();
    if (!box) throw new Error('The line is not on the screen.');
    await page.mouse.move(box.x + 38, box.y + box.height / 2, { steps: 3 });
    await card.getByText('defined in cell 1, line 1').waitFor();
    await press('Escape');
    await expect.poll(() => card.count()).toBe(0);
    expect(ida.complaints).toEqual([]);
  });

  it('goes to the line that defines a name, and back', async () => {
    const { ida, page, press, source } = await begin('Definitions');
    await writeCells(ida, ['r = 600 mm\ns = r/2', 't = r + s']);
    await press('F8');
    await expect.poll(source).toBe('s = r/2');
    await press('Home');
    for (let step = 0; step < 4; step += 1) await press('ArrowRight');
    await press('F8');
    await expect.poll(source).toBe('r = 600 mm');
    await press('Shift+F8');
    await expect.poll(source).toBe('s = r/2');
    await press('Shift+F8');
    await expect.poll(source).toBe('t = r + s');

    await page.locator('.cm-line').click({ position: { x: 39, y: 12 }, modifiers: ['Control'] });
    await expect.poll(source).toBe('r = 600 mm');
  });
});

describe('renaming a mark', () => {
  it('changes it wherever it is read, in one step back, and refuses a taken name', async () => {
    const { ida, page, press, type } = await begin('Renaming');
    await writeCells(ida, ['r = 600 mm # r as given', 's = 2r + root(x^2 - 2, 1)', 't = r + s']);
    await press('Escape');
    // The focus follows with the next frame: a key before it would go nowhere.
    const focused = () => page.evaluate(() => document.activeElement?.textContent ?? '');
    await expect.poll(focused).toContain('t = r + s');
    await press('ArrowUp');
    await expect.poll(focused).toContain('s = 2r');
    await press('ArrowUp');
    await expect.poll(focused).toContain('r = 600 mm');
    await press('F2');
    const dialog = page.getByRole('dialog', { name: 'Rename the mark r' });
    await dialog.getByText('r stands in 3 places in 3 cells').waitFor();
    await type('s');
    await dialog.getByText('s is another mark of this sheet.').waitFor();
    await press('Control+a');
    await type('rib');
    await press('Enter');
    await dialog.waitFor({ state: 'detached' });
    await ida.entry('s = 2rib + root(x^2 - 2, 1)').waitFor();
    await page.getByText('rib = 600 mm').waitFor();
    await page.getByText('# r as given').waitFor();
    expect(await page.evaluate(() => document.activeElement?.id)).toMatch(/^entry-/);

    await press('Control+z');
    await ida.entry('s = 2r + root(x^2 - 2, 1)').waitFor();
    await ida.entry('t = r + s').waitFor();
    expect(ida.complaints).toEqual([]);
  });
});

describe('finding on the sheet', () => {
  it('steps through sources and notes, brings far cells into view, and gives the focus back', async () => {
    const { ida, page, press, type } = await begin('Finding');
    const lines = Array.from({ length: 40 }, (_, index) => `a${index} = ${index + 1} mm`);
    await ida.write('dimension', '');
    for (const [index, line] of lines.entries()) {
      if (index > 0) await press('Control+Enter');
      await type(line);
    }
    await press('Control+Shift+Enter');
    await type('The keystone is a37.');
    await press('Escape');
    await press('Home');
    await press('Control+f');
    const bar = page.getByRole('search', { name: 'Find on this sheet' });
    await bar.getByRole('textbox').waitFor();
    await type('a37');
    await bar.getByText('1 of 2, in cell 38').waitFor();
    const found = page.locator('[data-found]');
    await expect.poll(() => found.innerText()).toContain('a37 = 38 mm');
    await expect.poll(() => isOnScreen(found)).toBe(true);
    await press('F3');
    await bar.getByText('2 of 2, in cell 41').waitFor();
    await press('Shift+F3');
    await bar.getByText('1 of 2, in cell 38').waitFor();
    await press('Escape');
    await expect.poll(() => bar.count()).toBe(0);
    expect(await found.count()).toBe(0);
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('a0 = 1 mm');

    await press('Control+f');
    await bar.getByText('2 found').waitFor();
    await press('Enter');
    await press('Control+Enter');
    await expect.poll(() => ida.editor().innerText()).toContain('a37');
    expect(ida.complaints).toEqual([]);
  });
});

async function isOnScreen(element: Locator): Promise<boolean> {
  return element.evaluate((one) => {
    const { top, bottom } = one.getBoundingClientRect();
    return top >= 0 && bottom <= innerHeight;
  });
}

describe.each(['light', 'dark'] as const)('in %s', (colorScheme) => {
  it('cards, signature, search, renaming and the sheet of keys have no fault known to axe', async () => {
    const { ida, page, press, type } = await begin(`Parts in ${colorScheme}`);
    await page.emulateMedia({ colorScheme });
    await page.setViewportSize({ width: 390, height: 800 });
    const faults = async () => {
      const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
      // The header of the site, scrolled half away here, is looked at with every page.
      const axe = new AxeBuilder({ page }).withTags(tags).exclude('header');
      const { violations } = await axe.analyze();
      return violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.html).join()}`);
    };
    await writeCells(ida, ['r = 600 mm sqrt(2)', 's = chord(r']);
    await page.getByText('Degree', { exact: true }).first().waitFor();
    await press('Shift+F1');
    await page.locator('.word-card').waitFor();
    expect(await faults()).toEqual([]);
    expect(await overflow(page)).toBeLessThanOrEqual(0);

    await press('Control+f');
    await page.getByRole('search', { name: 'Find on this sheet' }).getByRole('textbox').waitFor();
    await type('r');
    await page.getByRole('button', { name: 'Replace' }).click();
    expect(await faults()).toEqual([]);
    expect(await overflow(page)).toBeLessThanOrEqual(0);
    await page
      .getByRole('search', { name: 'Find on this sheet' })
      .getByRole('textbox')
      .first()
      .press('Escape');

    for (const [key, title] of [
      ['F2', 'Rename the mark r'],
      ['F1', 'Keys of the sheet'],
    ] as const) {
      await press(key);
      await page.getByRole('dialog', { name: title }).waitFor();
      expect(await faults()).toEqual([]);
      await press('Escape');
      await page.getByRole('dialog').waitFor({ state: 'detached' });
    }
  });
});

/** Pixels by which the page is wider than the screen. */
const overflow = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - innerWidth);

describe('the keys', () => {
  it('are all on a sheet that opens by key and by button and gives the focus back', async () => {
    const { ida, page, press } = await begin('Keys');
    await writeCells(ida, ['r = 600 mm']);
    await press('F1');
    const dialog = page.getByRole('dialog', { name: 'Keys of the sheet' });
    await dialog.waitFor();
    for (const { does } of KEYS)
      expect(await dialog.getByText(does, { exact: true }).count()).toBe(1);
    await press('Escape');
    await dialog.waitFor({ state: 'detached' });
    expect(await page.evaluate(() => document.activeElement?.className)).toContain('cm-content');
    await press('Escape');
    await expect.poll(() => page.evaluate(() => document.activeElement?.id)).toMatch(/^entry-/);
    await page.keyboard.press('Shift+?');
    await dialog.waitFor();
    await press('Escape');
    await page.getByRole('button', { name: 'Keys', exact: true }).click();
    await dialog.waitFor();
  });

  it('add, duplicate, fold, delete and go from cell to cell without a pointer', async () => {
    const { ida, page, press, type } = await begin('Cells by key');
    await writeCells(ida, ['r = 600 mm']);
    await press('Control+Alt+Enter');
    await type('Ring');
    await press('Control+Enter');
    await type('s = r/2');
    await press('Alt+Enter');
    await type('before = 1 mm');
    await press('Alt+PageDown');
    const focus = () => page.evaluate(() => document.activeElement?.textContent ?? '');
    await expect.poll(focus).toContain('s = r/2');
    await press('Alt+Shift+PageUp');
    await expect.poll(focus).toContain('Ring');
    await press('Alt+Shift+f');
    await page.getByText('2 cells folded').waitFor();
    await press('Alt+Shift+f');
    await ida.entry('s = r/2').waitFor();
    await press('End');
    await press('Alt+Shift+d');
    await expect.poll(() => ida.editor().innerText()).toMatch(/^s\w+ = r\/2/);
    await press('Alt+Shift+Delete');
    await expect.poll(() => page.locator('[data-row]').count()).toBe(3);
    await press('Control+z');
    await expect.poll(() => page.locator('[data-row]').count()).toBe(4);
    expect(ida.complaints).toEqual([]);
  });
});
