import { describe, expect, it } from 'vitest';
import { IDA, useBrowser, WREN } from './support/browser';

const { newVisitor } = useBrowser();

describe('bad input on the sheet', () => {
  it('is a sentence at its place, and the other cells still answer', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.beginNotebook('Slips of the pen');
    const cases = [
      ['R = 1200 mm', null],
      ['a = (2 + ', /expected/],
      ['b = R + q', /q/],
      ['c = 1/0', /divisor|zero|0/],
      ['sqrt(2) < i', /real|order/],
      ['d = R + 3 deg', /length|angle/],
      ['e = 9^9^9^9', /limit|more than|at most/],
    ] as const;
    for (const [source] of cases) await ida.write('dimension', source);
    await ida.page.keyboard.press('Escape');
    for (const [source, sentence] of cases) {
      const entry = ida.entry(source);
      if (sentence === null) await entry.locator('dl').first().waitFor();
      else {
        const fault = entry.locator('[data-fault]');
        await fault.waitFor();
        expect(await fault.innerText(), source).toMatch(sentence);
        expect(await entry.locator('.decoration-wavy').count(), source).toBe(1);
      }
    }
    const started = Date.now();
    await ida.page.reload();
    await ida.entry('R = 1200 mm').locator('dl').first().waitFor();
    expect(Date.now() - started).toBeLessThan(15_000);
    expect(ida.complaints).toEqual([]);
  });

  it('keeps the last good value in sight while a line is being written', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.beginNotebook('Half written');
    await ida.write('dimension', 'R = 1200 mm');
    await ida.page.getByRole('group', { name: 'Exact value' }).waitFor();
    await ida.page.keyboard.type(' + (');
    await ida.page.getByRole('group', { name: 'Last good value' }).waitFor();
    await ida.page.locator('.cm-lintRange-error').waitFor();
    await ida.page.keyboard.type('1 mm)');
    await ida.page.getByRole('group', { name: 'Exact value' }).waitFor();
    await ida.page.locator('.cm-lintRange-error').waitFor({ state: 'detached' });
  });

  it('shows the last figures and says so when the server does not answer, and recovers', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.beginNotebook('Down the line');
    await ida.write('dimension', 'R = 1200 mm');
    await ida.page.getByRole('group', { name: 'Exact value' }).waitFor();
    await ida.page.route('**/api/evaluate', (route) => route.abort());
    await ida.page.keyboard.type(' + 1 mm');
    await ida.page.getByText('The connection is lost').waitFor();
    expect(await ida.page.getByRole('group', { name: 'Exact value' }).count()).toBe(1);
    await ida.page.unroute('**/api/evaluate');
    await ida.page.keyboard.type(' + 1 mm');
    await ida.page.getByText('The connection is back.').waitFor();
    await ida.page.getByRole('figure').getByText('1202 mm').waitFor();
  });
});

describe('wrong ways in', () => {
  it('a wrong password is one sentence that does not say which part was wrong', async () => {
    const nobody = await newVisitor();
    await nobody.open('/sign-in');
    for (const email of [IDA, 'nobody@ferrowick.example']) {
      await nobody.page.getByLabel('E-mail address').fill(email);
      await nobody.page.getByLabel('Password').fill('not the password');
      await nobody.page.getByRole('button', { name: 'Sign in' }).click();
      await nobody.page
        .getByText('This e-mail address and password do not belong together.')
        .waitFor();
    }
  });

  it('a notebook of others and one that is not look alike', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    const address = await ida.beginNotebook('For Ida only');
    const wren = await newVisitor();
    await wren.signIn(WREN);
    for (const path of [address, `${address.slice(0, -12)}000000000000`, '/client/not-a-token']) {
      const answer = await wren.page.goto(path);
      expect(answer?.status(), path).toBe(404);
      await wren.page.getByRole('heading', { name: 'There is no such sheet here' }).waitFor();
      expect(await wren.page.content()).not.toContain('For Ida only');
    }
  });

  it('who is not signed in comes back, after signing in, to where they wanted to go', async () => {
    const ida = await newVisitor();
    await ida.open('/settings');
    await ida.page.getByLabel('E-mail address').fill(IDA);
    await ida.page.getByLabel('Password').fill('limestone-and-lime');
    await ida.page.getByRole('button', { name: 'Sign in' }).click();
    await ida.page.waitForURL('**/settings');
    await ida.page.getByRole('button', { name: 'Sign out', exact: true }).click();
    await ida.page.getByRole('link', { name: 'Make an account' }).waitFor();
  });
});

describe('nothing typed is lost', () => {
  it('what was typed in the moment before a reload is on the sheet again, and is saved', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.beginNotebook('Torn off');
    await ida.write('dimension', 'R = 77 mm');
    await ida.page.reload({ waitUntil: 'networkidle' });
    await ida.awaken();
    await ida.page.getByText('R = 77 mm', { exact: true }).waitFor();
    await ida.page.getByText(/^Saved as version \d+$/).waitFor();
    expect(ida.complaints).toEqual([]);
  });

  it('a viewer reads, and is offered nothing that writes', async () => {
    const wren = await newVisitor();
    await wren.signIn(WREN);
    await wren.page.getByRole('link', { name: 'Seventeen-light window' }).click();
    await wren.page.waitForLoadState('networkidle');
    await wren.awaken();
    await wren.page.getByRole('group', { name: 'Exact value' }).first().waitFor();
    for (const name of ['Add a dimension', 'Undo', /^Keep version/]) {
      expect(await wren.page.getByRole('button', { name }).count()).toBe(0);
    }
    await wren.page.getByRole('button', { name: 'Hand over' }).click();
    expect(await wren.page.getByRole('button', { name: 'Client links' }).count()).toBe(0);
  });
});
