import { AxeBuilder } from '@axe-core/playwright';
import { beforeAll, expect, it } from 'vitest';
import { IDA, TAM, WREN, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** What the sheet promises: a comment of somebody else is seen within five seconds; one for a busy machine. */
const SOON = 6_000;

let wren: Visitor;
let tam: Visitor;
let ida: Visitor;
let sheet: string;

beforeAll(async () => {
  [wren, tam, ida] = await Promise.all([newVisitor(), newVisitor(), newVisitor()]);
  await wren.signIn(WREN);
  await tam.signIn(TAM);
  await ida.signIn(IDA);
  const link = wren.page.getByRole('link', { name: 'Decagonal lantern stair' });
  sheet = String(await link.getAttribute('href'));
});

async function expectNoFaults(visitor: Visitor) {
  const { violations } = await new AxeBuilder({ page: visitor.page }).withTags(TAGS).analyze();
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ''}`)).toEqual([]);
}

it('a viewer comments with a mention, an editor sees it and answers, an owner resolves', async () => {
  await wren.page.goto(sheet);
  await tam.page.goto(sheet);
  await wren.awaken();
  await tam.awaken();

  // Wren begins a thread from the mark in the margin, and picks Tam by the keyboard.
  await wren.page.getByRole('button', { name: 'Comment on Note 1' }).click();
  const drawer = wren.page.getByRole('dialog');
  await drawer.getByLabel('Begin a thread').fill('Which datum, ');
  await drawer.getByLabel('Begin a thread').press('End');
  await wren.page.keyboard.type('@orr');
  await drawer.getByRole('option', { name: 'Tam Orrowdale' }).waitFor();
  await expectNoFaults(wren);
  await wren.page.keyboard.press('Enter');
  await wren.page.keyboard.type('and <b>whose</b>?');
  await drawer.getByRole('button', { name: 'Comment', exact: true }).click();
  await drawer.getByText('@Tam Orrowdale').waitFor();
  // What looks like markup is text.
  expect(await drawer.getByText('<b>whose</b>?').count()).toBe(1);

  const mark = tam.page.getByRole('button', { name: 'Note 1: 1 open thread of comments' });
  await mark.waitFor({ timeout: SOON });
  await mark.click();
  await tam.page.getByText('Which datum').waitFor();
  await tam.page.getByRole('button', { name: 'Answer' }).click();
  await tam.page.keyboard.type('The finished floor.');
  await tam.page.keyboard.press('Control+Enter');

  await drawer.getByText('The finished floor.').waitFor({ timeout: SOON });
  expect(await drawer.getByRole('button', { name: 'Resolve' }).count()).toBe(0);

  // Ida comes by the list of all threads.
  await ida.page.goto(sheet);
  await ida.awaken();
  await ida.page.getByRole('button', { name: 'Comments 1 open' }).click();
  const all = ida.page.getByRole('dialog');
  await all.getByText('The finished floor.').waitFor();
  await expectNoFaults(ida);
  await all.getByRole('button', { name: 'Resolve', exact: true }).click();
  await all.getByText('No thread is open.', { exact: false }).waitFor();
  await all.getByRole('button', { name: 'Resolved 1' }).click();
  await all.getByText('Resolved by Ida Quellby', { exact: false }).waitFor();

  await drawer.getByText('1 resolved thread').waitFor({ timeout: SOON });
  await tam.page
    .getByRole('button', { name: 'Note 1: 1 resolved thread of comments' })
    .waitFor({ timeout: SOON });
  expect([...wren.complaints, ...tam.complaints, ...ida.complaints]).toEqual([]);
});

it('a text that was not sent is found again, and Escape closes the offers before the drawer', async () => {
  const { page } = wren;
  await page.goto(sheet);
  await wren.awaken();
  await page.getByRole('button', { name: 'Comment on Dimension cell 2' }).click();
  const box = page.getByRole('dialog').getByLabel('Begin a thread');
  await box.fill('Half a thought @');
  await page.getByRole('option').first().waitFor();
  await page.keyboard.press('Escape');
  expect(await page.getByRole('option').count()).toBe(0);
  expect(await page.getByRole('dialog').count()).toBe(1);
  await page.keyboard.press('Escape');
  await page.getByRole('dialog').waitFor({ state: 'detached' });
  const back = page.getByRole('button', { name: 'Comment on Dimension cell 2' });
  expect(await back.evaluate((element) => element === document.activeElement)).toBe(true);
  await back.press('Enter');
  expect(await page.getByRole('dialog').getByLabel('Begin a thread').inputValue()).toBe(
    'Half a thought @',
  );
});

it('the key in a cell opens its comments, and the mark looked for leads to its cell', async () => {
  const { page } = ida;
  await page.goto(sheet);
  await ida.awaken();
  await page.locator('[data-entry]').nth(1).focus();
  await page.keyboard.press('Alt+Shift+M');
  await page.getByRole('dialog', { name: /^Comments on/ }).waitFor();
  await page.keyboard.press('Escape');

  await page.getByRole('searchbox', { name: 'Search all notebooks' }).fill('R');
  await page.keyboard.press('Enter');
  await page.waitForURL('**/search?q=R');
  const field = page.getByLabel('Look in titles, marks and text');
  await field.fill('lantern winders');
  await page.getByText('1 notebook with “lantern winders”.').waitFor();
  expect(new URL(page.url()).searchParams.get('q')).toBe('lantern winders');
  await field.fill('wimperg');
  await page.getByText('No notebook of yours has “wimperg”.', { exact: false }).waitFor();
  // A mark that no other sheet of these tests has: an R would stand on a later page of the answers.
  await field.fill('pace');
  const link = page.getByRole('link', { name: 'pace pace = 2 riser + going' });
  await link.click();
  await page.waitForURL(/#cell-/);
  await page.locator('[data-entry]:focus').waitFor();
});
