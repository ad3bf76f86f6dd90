import {
  chromium,
  type Browser,
  type BrowserContext,
  type Locator,
  type Page,
} from 'playwright-core';
import { afterAll, beforeAll } from 'vitest';
import { baseUrl } from '../../setup/server';

const ARGUMENTS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-dev-shm-usage',
];

export const DEMO_PASSWORD = 'limestone-and-lime';
export const IDA = 'ida@ferrowick.example';
export const TAM = 'tam@ferrowick.example';
export const WREN = 'wren@ferrowick.example';

/** One browser for a test file; every person in it has a context, and so cookies, of their own. */
export function useBrowser() {
  let browser: Browser | undefined;
  beforeAll(async () => {
    browser = await chromium.launch({
      executablePath: process.env.TEST_CHROMIUM ?? '/usr/bin/chromium',
      args: ARGUMENTS,
    });
  });
  afterAll(() => browser?.close());

  return {
    async newVisitor(options: Parameters<Browser['newContext']>[0] = {}): Promise<Visitor> {
      if (!browser) throw new Error('The browser has not been started.');
      const context = await browser.newContext({
        baseURL: baseUrl(),
        viewport: { width: 1280, height: 900 },
        reducedMotion: 'reduce',
        ...options,
      });
      return new Visitor(context, await context.newPage());
    },
  };
}

/** A person at a browser; whatever the browser complains of is kept. */
export class Visitor {
  readonly complaints: string[] = [];

  constructor(
    readonly context: BrowserContext,
    readonly page: Page,
  ) {
    page.setDefaultTimeout(15_000);
    page.on('pageerror', (error) => this.complaints.push(error.message));
    page.on('console', (message) => {
      if (message.type() === 'error') this.complaints.push(message.text());
    });
  }

  async signIn(email: string, password = DEMO_PASSWORD): Promise<void> {
    const { page } = this;
    await this.open('/sign-in');
    await page.getByLabel('E-mail address').fill(email);
    await page.getByLabel('Password').fill(password);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.waitForURL('**/notebooks');
  }

  /** Goes to a page and waits until it can be used, not only seen. */
  async open(path: string): Promise<void> {
    await this.page.goto(path);
    await this.page.waitForLoadState('networkidle');
    await this.awaken();
  }

  /** React marks an element once it listens to it; the switch at the foot is on every page. */
  async awaken(): Promise<void> {
    await this.page.waitForFunction(() => {
      const switches = [...document.querySelectorAll('footer button')];
      return switches.some((one) => Object.keys(one).some((key) => key.startsWith('__reactProps')));
    });
  }

  /** Begins a notebook by the page and leaves its empty sheet on the screen; gives its address. */
  async beginNotebook(title: string): Promise<string> {
    const { page } = this;
    await this.open('/notebooks');
    await page.getByRole('button', { name: 'New notebook' }).click();
    await page.getByRole('dialog').getByLabel('Title').fill(title);
    await page.getByRole('dialog').getByRole('button', { name: 'Begin' }).click();
    await page.waitForURL(/\/notebooks\/[^/]+$/);
    await page.getByRole('heading', { level: 1, name: title }).waitFor();
    return page.url();
  }

  /** Adds a cell at the end and types its source. */
  async write(kind: 'dimension' | 'note', source: string): Promise<void> {
    const { page } = this;
    await page.getByRole('button', { name: `Add a ${kind}`, exact: true }).click();
    await this.editor().waitFor();
    await page.keyboard.type(source);
  }

  /** The source that is open; there is one at most. */
  editor(): Locator {
    return this.page.locator('.cm-content');
  }

  /** The line of the sheet whose source reads so, value and compartments with it. */
  entry(source: string): Locator {
    return this.page
      .locator('[data-row]')
      .filter({ has: this.page.getByText(source, { exact: true }) });
  }

  /** Keeps the sheet as its next version. */
  async keep(note = ''): Promise<void> {
    const { page } = this;
    await page
      .getByRole('button', { name: /^Keep version/ })
      .first()
      .click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('What changed').fill(note);
    await dialog.getByRole('button', { name: /^Keep version/ }).click();
    await dialog.waitFor({ state: 'detached' });
  }
}
