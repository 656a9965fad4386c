import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { linkIn, startMailCatcher, type MailCatcher } from '../scripts/mail/catcher';
import { LAPTOP, person, PHONE, seriousProblems, startBrowser } from './browser';
import { settled } from './pages';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const EMAIL = 'hollis@example.org';
const PASSWORD = 'crooked tunes at dusk';
const NEW_PASSWORD = 'straight waltzes at dawn';

describe('the doors: from making an account to ending a sign-in, on real mails', () => {
  let database: SiteDatabase;
  let catcher: MailCatcher;
  let site: Site;
  let browser: Browser;
  let desk: Page;
  let phone: Page;
  let foreign: string[];
  let foreignPhone: string[];
  beforeAll(async () => {
    database = await freshDatabase();
    catcher = await startMailCatcher();
    site = await startSite(database.url, { mailUrl: catcher.url });
    browser = await startBrowser();
    // Each light and each screen is seen once: contrast is the light's, layout the screen's.
    ({ page: desk, foreign } = await person(browser, site.url, LAPTOP));
    ({ page: phone, foreign: foreignPhone } = await person(browser, site.url, PHONE, 'lamp'));
  });
  afterAll(async () => {
    await browser.close();
    await site.stop();
    await catcher.close();
    await database.drop();
  });

  const mailOf = (subject: RegExp) =>
    catcher.next((mail) => mail.to.includes(EMAIL) && subject.test(mail.subject));
  const isFine = async (page: Page) => {
    await settled(page);
    expect(await seriousProblems(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(
      1,
    );
  };
  const signIn = async (page: Page, password: string) => {
    await page.getByLabel('E-mail').fill(EMAIL);
    await page.getByLabel('Password').fill(password);
    await page.getByRole('button', { name: 'Sign in' }).click();
  };
  const isSignedOut = async (page: Page) => {
    await page.goto('/');
    await page.getByRole('heading', { name: 'Sign in' }).waitFor();
  };

  it('makes an account, whose address waits to be confirmed', async () => {
    await desk.goto('/register');
    await desk.getByLabel('Your name').fill('Hollis');
    await desk.getByLabel('E-mail').fill(EMAIL);
    await desk.getByLabel('Password').fill(PASSWORD);
    await desk.getByRole('button', { name: 'Make an account' }).click();
    await desk.getByRole('button', { name: 'Send it again' }).waitFor();
    await isFine(desk);
  });

  it('confirms the address by the link in the mail, on another device, with a press', async () => {
    const { url } = linkIn(await mailOf(/Confirm your e-mail address/));
    await phone.goto(url);
    await phone.getByRole('button', { name: 'Confirm this address' }).waitFor();
    await isFine(phone);
    await desk.reload();
    await desk.getByRole('button', { name: 'Send it again' }).waitFor();
    await phone.getByRole('button', { name: 'Confirm this address' }).click();
    await phone.getByRole('heading', { name: 'Your address is confirmed' }).waitFor();
    await isFine(phone);
    await desk.reload();
    await desk.getByRole('heading', { name: 'Make your first circle' }).waitFor();
    await settled(desk);
    expect(await desk.getByRole('button', { name: 'Send it again' }).count()).toBe(0);
    // Pressed once more, it says so.
    await phone.goto('about:blank');
    await phone.goto(url);
    await phone.getByRole('button', { name: 'Confirm this address' }).click();
    await phone.getByText('This link was used').waitFor();
    await isFine(phone);
  });

  it('replaces a forgotten password by the link in the mail, which ends all sign-ins', async () => {
    await phone.goto('/sign-in');
    await phone.getByRole('link', { name: 'Forgot your password?' }).click();
    await phone.getByRole('button', { name: 'Send me a link' }).waitFor();
    await isFine(phone);
    await phone.getByLabel('E-mail').fill(EMAIL);
    await phone.getByRole('button', { name: 'Send me a link' }).click();
    await phone.getByRole('heading', { name: 'Look at your mail' }).waitFor();
    await isFine(phone);
    const { url } = linkIn(await mailOf(/Choose a new password/));
    await phone.goto(url);
    await phone.getByLabel('New password').fill('password1234');
    await phone.getByRole('button', { name: 'Take this password' }).click();
    await phone.getByText('among the first that anybody would try').waitFor();
    await isFine(phone);
    await phone.getByLabel('New password').fill(NEW_PASSWORD);
    await phone.getByRole('button', { name: 'Take this password' }).click();
    await phone.getByRole('heading', { name: 'Your password is the new one' }).waitFor();
    await isFine(phone);
    await isSignedOut(desk);
    await mailOf(/Your password was changed/);
  });

  it('signs in with the new password alone', async () => {
    await signIn(desk, PASSWORD);
    await desk.getByText('No account has this e-mail and password.').waitFor();
    await signIn(desk, NEW_PASSWORD);
    await desk.getByRole('heading', { name: 'Make your first circle' }).waitFor();
    await phone.getByRole('link', { name: 'Sign in' }).click();
    await signIn(phone, NEW_PASSWORD);
    await phone.getByRole('heading', { name: 'Make your first circle' }).waitFor();
  });

  it('ends the phone’s sign-in from the desk', async () => {
    await desk.getByRole('button', { name: 'Account of Hollis' }).click();
    await desk.getByRole('menuitem', { name: 'Your account' }).click();
    const list = desk.getByRole('region', { name: 'Where you are signed in' });
    await list.getByRole('listitem').nth(1).waitFor();
    expect(await list.getByRole('listitem').count()).toBe(2);
    await isFine(desk);
    await phone.goto('/account');
    await phone.getByText('this one').waitFor();
    await isFine(phone);
    await list.getByRole('button', { name: /^End Chrome on Linux/ }).click();
    await expect.poll(() => list.getByRole('listitem').count(), { timeout: 10_000 }).toBe(1);
    await isSignedOut(phone);
    await desk.reload();
    await list.getByText('this one').waitFor();
  });

  it('hands out the data, and deletes the account', async () => {
    const saved = desk.waitForEvent('download');
    await desk.getByRole('link', { name: 'Download my data' }).click();
    expect((await saved).suggestedFilename()).toBe('pegwell-my-data.json');
    await desk.getByRole('button', { name: 'Delete my account …' }).click();
    const dialog = desk.getByRole('dialog');
    await dialog.getByLabel('Your password').fill(NEW_PASSWORD);
    await isFine(desk);
    await dialog.getByRole('button', { name: 'Delete my account' }).click();
    await desk.getByRole('heading', { name: 'Sign in' }).waitFor();
    await signIn(desk, NEW_PASSWORD);
    await desk.getByText('No account has this e-mail and password.').waitFor();
  });

  it('asked no other host for anything, and sent each mail once', () => {
    expect([...foreign, ...foreignPhone]).toEqual([]);
    expect(catcher.mails.map(({ subject }) => subject)).toEqual([
      'Confirm your e-mail address',
      'Choose a new password',
      'Your password was changed',
    ]);
  });
});
