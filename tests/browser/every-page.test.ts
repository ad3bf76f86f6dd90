import { AxeBuilder } from '@axe-core/playwright';
import { beforeAll, describe, expect, it } from 'vitest';
import { IDA, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const WIDTHS = [380, 390, 820, 1440] as const;

let ida: Visitor;
let paths: Record<string, string>;

beforeAll(async () => {
  ida = await newVisitor();
  await ida.signIn(IDA);
  const first = await ida.page
    .getByRole('link', { name: 'Seventeen-light window' })
    .getAttribute('href');
  const made = await ida.context.request.post(`/api${first}/links`, {
    data: { label: 'For looking at every page' },
    headers: { origin: new URL(ida.page.url()).origin },
  });
  const { token } = (await made.json()) as { token: string };
  paths = {
    front: '/',
    'sign-up': '/sign-up',
    notebooks: '/notebooks',
    'archived notebooks': '/notebooks?archived=1',
    sheet: String(first),
    versions: `${first}/versions`,
    version: `${first}/versions/1`,
    client: `/client/${token}`,
    settings: '/settings',
    help: '/help',
    divide: '/divide?n=17&radius=1200+mm',
    'divide not reached': '/divide?n=7&radius=450+mm',
    'not found': '/client/nothing',
  };
});

const PAGES = [
  'front',
  'notebooks',
  'archived notebooks',
  'sheet',
  'versions',
  'version',
  'client',
  'settings',
  'help',
  'divide',
  'divide not reached',
  'not found',
] as const;

async function faultsOf(visitor: Visitor) {
  const { violations } = await new AxeBuilder({ page: visitor.page }).withTags(TAGS).analyze();
  return violations.map(
    ({ id, nodes }) =>
      `${id}: ${nodes
        .map((node) => node.html)
        .join(' | ')
        .slice(0, 600)}`,
  );
}

describe.each(['light', 'dark'] as const)('in %s', (colorScheme) => {
  it.each(PAGES)('the page “%s” has no fault known to axe', async (name) => {
    await ida.page.emulateMedia({ colorScheme });
    await ida.page.goto(String(paths[name]));
    await ida.page.waitForLoadState('networkidle');
    expect(await faultsOf(ida)).toEqual([]);
  });

  it.each(['/sign-in', '/sign-up', '/help'])(
    '%s has none for who is not signed in',
    async (path) => {
      const visitor = await newVisitor({ colorScheme });
      await visitor.page.goto(path);
      expect(await faultsOf(visitor)).toEqual([]);
      await visitor.context.close();
    },
  );

  it('a sheet in hand and its dialogs have none either', async () => {
    const { page } = ida;
    await page.emulateMedia({ colorScheme });
    await ida.open(String(paths.sheet));
    await page.locator('[data-entry]').nth(1).click();
    await ida.editor().waitFor();
    expect(await faultsOf(ida)).toEqual([]);
    await page.keyboard.press('Escape');
    for (const panel of ['People on this notebook', 'Client links']) {
      await page.getByRole('button', { name: 'Hand over' }).click();
      await page.getByRole('button', { name: panel }).click();
      await page.getByRole('dialog').getByRole('listitem').first().waitFor();
      expect(await faultsOf(ida)).toEqual([]);
      await page.keyboard.press('Escape');
    }
    await page.getByRole('button', { name: 'Unit and step' }).click();
    expect(await faultsOf(ida)).toEqual([]);
    await page.keyboard.press('Escape');
  });
});

describe.each(WIDTHS)('at %i pixels', (width) => {
  it('no page is wider than the screen', async () => {
    const wide: string[] = [];
    await ida.page.setViewportSize({ width, height: 900 });
    for (const name of PAGES) {
      await ida.page.goto(String(paths[name]));
      await ida.page.waitForLoadState('networkidle');
      const over = await ida.page.evaluate(
        () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
      );
      if (over > 0) wide.push(`${name}: ${over}`);
    }
    expect(wide).toEqual([]);
  });
});

describe('light and dark', () => {
  it('follow the machine until switched, and the choice is drawn by the server', async () => {
    const visitor = await newVisitor({ colorScheme: 'dark' });
    const { page } = visitor;
    const paper = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor);
    await visitor.open('/help');
    const dark = await paper();
    await page.getByRole('button', { name: /Light or dark/ }).click();
    const light = await paper();
    expect(light).not.toBe(dark);
    await page.reload({ waitUntil: 'networkidle' });
    await visitor.awaken();
    expect(await page.locator('html').getAttribute('data-theme')).toBe('light');
    expect(await paper()).toBe(light);
    await page.getByRole('button', { name: /Light or dark/ }).click();
    await page.getByRole('button', { name: /Light or dark/ }).click();
    expect(await paper()).toBe(dark);
    expect(visitor.complaints).toEqual([]);
  });

  it('print black on white with border and title block', async () => {
    await ida.page.emulateMedia({ media: 'print', colorScheme: 'dark' });
    await ida.page.goto(String(paths.sheet));
    const printed = await ida.page.evaluate(() => {
      const block = document.querySelector('[aria-label="Title block"]');
      const button = document.querySelector('main button');
      return {
        paper: getComputedStyle(document.body).backgroundColor,
        ink: getComputedStyle(document.body).color,
        block: block?.getBoundingClientRect().height ?? 0,
        button: button ? getComputedStyle(button).display : 'none',
      };
    });
    expect(printed).toMatchObject({
      paper: 'rgb(255, 255, 255)',
      ink: 'rgb(0, 0, 0)',
      button: 'none',
    });
    expect(printed.block).toBeGreaterThan(50);
    await ida.page.emulateMedia({ media: 'screen' });
  });
});
