import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { letterTo, linkIn } from '../setup/letters';
import { IDA, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();
const PASSWORD = 'trammel and straightedge';
const NEW = 'a rod, a templet, a trammel';

let visitor: Visitor;
let email: string;

beforeAll(async () => {
  visitor = await newVisitor();
  email = `orla.${randomUUID()}@finch.example`;
});

async function trySignIn(password: string): Promise<void> {
  const { page } = visitor;
  await visitor.open('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

describe('an account from its first day to its last', () => {
  it('is made by the link in the letter, and not before', async () => {
    const { page } = visitor;
    await visitor.open('/sign-up');
    await page.getByLabel('Your name').fill('Orla Finch');
    await page.getByLabel('Workshop').fill('Finch Joinery');
    await page.getByLabel('E-mail address').fill(email);
    await page.getByLabel('Password').fill(PASSWORD);
    await page.getByRole('button', { name: 'Make an account' }).click();
    await page.getByText('Look into your mail').waitFor();
    await trySignIn(PASSWORD);
    await page.getByText('not confirmed yet').waitFor();
    await page.getByRole('button', { name: 'Send the letter again' }).click();
    await page.getByText('It was sent again').waitFor();
    const letter = await letterTo(email, { subject: 'Confirm your e-mail address', count: 2 });
    await visitor.open(new URL(linkIn(letter.text)).pathname);
    await page.getByRole('button', { name: 'Confirm the address' }).click();
    await page.getByText('the account is made').waitFor();
    await visitor.signIn(email, PASSWORD);
  });

  it('gets a new password when the old one is forgotten', async () => {
    const { page } = visitor;
    await visitor.context.clearCookies();
    await visitor.open('/sign-in');
    await page.getByRole('link', { name: 'Forgotten your password?' }).click();
    await page.waitForURL('**/forgot');
    await visitor.awaken();
    await page.getByLabel('E-mail address').fill(email);
    await page.getByRole('button', { name: 'Ask for a new password' }).click();
    await page.getByText('Look into your mail').waitFor();
    const letter = await letterTo(email, { subject: 'A new password' });
    await visitor.open(new URL(linkIn(letter.text)).pathname);
    await page.getByLabel('New password').fill(NEW);
    await page.getByRole('button', { name: 'Store the new password' }).click();
    await page.getByText('The new password is stored').waitFor();
    await visitor.signIn(email, NEW);
  });

  it('shows where the person is signed in and ends another session from here', async () => {
    const other = await newVisitor();
    await other.signIn(email, NEW);
    const { page } = visitor;
    await visitor.open('/settings');
    const ends = page.getByRole('button', { name: /^End the session with Chrome/ });
    // The session before the password was forgotten is over already.
    expect(await ends.count()).toBe(1);
    await ends.click();
    await ends.waitFor({ state: 'detached' });
    await other.page.goto('/notebooks');
    await other.page.waitForURL('**/sign-in?**');
    await other.context.close();
  });

  it('is deleted with the password, and opens no more', async () => {
    const { page } = visitor;
    await visitor.open('/settings');
    await page.getByRole('button', { name: 'Delete my account' }).click();
    await page.getByLabel('Your password').fill(NEW);
    await page.getByRole('button', { name: 'Delete for good' }).click();
    await page.waitForURL((url) => url.pathname === '/');
    await trySignIn(NEW);
    await page.getByText('do not belong together').waitFor();
  });
});

describe('the letters of this copy', () => {
  it('are read in a frame that runs nothing, whose links open', async () => {
    const ida = await newVisitor();
    await ida.signIn(IDA);
    await ida.open('/mail');
    const { page } = ida;
    await page.getByRole('row').filter({ hasText: email }).getByRole('link').first().click();
    const frame = page.frameLocator('iframe');
    await frame.getByRole('heading', { name: 'Your account was deleted' }).waitFor();
    await page.getByRole('link', { name: 'All letters' }).click();
    await page
      .getByRole('row')
      .filter({ hasText: email })
      .getByRole('link', { name: 'A new password' })
      .click();
    const [opened] = await Promise.all([
      ida.context.waitForEvent('page'),
      frame.getByRole('link', { name: 'Choose a new password' }).click(),
    ]);
    await opened.getByText('This link is not valid').waitFor();
    expect(ida.complaints).toEqual([]);
    await ida.context.close();
  });
});
