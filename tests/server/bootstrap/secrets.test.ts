import { readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { getSecrets } from '#server/bootstrap/secrets.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

const makeFolder = () => makeTemporaryFolder('secrets');

describe('getSecrets', () => {
  it('makes four different ones of 256 bits, readable by their owner only', () => {
    const folder = makeFolder();
    const secrets = Object.values(getSecrets(folder));
    expect(new Set(secrets).size).toBe(4);
    for (const secret of secrets) expect(secret).toMatch(/^[0-9a-f]{64}$/);
    expect(statSync(join(folder, 'secrets.json')).mode & 0o777).toBe(0o600);
  });

  it('keeps them', () => {
    const folder = makeFolder();
    expect(getSecrets(folder)).toEqual(getSecrets(folder));
  });

  it('makes the one that an older version did not have, and keeps the others', () => {
    const folder = makeFolder();
    const { deviceKey, ...older } = getSecrets(folder);
    writeFileSync(join(folder, 'secrets.json'), JSON.stringify(older));
    const secrets = getSecrets(folder);
    expect(secrets).toMatchObject(older);
    expect(secrets.deviceKey).toMatch(/^[0-9a-f]{64}$/);
    expect(secrets.deviceKey).not.toBe(deviceKey);
  });

  it('does not replace a file it cannot read', () => {
    const folder = makeFolder();
    writeFileSync(join(folder, 'secrets.json'), '{"superuserPassword": "ab');
    expect(() => getSecrets(folder)).toThrow('npm run reset');
    expect(readFileSync(join(folder, 'secrets.json'), 'utf8')).toBe('{"superuserPassword": "ab');
  });
});
