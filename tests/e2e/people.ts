import type { Browser, BrowserContext, Page } from 'playwright-core';

/** The demo company's people who may sign in. */
export const MANAGER = 'manager@larkmoor.example';
export const TECHNICIAN = 'tech@larkmoor.example';
export const HOMEOWNER = 'home@larkmoor.example';
const PASSWORD = 'millrace-demo';

/** A page of a browser of its own, signed in. */
export type Desk = { readonly page: Page; readonly context: BrowserContext; readonly close: () => Promise<void> };

/** Types address and password into the sign-in page that is open, and waits until it has let them in. */
export async function signIn(page: Page, email: string): Promise<void> {
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => url.pathname !== '/sign-in');
}

/** A person's own browser: nothing of anybody else's is in it. Every wait in it is patient. */
export async function openDesk(browser: Browser, url: string): Promise<Desk> {
  const context = await browser.newContext({ baseURL: url, locale: 'en-US', viewport: { width: 1440, height: 1000 } });
  context.setDefaultTimeout(60_000);
  const page = await context.newPage();
  return { page, context, close: () => context.close() };
}

/** Somebody who opens the watch desk and signs in. */
export async function openSignedIn(browser: Browser, url: string, email: string): Promise<Desk> {
  const desk = await openDesk(browser, url);
  await desk.page.goto('/');
  await signIn(desk.page, email);
  await desk.page.getByRole('heading', { level: 1 }).waitFor();
  return desk;
}
