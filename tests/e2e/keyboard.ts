import type { Page } from 'playwright-core';

/** Nobody should have to press it more often to get anywhere on a screen. */
const MOST_TABS = 60;

/** What has the focus: its role or tag and its name, as far as the document says. */
export const describeFocus = (page: Page): Promise<string> =>
  page.evaluate(() => {
    const focused = document.activeElement;
    return `${focused?.tagName.toLowerCase()} ${focused?.getAttribute('aria-label') ?? focused?.textContent ?? ''}`;
  });

/** Presses Tab until what has the focus fits; an error names everything that was passed. */
export async function tabTo(page: Page, fits: RegExp): Promise<void> {
  const passed: string[] = [];
  for (let count = 0; count < MOST_TABS; count += 1) {
    await page.keyboard.press('Tab');
    const focus = await describeFocus(page);
    if (fits.test(focus)) return;
    passed.push(focus.slice(0, 40));
  }
  throw new Error(`Tab does not reach ${fits}. It passed ${passed.join(', ')}`);
}

/** Whether one can see where the focus is: an outline that is drawn around it or around a part of it. */
export const isFocusVisible = (page: Page): Promise<boolean> =>
  page.evaluate(() => {
    const focused = document.activeElement;
    if (focused === null) return false;
    return [undefined, '::after'].some((part) => {
      const { outlineStyle, outlineWidth } = getComputedStyle(focused, part);
      return outlineStyle !== 'none' && Number.parseFloat(outlineWidth) >= 2;
    });
  });
