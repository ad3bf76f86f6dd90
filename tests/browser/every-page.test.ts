import { AxeBuilder } from '@axe-core/playwright';
import { beforeAll, describe, expect, it } from 'vitest';
import { letterTo, linkIn } from '../setup/letters';
import { IDA, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
/** 320 is what is left of 1280 at 400 %, 640 at 200 %. */
const WIDTHS = [320, 390, 640, 820, 1440] as const;

let ida: Visitor;
let paths: Record<string, string>;

beforeAll(async () => {
  ida = await newVisitor();
  await ida.signIn(IDA);
  const first = await ida.page
    .getByRole('link', { name: 'Seventeen-light window' })
    .getAttribute('href');
  const headers = { origin: new URL(ida.page.url()).origin };
  const post = async (path: string, data: object) => {
    const made = await ida.context.request.post(path, { data, headers });
    return (await made.json()) as Record<string, string>;
  };
  const { token } = await post(`/api${first}/links`, { label: 'For looking at every page' });
  const { token: locked } = await post(`/api${first}/links`, { passphrase: 'lime and sand' });
  const { id } = await post('/api/notebooks', { title: 'Nothing issued of it' });
  const { token: waiting } = await post(`/api/notebooks/${id}/links`, {});
  await ida.context.request.post('/api/passwords/forgotten', { data: { email: IDA } });
  await letterTo(IDA, { subject: 'A new password' });
  await ida.open('/mail');
  const letter = await ida.page
    .getByRole('link', { name: 'A new password' })
    .first()
    .getAttribute('href');
  await ida.open('/workshops');
  const workshop = String(await ida.page.locator('main li a').first().getAttribute('href'));
  const email = `newcomer.${Date.now()}@quarrymoor.example`;
  await post(`/api${workshop}/invitations`, { email, role: 'member' });
  const invited = await letterTo(email, { subject: 'invites you to' });
  paths = {
    workshops: '/workshops',
    members: workshop,
    invitation: new URL(linkIn(invited.text)).pathname,
    'start values': `${workshop}/settings`,
    'title block of the workshop': `${workshop}/title-block`,
    activity: `${workshop}/activity`,
    front: '/',
    'sign-up': '/sign-up',
    notebooks: '/notebooks',
    'archived notebooks': '/notebooks?archived=1',
    sheet: String(first),
    versions: `${first}/versions`,
    version: `${first}/versions/1`,
    compare: `${first}/compare?from=1&to=1&all=1`,
    client: `/client/${token}`,
    'client asked for a passphrase': `/client/${locked}`,
    'client with nothing issued': `/client/${waiting}`,
    revisions: `${first}/revisions`,
    revision: `${first}/revisions/A`,
    search: '/search?q=R',
    'nothing found': '/search?q=wimperg',
    'notebooks by title': '/notebooks?sort=title&role=owner',
    settings: '/settings',
    letters: '/mail',
    letter: String(letter),
    help: '/help',
    divide: '/divide?n=17&radius=1200+mm',
    'divide not reached': '/divide?n=7&radius=450+mm',
    'not found': '/client/nothing',
    'no such page': '/no/such/page',
    'front with a slip': '/?lines=R%20%3D%201200%20mm%0AR%20%2B%203%20deg',
  };
});

const PAGES = [
  'invitation',
  'workshops',
  'members',
  'start values',
  'title block of the workshop',
  'activity',
  'front',
  'notebooks',
  'archived notebooks',
  'sheet',
  'versions',
  'version',
  'compare',
  'client',
  'client asked for a passphrase',
  'client with nothing issued',
  'revisions',
  'revision',
  'search',
  'nothing found',
  'notebooks by title',
  'settings',
  'letters',
  'letter',
  'help',
  'divide',
  'divide not reached',
  'not found',
  'no such page',
  'front with a slip',
] as const;

async function faultsOf(visitor: Visitor) {
  const { violations } = await new AxeBuilder({ page: visitor.page })
    .withTags(TAGS)
    // A letter's frame runs no script, and so not axe's either, which would wait for it for ever.
    .exclude('iframe[sandbox]')
    .analyze();
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

  it.each(['/sign-in', '/sign-up', '/forgot', '/confirm/nothing', '/reset/nothing', '/help'])(
    '%s has none for who is not signed in',
    async (path) => {
      const visitor = await newVisitor({ colorScheme });
      await visitor.page.goto(path);
      expect(await faultsOf(visitor)).toEqual([]);
      await visitor.context.close();
    },
  );

  it('signing up with every field wrong, and signing in in vain, have none', async () => {
    const visitor = await newVisitor({ colorScheme });
    const { page } = visitor;
    await visitor.open('/sign-up');
    await page.getByLabel('Your name').fill(' ');
    await page.getByLabel('Workshop').fill(' ');
    await page.getByLabel('E-mail address').fill('name@example');
    await page.getByLabel('Password').fill('short');
    await page.getByRole('button', { name: 'Make an account' }).click();
    await page.getByText(/The password has fewer than \d+ characters/).waitFor();
    expect(await page.getByLabel('Password').getAttribute('aria-invalid')).toBe('true');
    expect(await faultsOf(visitor)).toEqual([]);
    await visitor.open('/sign-in?error=too-many');
    await page.getByRole('alert').filter({ hasText: 'Too many attempts' }).waitFor();
    expect(await faultsOf(visitor)).toEqual([]);
    await visitor.context.close();
  });

  it('beginning a notebook and choosing where a sample goes have none', async () => {
    const { page } = ida;
    await page.emulateMedia({ colorScheme });
    await ida.open('/notebooks');
    await page.getByRole('button', { name: 'New notebook' }).click();
    await page.getByRole('radio', { name: 'A traceried circle' }).check();
    expect(await faultsOf(ida)).toEqual([]);
    await ida.open('/help');
    await page.getByRole('button', { name: /^Put chord/ }).click();
    await page.getByRole('dialog').getByLabel('Notebook').waitFor();
    expect(await faultsOf(ida)).toEqual([]);
    await page.keyboard.press('Escape');
  });

  it('a sheet in hand and its dialogs have none either', async () => {
    const { page } = ida;
    await page.emulateMedia({ colorScheme });
    await ida.open(String(paths.sheet));
    await page.locator('[data-entry]').nth(1).click();
    await ida.editor().waitFor();
    expect(await faultsOf(ida)).toEqual([]);
    await page.keyboard.press('Escape');
    await page.getByRole('button', { name: 'Hand over' }).click();
    await page.getByRole('button', { name: /^Issue a revision/ }).click();
    await page.getByRole('button', { name: /^Issue revision/ }).waitFor();
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

describe('by keyboard', () => {
  it.each(['front', 'notebooks', 'sheet', 'help', 'divide', 'settings'] as const)(
    'whatever has the focus on “%s” is seen to have it',
    async (name) => {
      const { page } = ida;
      await page.setViewportSize({ width: 1280, height: 900 });
      await ida.open(String(paths[name]));
      for (let stop = 0; stop < 14; stop += 1) {
        await page.keyboard.press('Tab');
        const unseen = await page.evaluate(() => {
          const { activeElement } = document;
          if (activeElement === null || activeElement === document.body) return null;
          const shows = (element: Element) => getComputedStyle(element).outlineStyle !== 'none';
          // A source editor shows it on the box around it.
          const around = activeElement.matches('.cm-content')
            ? [...document.querySelectorAll('main *')].filter((box) => box.contains(activeElement))
            : [];
          return [activeElement, ...around].some(shows)
            ? null
            : activeElement.outerHTML.slice(0, 200);
        });
        expect(unseen).toBeNull();
      }
    },
  );

  it('nothing moves of itself where motion is not wanted', async () => {
    for (const name of ['front', 'sheet', 'help'] as const) {
      await ida.open(String(paths[name]));
      const moving = await ida.page.evaluate(() =>
        [...document.querySelectorAll('body, body *')]
          .filter((element) => {
            const { animationName, transitionDuration } = getComputedStyle(element);
            return animationName !== 'none' || !/^0s(, 0s)*$/.test(transitionDuration);
          })
          .map((element) => element.outerHTML.slice(0, 120)),
      );
      expect(moving).toEqual([]);
    }
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
