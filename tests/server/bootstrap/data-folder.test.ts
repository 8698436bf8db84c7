import { existsSync, mkdirSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import {
  chooseSocketFolder,
  findDatabaseFolder,
  isOurs,
  openDatabaseFolder,
  openDataFolder,
} from '#server/bootstrap/data-folder.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

const makeFolder = () => makeTemporaryFolder('data');

describe('openDataFolder', () => {
  it('makes a folder that says whose it is and that others may only pass through', () => {
    const folder = openDataFolder(join(makeFolder(), 'one', 'two'));
    expect(isOurs(folder)).toBe(true);
    expect(statSync(folder).mode & 0o777).toBe(0o711);
    expect(statSync(join(folder, 'logs')).mode & 0o777).toBe(0o700);
    expect(openDataFolder(folder)).toBe(folder);
  });

  it('refuses a folder that holds something else, and adds nothing to it', () => {
    const folder = makeFolder();
    writeFileSync(join(folder, 'letter.txt'), 'Dear');
    expect(() => openDataFolder(folder)).toThrow('MILLRACE_DATA=… npm start');
    expect(readdirSync(folder)).toEqual(['letter.txt']);
  });

  it('says what to do when the place cannot be used', () => {
    const file = join(makeFolder(), 'file');
    writeFileSync(file, '');
    expect(() => openDataFolder(file)).toThrow(/cannot be used \(EEXIST\).*MILLRACE_DATA/);
  });
});

describe('openDatabaseFolder', () => {
  it('lies in the data folder where its account can get there, closed to others', async () => {
    const dataFolder = openDataFolder(makeFolder());
    const folder = await openDatabaseFolder(dataFolder, undefined);
    expect(folder).toBe(join(dataFolder, 'postgres'));
    expect(statSync(folder).mode & 0o777).toBe(0o700);
    expect(findDatabaseFolder(dataFolder)).toBe(folder);
  });

  it('lies elsewhere where its account cannot, in the same place at every start', async () => {
    const [dataFolder, elsewhere] = [openDataFolder(makeFolder()), makeFolder()];
    const folder = await openDatabaseFolder(dataFolder, undefined, { elsewhere, isReachable: false });
    expect(folder.startsWith(`${elsewhere}/`)).toBe(true);
    expect(isOurs(join(folder, '..'))).toBe(true);
    expect(findDatabaseFolder(dataFolder)).toBe(folder);
    expect(await openDatabaseFolder(dataFolder, undefined, { elsewhere: '/other', isReachable: true })).toBe(folder);
  });

  it('does not make a second database when the way to the first was closed', async () => {
    const [dataFolder, elsewhere] = [openDataFolder(makeFolder()), makeFolder()];
    await openDatabaseFolder(dataFolder, undefined);
    const opening = openDatabaseFolder(dataFolder, undefined, { elsewhere, isReachable: false });
    await expect(opening).rejects.toThrow('chmod o+x');
    expect(readdirSync(elsewhere)).toEqual([]);
  });

  it('knows of no database before one was made', () => {
    const folder = makeFolder();
    mkdirSync(join(folder, 'logs'));
    expect(findDatabaseFolder(folder)).toBeUndefined();
    expect(existsSync(join(folder, 'postgres'))).toBe(false);
  });
});

describe('chooseSocketFolder', () => {
  it('lies beside the database', () => {
    expect(chooseSocketFolder('/srv/millrace/postgres', 4313)).toBe('/srv/millrace/postgres/socket');
  });

  // sun_path holds 108 bytes and a closing zero: unix(7).
  it('is nowhere when the socket’s path would not fit, counted in bytes', () => {
    const fits = `/${'x'.repeat(107 - 1 - '/socket/.s.PGSQL.4313'.length)}`;
    expect(chooseSocketFolder(fits, 4313)).toBe(`${fits}/socket`);
    expect(chooseSocketFolder(`${fits}x`, 4313)).toBe('');
    expect(chooseSocketFolder(`/${'ß'.repeat(60)}`, 4313)).toBe('');
  });
});
