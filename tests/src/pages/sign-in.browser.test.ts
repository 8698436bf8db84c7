import { expect, it } from 'vitest';
import { createPageBench } from './page-bench.ts';

const bench = createPageBench();

it('asks for what is missing and puts the cursor there', async () => {
  const { page } = await bench.open('/sign-in');
  await page.getByLabel('E-mail address').fill('manager@larkmoor.example');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByText('Enter your password.').waitFor();
  expect(await page.getByLabel('Password').evaluate((field) => field === document.activeElement)).toBe(true);
});

it('says that the two do not belong together, and keeps what was typed', async () => {
  const { page } = await bench.open('/sign-in');
  await page.getByLabel('E-mail address').fill('manager@larkmoor.example');
  await page.getByLabel('Password').fill('not-it');
  await page.keyboard.press('Enter');
  await page.getByRole('alert').getByText('do not belong together').waitFor();
  expect(await page.getByLabel('E-mail address').inputValue()).toBe('manager@larkmoor.example');
});

it('counts down when there were too many tries', async () => {
  const { page } = await bench.open('/sign-in', {
    prepare: (state) => {
      state.failures.set('/api/session', 'rate-limited');
      state.retryAfterSeconds = 2;
    },
  });
  await page.getByLabel('E-mail address').fill('manager@larkmoor.example');
  await page.getByLabel('Password').fill('millrace-demo');
  await page.keyboard.press('Enter');
  await page
    .getByRole('alert')
    .getByText(/Try again in \d s/)
    .waitFor();
  await page.getByText('You can try again now.').waitFor();
});

it('says where one is now: the heading of the page it leads to has the focus', async () => {
  const { page } = await bench.open('/sign-in');
  await page.getByLabel('E-mail address').fill('manager@larkmoor.example');
  await page.getByLabel('Password').fill('millrace-demo');
  await page.keyboard.press('Enter');
  await page.waitForURL(/fleet/);
  await page.waitForFunction(() => document.activeElement?.tagName === 'H1');
});

it('leads back to the page that was asked for, and shows a role its own first page', async () => {
  const { page, state } = await bench.open('/pumps/00000001-0000-4000-8000-000000000001?day=2026-11-30');
  await page.getByRole('heading', { name: 'Sign in to the watch desk' }).waitFor();
  await page.getByLabel('E-mail address').fill('tech@larkmoor.example');
  await page.getByLabel('Password').fill('millrace-demo');
  await page.keyboard.press('Enter');
  await page.getByRole('heading', { level: 1, name: /Tern Court 4/ }).waitFor();
  expect(new URL(page.url()).search).toBe('?day=2026-11-30');
  expect(await page.title()).toBe('Tern Court 4, Filter pump · Millrace');
  await page.getByRole('link', { name: 'millrace' }).click();
  await page.waitForURL('**/alarms');
  expect(state.role).toBe('technician');
});

it('signs out and leaves nothing to go back to', async () => {
  const { page } = await bench.open('/profile', { role: 'manager' });
  await page.getByRole('button', { name: 'Sign out' }).click();
  await page.getByRole('heading', { name: 'Sign in to the watch desk' }).waitFor();
  await page.goto(new URL('/fleet', page.url()).href);
  await page.getByRole('heading', { name: 'Sign in to the watch desk' }).waitFor();
});

it('sends somebody whose session has ended to the sign-in, and back after it', async () => {
  const { page, state } = await bench.open('/fleet', { role: 'manager' });
  await page.getByText('Tern Court 4').first().waitFor();
  state.role = undefined;
  // The page may find out by itself before anybody clicks.
  await page
    .getByRole('link', { name: 'Alarms' })
    .click({ timeout: 2000 })
    .catch(() => undefined);
  await page.getByRole('heading', { name: 'Sign in to the watch desk' }).waitFor();
  expect(new URL(page.url()).searchParams.get('to')).toMatch(/^\/(alarms|fleet)/);
});
