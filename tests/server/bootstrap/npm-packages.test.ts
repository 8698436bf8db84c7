import { mkdirSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { mustInstallNpmPackages } from '#server/bootstrap/npm-packages.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

let project: string;
const lock = () => join(project, 'package-lock.json');
const installed = () => join(project, 'node_modules', '.package-lock.json');

beforeEach(() => {
  project = makeTemporaryFolder('npm');
  mkdirSync(join(project, 'node_modules', 'vitest'), { recursive: true });
  for (const file of [lock(), installed()]) writeFileSync(file, '{}');
  utimesSync(lock(), 1_000, 1_000);
  utimesSync(installed(), 2_000, 2_000);
});

describe('mustInstallNpmPackages', () => {
  it('leaves alone what is newer than the lock file', () => {
    expect(mustInstallNpmPackages(project, ['vitest'])).toBe(false);
  });

  it('wants packages where there are none', () => {
    rmSync(join(project, 'node_modules'), { recursive: true });
    expect(mustInstallNpmPackages(project)).toBe(true);
  });

  it('wants them again after an installation that was interrupted', () => {
    rmSync(installed());
    expect(mustInstallNpmPackages(project)).toBe(true);
  });

  it('wants them again after the lock file changed', () => {
    utimesSync(lock(), 3_000, 3_000);
    expect(mustInstallNpmPackages(project)).toBe(true);
  });

  it('wants the tests’ own where they were left out', () => {
    expect(mustInstallNpmPackages(project, ['vitest', 'typescript'])).toBe(true);
  });
});
