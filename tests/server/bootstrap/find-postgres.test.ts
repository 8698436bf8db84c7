import { chmodSync, mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { choosePostgres, listCandidateFolders, listPostgres, parseMajor } from '#server/bootstrap/find-postgres.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

/** A folder that looks like PostgreSQL's programs of one version. */
function makePrograms(root: string, version: string, programs = ['postgres', 'initdb', 'psql']): string {
  const folder = join(root, version, 'bin');
  mkdirSync(folder, { recursive: true });
  for (const program of programs) {
    writeFileSync(join(folder, program), `#!/bin/sh\necho "postgres (PostgreSQL) ${version}"\n`);
    chmodSync(join(folder, program), 0o755);
  }
  return folder;
}

const makeRoot = () => makeTemporaryFolder('programs');

describe('parseMajor', () => {
  it.each([
    ['postgres (PostgreSQL) 15.18 (Debian 15.18-0+deb12u1)', 15],
    ['postgres (PostgreSQL) 17beta2', 17],
    ['psql: command not found', undefined],
    ['', undefined],
  ])('reads %j as %s', (text, major) => {
    expect(parseMajor(text)).toBe(major);
  });
});

describe('listPostgres', () => {
  it('finds what Debian keeps outside the PATH, newest first, and passes over what is too old', async () => {
    const root = makeRoot();
    for (const version of ['9.6', '15.3', '17.1']) makePrograms(root, version);
    const candidates = listCandidateFolders({ debianRoot: root, path: '' });
    expect((await listPostgres(candidates)).map(({ major }) => major)).toEqual([17, 15]);
  });

  it('finds what is on the PATH', async () => {
    const folder = makePrograms(makeRoot(), '16.2');
    const candidates = listCandidateFolders({ debianRoot: '/nowhere', path: `/also-nowhere:${folder}` });
    expect(await listPostgres(candidates)).toEqual([{ folder, major: 16 }]);
  });

  it('passes over a client without a server', async () => {
    const root = makeRoot();
    makePrograms(root, '16.2', ['psql']);
    expect(await listPostgres(listCandidateFolders({ debianRoot: root, path: '' }))).toEqual([]);
  });
});

describe('choosePostgres', () => {
  const found = [
    { folder: '/17', major: 17 },
    { folder: '/15', major: 15 },
  ];

  it('takes the newest for a new database', () => {
    expect(choosePostgres(found, undefined)).toEqual({ tag: 'use', postgres: found[0] });
  });

  it('takes the one that made the database', () => {
    expect(choosePostgres(found, 15)).toEqual({ tag: 'use', postgres: found[1] });
  });

  it('says which ones there are when none of them made the database', () => {
    expect(choosePostgres(found, 16)).toEqual({ tag: 'other-major', majors: [17, 15] });
  });

  it('says when there is none at all', () => {
    expect(choosePostgres([], 15)).toEqual({ tag: 'missing' });
  });
});
