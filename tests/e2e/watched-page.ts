import type { Page } from 'playwright-core';

/** What went wrong in a page while nobody looked: console errors, errors nobody caught, breaches of the policy. */
export type PageTroubles = { readonly list: () => readonly string[] };

/**
 * A browser writes every answer 401 to the console. Asking who one is, and renewing that, is how a page learns that
 * nobody is signed in.
 */
const EXPECTED = /401 \(Unauthorized\) \S+\/api\/session(\/renewal)?$/;

/** Listens from before the page's first document. */
export async function gatherTroubles(page: Page): Promise<PageTroubles> {
  const troubles: string[] = [];
  page.on('console', (message) => {
    if (message.type() !== 'error' && message.type() !== 'warning') return;
    const text = `${message.text()} ${message.location().url}`;
    if (!EXPECTED.test(text)) troubles.push(text);
  });
  page.on('pageerror', (error) => troubles.push(`uncaught: ${error.message}`));
  await page.exposeBinding('noteViolation', (_source, text: string) => void troubles.push(`policy: ${text}`));
  await page.addInitScript(() => {
    addEventListener('securitypolicyviolation', ({ violatedDirective, blockedURI }) => {
      (window as unknown as { noteViolation: (text: string) => void }).noteViolation(
        `${violatedDirective} ${blockedURI}`,
      );
    });
  });
  return { list: () => troubles };
}
