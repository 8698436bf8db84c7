import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { buildClient, isClientBuilt } from '#server/bootstrap/build-client.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

let project: string;
const write = (file: string, text: string) => writeFileSync(join(project, file), text);
const builtText = () => {
  const folder = join(project, 'dist', 'assets');
  return readdirSync(folder)
    .map((file) => readFileSync(join(folder, file), 'utf8'))
    .join('');
};

beforeEach(() => {
  project = makeTemporaryFolder('client');
  symlinkSync(resolve('node_modules'), join(project, 'node_modules'));
  mkdirSync(join(project, 'src'));
  write('index.html', '<!doctype html><script type="module" src="/src/main.ts"></script>');
  write('src/main.ts', 'document.title = "first";');
});

describe('buildClient', () => {
  it('builds once, and again when a source changes by content', async () => {
    expect(isClientBuilt(project)).toBe(false);
    await buildClient(project);
    expect(isClientBuilt(project)).toBe(true);
    write('src/main.ts', 'document.title = "second";');
    expect(isClientBuilt(project)).toBe(false);
    await buildClient(project);
    expect(builtText()).toContain('second');
    write('src/main.ts', 'document.title = "second";');
    expect(isClientBuilt(project)).toBe(true);
    expect(readdirSync(join(project, '.cache'))).toEqual([]);
  });

  it('notices a file that is new or gone', async () => {
    await buildClient(project);
    write('src/other.ts', '');
    expect(isClientBuilt(project)).toBe(false);
    rmSync(join(project, 'src/other.ts'));
    expect(isClientBuilt(project)).toBe(true);
  });

  it('keeps the client that works when the next cannot be built, and says why', async () => {
    await buildClient(project);
    write('src/main.ts', 'import "./nowhere.ts";');
    await expect(buildClient(project)).rejects.toThrow(/could not be built.*nowhere/s);
    expect(builtText()).toContain('first');
    expect(isClientBuilt(project)).toBe(false);
  });

  it('stops when it is no longer wanted', async () => {
    const stop = new AbortController();
    const building = buildClient(project, { signal: stop.signal });
    stop.abort();
    await building;
    expect(existsSync(join(project, 'dist'))).toBe(false);
  });
});
