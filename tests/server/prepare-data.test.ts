import { mkdtemp, readFile, rm, stat } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { createPools } from '#server/db/pools.ts';
import { prepareData } from '#server/prepare-data.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';

describe('preparing a database', () => {
  it('makes the demo company once, and refuses work on a database that holds it', async () => {
    const { databaseUrl, drop } = await createFreshDatabase();
    const dataFolder = await mkdtemp(join(tmpdir(), 'millrace-seed-'));
    const openPools = () => createPools(databaseUrl, { onError: () => undefined });
    const start = async (isDemo: boolean) => {
      const env = { databaseUrl, isDemo, dataFolder, deviceKey: 'd'.repeat(40), historyDays: 0 };
      await (await prepareData({ env, openPools, onProgress: () => undefined })).end();
    };
    await start(false);
    await start(true);
    const file = join(dataFolder, 'demo-devices.json');
    expect(((await stat(file)).mode & 0o777).toString(8)).toBe('600');
    const { devices } = JSON.parse(await readFile(file, 'utf8'));
    expect(devices).toHaveLength(36);
    expect(devices[0]).toEqual({
      serial: expect.stringMatching(/^MR-\d{6}$/),
      secret: expect.stringMatching(/^[\w-]{43}$/),
    });
    await start(true);
    expect(JSON.parse(await readFile(file, 'utf8')).devices).toEqual(devices);
    await expect(start(false)).rejects.toThrow(/holds the demo company.*Remedy/);
    await rm(dataFolder, { recursive: true });
    await drop();
  });
});
