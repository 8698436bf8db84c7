import { expect } from 'vitest';
import { querySuperuser, type TestStream } from './test-stream.ts';

/** Waits until everything that was stored is understood. */
export const waitUntilFolded = ({ stream }: Pick<TestStream, 'stream'>): Promise<void> =>
  expect
    .poll(async () => {
      await stream.drain();
      return stream.count().fold.lagMs;
    })
    .toBe(0);

/** Asks a database past every policy; which one is known only once the test has begun. */
export const queryOf =
  (database: () => { readonly superuserUrl: string }) =>
  <Row extends Record<string, unknown>>(text: string, ...values: unknown[]): Promise<Row[]> =>
    querySuperuser<Row>(database().superuserUrl, text, values);
