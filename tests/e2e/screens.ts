import type { Page } from 'playwright-core';
import { listAxeViolations } from '#tests/support/browser.ts';

/** Every way in which a screen is looked at: on a desk and on a phone, in light and in dark. */
const VIEWS = [
  { name: 'desktop light', width: 1440, height: 1000, colorScheme: 'light' },
  { name: 'phone light', width: 390, height: 844, colorScheme: 'light' },
  { name: 'phone dark', width: 390, height: 844, colorScheme: 'dark' },
  { name: 'desktop dark', width: 1440, height: 1000, colorScheme: 'dark' },
] as const;

/** The narrowest screen that WCAG 2.2 asks for without scrolling in two directions (1.4.10), CSS pixels. */
const NARROWEST_PX = 320;

/** Waits until nothing on the page says any more that it is still loading. */
export async function waitUntilDrawn(page: Page): Promise<void> {
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await page.waitForFunction(() => document.querySelector('[aria-busy="true"]') === null);
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
}

/** Looks at the screen that is open in every view; what is wrong with it, in words. */
export async function examineScreen(page: Page): Promise<string[]> {
  const faults: string[] = [];
  await waitUntilDrawn(page);
  for (const { name, width, height, colorScheme } of VIEWS) {
    await page.emulateMedia({ colorScheme });
    await page.setViewportSize({ width, height });
    await waitUntilDrawn(page);
    for (const { id, help, targets } of await listAxeViolations(page)) {
      faults.push(`${name}: ${id} (${help}) at ${targets.join(' | ')}`);
    }
  }
  await page.setViewportSize({ width: NARROWEST_PX, height: 640 });
  await waitUntilDrawn(page);
  // A chart takes its new width a moment after the window has it.
  const fits = (limit: number): boolean => document.documentElement.scrollWidth <= limit;
  await page.waitForFunction(fits, NARROWEST_PX, { timeout: 5000 }).catch(() => undefined);
  const widest = await page.evaluate(() => document.documentElement.scrollWidth);
  if (widest > NARROWEST_PX) faults.push(`scrolls sideways at ${NARROWEST_PX} px: ${widest} px wide`);
  await page.setViewportSize({ width: 1440, height: 1000 });
  return faults;
}
