import { readFile } from 'node:fs/promises';
import { AxeBuilder } from '@axe-core/playwright';
import { describe, expect, it } from 'vitest';
import { refusal } from '../../lib/certificate-check/verify.mjs';
import { IDA, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** A sheet of three cells, each with one line. */
async function threeCells(title: string): Promise<{ ida: Visitor; address: string }> {
  const ida = await newVisitor();
  await ida.signIn(IDA);
  const address = await ida.beginNotebook(title);
  for (const source of ['R = 1200 mm', 'p = 2 R sin(turn/34)', 'q = p/3']) {
    await ida.write('dimension', source);
    await ida.page.keyboard.press('Escape');
  }
  await ida.entry('q = p/3').getByRole('group', { name: 'Exact value' }).waitFor();
  return { ida, address };
}

/** The sources on the sheet from top to bottom, each by its first letter. */
const order = async ({ page }: Visitor) =>
  (await page.locator('[data-row] code').allInnerTexts()).map((text) => text.charAt(0)).join('');

async function axeFaults({ page }: Visitor) {
  const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
  return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`);
}

describe('cells on the sheet', () => {
  it('are carried by the grip, and by the arrow keys on it, in one step of undo each', async () => {
    const { ida } = await threeCells('Carried');
    const { page } = ida;
    const grip = page.getByRole('button', { name: /^Move Dimension cell 3/ });
    const from = await grip.boundingBox();
    const first = await page.locator('[data-block]').first().boundingBox();
    if (!from || !first) throw new Error('The sheet is not drawn.');
    await page.mouse.move(from.x + 6, from.y + 12);
    await page.mouse.down();
    await page.mouse.move(from.x + 20, from.y - 60, { steps: 4 });
    await page.mouse.move(from.x + 20, first.y + 5, { steps: 4 });
    await page.mouse.up();
    await expect.poll(() => order(ida)).toBe('qRp');
    await page.getByText('Cell moved to place 1 of 3.').waitFor({ state: 'attached' });
    await page.getByRole('button', { name: 'Undo', exact: true }).click();
    await expect.poll(() => order(ida)).toBe('Rpq');
    await page.getByRole('button', { name: /^Move Dimension cell 1/ }).focus();
    await page.keyboard.press('ArrowDown');
    await expect.poll(() => order(ida)).toBe('pRq');
    await page.keyboard.press('ArrowDown');
    await expect.poll(() => order(ida)).toBe('pqR');
    expect(ida.complaints).toEqual([]);
  });

  it('come back from a deletion by its notice, and are duplicated with marks of their own', async () => {
    const { ida } = await threeCells('Gone and back');
    const { page } = ida;
    await page.getByText('p = 2 R sin(turn/34)', { exact: true }).click();
    const tools = page.getByRole('group', { name: 'This cell' });
    await tools.getByRole('button', { name: 'Delete' }).click();
    await page.getByText('Cell deleted').waitFor();
    expect(await order(ida)).toBe('Rq');
    await page.getByRole('status').getByRole('button', { name: 'Undo' }).click();
    await expect.poll(() => order(ida)).toBe('Rpq');
    await page.getByText('Cell deleted').waitFor({ state: 'detached' });

    await page.getByText('p = 2 R sin(turn/34)', { exact: true }).click();
    await tools.getByRole('button', { name: 'Duplicate' }).click();
    await ida.editor().waitFor();
    await expect.poll(() => ida.editor().innerText()).toBe('p_2 = 2 R sin(turn/34)');
    await page.keyboard.press('Escape');
    await ida
      .entry('p_2 = 2 R sin(turn/34)')
      .getByText('degree', { exact: false })
      .first()
      .waitFor();
    expect(await page.locator('[data-fault]').count()).toBe(0);
  });

  it('fold under their section, stay folded for this person over a reload, and open when gone to', async () => {
    const { ida } = await threeCells('Folded');
    const { page } = ida;
    await page.getByText('p = 2 R sin(turn/34)', { exact: true }).click();
    await page.getByRole('group', { name: 'This cell' }).getByText('Move down').waitFor();
    await page.keyboard.press('Escape');
    await page.getByRole('button', { name: 'Add a section' }).click();
    await page.getByLabel(/^Heading of section/).fill('Stones');
    await page.keyboard.press('Alt+ArrowUp');
    await page.keyboard.press('Alt+ArrowUp');
    await page.keyboard.press('Escape');
    await ida.keep();
    await page.getByRole('button', { name: 'Fold section Stones' }).click();
    await page.getByText('2 cells folded').waitFor();
    expect(await order(ida)).toBe('R');
    await page.reload({ waitUntil: 'networkidle' });
    await ida.awaken();
    await page.getByText('2 cells folded').waitFor();
    await page
      .getByRole('navigation', { name: 'Index of the sheet' })
      .getByRole('link', { name: /^q/ })
      .last()
      .click();
    await expect.poll(() => order(ida)).toBe('Rpq');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('q = p/3');
    const head = await ida.context.request.get(`/api/notebooks/${page.url().split('/').at(-1)}`);
    expect(JSON.stringify(await head.json())).not.toContain('fold');
  });
});

describe('the proof of a figure', () => {
  it('opens by button and by key, gives any number of digits and a certificate that holds', async () => {
    const { ida } = await threeCells('Proven');
    const { page } = ida;
    await page.getByRole('button', { name: 'Proof of q', exact: true }).click();
    const proof = page.getByRole('dialog', { name: 'Proof of q' });
    await proof.getByText('Degree 16 over the rational numbers.').waitFor();
    await proof.getByText('Defined in zone', { exact: false }).waitFor();
    await proof.getByLabel('Digits').first().fill('500');
    await proof.getByRole('button', { name: 'Work out' }).click();
    await proof.getByText('Correctly rounded to 500 significant digits.').waitFor();
    const download = page.waitForEvent('download');
    await proof.getByRole('button', { name: 'Save the certificate' }).click();
    const file = await (await download).path();
    expect(refusal(JSON.parse(await readFile(file, 'utf8')))).toBeNull();
    expect(await axeFaults(ida)).toEqual([]);

    await proof.getByLabel('Unit').selectOption('cm');
    await ida.entry('q = p/3').getByRole('figure').getByText(' cm', { exact: false }).waitFor();
    await proof.getByRole('button', { name: 'Follow the sheet again' }).click();
    await page.keyboard.press('Escape');
    await proof.waitFor({ state: 'detached' });
    await page.locator('[data-entry]').filter({ hasText: 'q = p/3' }).focus();
    await page.keyboard.press('Alt+Shift+P');
    await proof.waitFor();
    await page.keyboard.press('Escape');
    await proof.waitFor({ state: 'detached' });
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('q = p/3');
    expect(ida.complaints).toEqual([]);
  });

  it('lies over the foot of a narrow screen, nothing wider than it, and so does the index', async () => {
    const { ida } = await threeCells('On a telephone');
    const { page } = ida;
    await page.setViewportSize({ width: 390, height: 800 });
    await page.getByRole('button', { name: 'Proof of p', exact: true }).click();
    const box = await page.getByRole('dialog').boundingBox();
    expect(box).toMatchObject({ x: 0, width: 390 });
    expect((box?.y ?? 0) + (box?.height ?? 0)).toBe(800);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(390);
    expect(await axeFaults(ida)).toEqual([]);
    await page.keyboard.press('Escape');
    await page.getByRole('button', { name: 'Marks', exact: true }).click();
    await page
      .getByRole('dialog', { name: 'Marks' })
      .getByRole('link', { name: 'p' })
      .first()
      .click();
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain(
      'sin(turn/34)',
    );
  });
});

describe('a value', () => {
  it('is copied as MathML and as JSON', async () => {
    const { ida } = await threeCells('Copied');
    const { page } = ida;
    await ida.context.grantPermissions(['clipboard-read', 'clipboard-write']);
    const copied = async (form: string) => {
      await page.getByRole('button', { name: 'Copy the value of p' }).click();
      await page.getByRole('button', { name: form, exact: true }).click();
      await page.getByText(`${form} copied`).waitFor();
      return page.evaluate(() => navigator.clipboard.readText());
    };
    expect(await copied('MathML')).toMatch(/^<math .*<msqrt>.*<\/math>$/s);
    expect(JSON.parse(await copied('JSON'))).toMatchObject({
      mark: 'p',
      kind: 'number',
      degree: 16,
    });
  });
});

describe('a connection that is lost', () => {
  it('is said, with where the text is meanwhile, and so is that it is back', async () => {
    const { ida } = await threeCells('On the scaffold');
    const { page, context } = ida;
    await context.setOffline(true);
    await page.getByText('The connection is lost').waitFor();
    await page.getByText('R = 1200 mm', { exact: true }).click();
    await page.keyboard.type(' + 1 mm');
    await page.getByText('kept on this computer until saved').waitFor();
    await page.waitForTimeout(600);
    expect(await page.getByRole('group', { name: 'Exact value' }).count()).toBe(3);
    await context.setOffline(false);
    await page.getByText('The connection is back.').waitFor();
    await page.getByRole('figure').getByText('1201 mm').waitFor({ timeout: 40_000 });
  });

  it('and two tabs on one sheet: each keeps what was typed in it', async () => {
    const { ida, address } = await threeCells('Two tabs');
    await ida.keep();
    const write = async (visitorPage: typeof ida.page, text: string) => {
      await visitorPage.getByText('R = 1200 mm', { exact: true }).click();
      await visitorPage.locator('.cm-content').waitFor();
      await visitorPage.keyboard.press('End');
      await visitorPage.keyboard.type(text);
      await visitorPage.waitForTimeout(500);
    };
    await write(ida.page, ' + 11 mm');
    const other = await ida.context.newPage();
    await other.goto(address, { waitUntil: 'networkidle' });
    await other.getByText('open in another tab as well').waitFor();
    await write(other, ' + 22 mm');
    for (const [tab, text] of [
      [ida.page, '+ 11 mm'],
      [other, '+ 22 mm'],
    ] as const) {
      tab.on('dialog', (dialog) => void dialog.accept());
      await tab.reload({ waitUntil: 'networkidle' });
      await tab.getByText(`R = 1200 mm ${text}`, { exact: true }).waitFor();
    }
  });
});

describe('an empty sheet', () => {
  it('offers pieces of work to begin from, and undo takes them away again', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.beginNotebook('From a starter');
    const { page } = ida;
    await page.getByRole('list', { name: 'Starters' }).getByRole('button').first().click();
    await page.getByRole('group', { name: 'Exact value' }).first().waitFor();
    expect(await page.locator('[data-fault]').count()).toBe(0);
    await page.getByRole('button', { name: 'Undo', exact: true }).click();
    await page.getByText('The sheet is empty.').waitFor();
    expect(ida.complaints).toEqual([]);
  });
});
