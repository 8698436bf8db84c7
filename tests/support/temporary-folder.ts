import { mkdtempSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { findQuickFolder } from '#server/bootstrap/quick-folder.mjs';

const made: string[] = [];

// Registered for the test file that imports this: each file has an instance of its own.
afterAll(() => {
  for (const folder of made.splice(0)) rmSync(folder, { recursive: true, force: true });
});

/** A folder of one's own that is gone when the test file is: below the run's own folder when there is a run. */
export function makeTemporaryFolder(name: string): string {
  const folder = mkdtempSync(join(process.env.MILLRACE_TEST_RUN ?? findQuickFolder(), `millrace-${name}-`));
  made.push(folder);
  return folder;
}
