import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import type { Role } from '#shared/contract/primitives.ts';
import { fakeId } from '#tests/src/fake-api/fake-id.ts';
import { listAxeViolations } from '#tests/support/browser.ts';
import { createPageBench, eventually } from './page-bench.ts';

const bench = createPageBench();

type Screen = { readonly name: string; readonly path: string; readonly role?: Role; readonly ready: string };

const SCREENS: readonly Screen[] = [
  { name: 'sign-in', path: '/sign-in', ready: 'Sign in to the watch desk' },
  { name: 'fleet', path: '/fleet', role: 'manager', ready: 'Tern Court 4' },
  { name: 'pump', path: `/pumps/${fakeId('pump', 2)}`, role: 'manager', ready: 'Motor, wet end, device' },
  { name: 'alarms', path: '/alarms', role: 'manager', ready: 'Did not prime, 3 tries' },
  { name: 'alarm table', path: '/alarms?view=table', role: 'manager', ready: 'Did not prime, 3 tries' },
  { name: 'alarm', path: `/alarms/${fakeId('alarm', 1)}`, role: 'technician', ready: 'Look first, power stays on' },
  { name: 'alarm health', path: '/alarms/health', role: 'manager', ready: 'What repeats most' },
  { name: 'energy', path: '/energy?month=2026-11', role: 'manager', ready: 'The same for $31.20 a month less' },
  {
    name: 'energy of a pad',
    path: `/energy/pads/${fakeId('pad', 2)}`,
    role: 'manager',
    ready: 'Pump by pump',
  },
  { name: 'my pump', path: '/my-pump', role: 'homeowner', ready: 'What happened lately' },
  { name: 'profile', path: '/profile', role: 'manager', ready: 'How you read Millrace' },
  { name: 'no such page', path: '/nowhere', role: 'manager', ready: 'No such page' },
  { name: 'forbidden', path: '/fleet', role: 'homeowner', ready: 'This page is not for your role.' },
];

const open = async ({ path, role, ready }: Screen, more: Parameters<typeof bench.open>[1] = {}): Promise<Page> => {
  const { page } = await bench.open(path, { ...(role === undefined ? {} : { role }), ...more });
  await page.getByText(ready).first().waitFor();
  await page.waitForLoadState('networkidle');
  return page;
};

// A screen is opened once a size: opening costs more than looking at it.
describe.each(SCREENS)('$name', (screen) => {
  it('has one first heading, a title of its own, and nothing that axe finds wrong by WCAG 2.2 AA, light or dark', async () => {
    const page = await open(screen, { theme: 'light' });
    expect(await page.getByRole('heading', { level: 1 }).count()).toBe(1);
    expect(await page.title()).toMatch(/^.+ · Millrace$/);
    for (const theme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme: theme });
      await eventually(() => page.evaluate(() => document.documentElement.dataset.theme)).toBe(theme);
      expect(await listAxeViolations(page), theme).toEqual([]);
    }
  });

  it('fits 320 px without scrolling sideways, and has nothing wrong there', async () => {
    const page = await open(screen, { width: 320, height: 640 });
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(320);
    expect(await listAxeViolations(page)).toEqual([]);
  });
});

it('can be walked through by keyboard, the focus always in sight', async () => {
  const page = await open(SCREENS[1]!);
  const seen: string[] = [];
  for (let step = 0; step < 30; step += 1) {
    await page.keyboard.press('Tab');
    const focus = await page.evaluate(() => {
      const element = document.activeElement;
      if (!(element instanceof HTMLElement)) return undefined;
      const style = getComputedStyle(element);
      const after = getComputedStyle(element, '::after');
      const ring = [style, after].some(
        ({ outlineStyle, outlineWidth }) => outlineStyle !== 'none' && outlineWidth !== '0px',
      );
      return { name: element.getAttribute('aria-label') ?? element.textContent ?? element.tagName, ring };
    });
    expect(focus?.ring, focus?.name).toBe(true);
    seen.push(focus?.name ?? '');
  }
  expect(seen[0]).toBe('Skip to the page');
  expect(new Set(seen).size).toBeGreaterThan(20);
});

it('skips to the page', async () => {
  const page = await open(SCREENS[1]!);
  await page.keyboard.press('Tab');
  await page.keyboard.press('Enter');
  expect(await page.evaluate(() => document.activeElement?.id)).toBe('page');
});

it('moves nothing for those who asked for less motion', async () => {
  const page = await open(SCREENS[1]!);
  await page.emulateMedia({ reducedMotion: 'reduce' });
  const longest = await page
    .locator('canvas')
    .first()
    .evaluate((canvas) => Number.parseFloat(getComputedStyle(canvas).transitionDuration));
  expect(longest).toBeLessThan(0.001);
});

it('is light ink on paper when it is printed from a dark screen', async () => {
  const page = await open(SCREENS[1]!, { theme: 'dark' });
  await page.emulateMedia({ media: 'print' });
  await eventually(() => page.evaluate(() => document.documentElement.dataset.theme)).toBe('light');
  expect(await page.getByRole('navigation', { name: 'Pages' }).count()).toBe(0);
  expect(
    await page
      .getByRole('listitem')
      .filter({ has: page.locator('canvas') })
      .count(),
  ).toBeGreaterThanOrEqual(36);
});
