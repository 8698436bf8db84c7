import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let server: TestServer;
let unbuilt: TestServer;
let folder: string;

beforeAll(async () => {
  const pools = await openTestPools();
  folder = await mkdtemp(join(tmpdir(), 'millrace-client-'));
  await mkdir(join(folder, 'assets'));
  await writeFile(join(folder, 'index.html'), '<!doctype html><title>Millrace</title>');
  await writeFile(join(folder, 'theme.js'), '/* theme */');
  await writeFile(join(folder, '.fingerprint'), 'private');
  await writeFile(join(folder, 'assets', 'index-4f1c.js'), `export const text = '${'x'.repeat(4000)}';`);
  server = await startTestServer(pools, { clientFolder: folder });
  unbuilt = await startTestServer(pools, { clientFolder: join(folder, 'nowhere') });
});
afterAll(() => rm(folder, { recursive: true }));

describe('the client', () => {
  it('is served with files for ever where their name changes with their content, and never otherwise', async () => {
    const asset = await server.ask('GET', '/assets/index-4f1c.js');
    expect([asset.status, asset.headers.get('Cache-Control')]).toEqual([200, 'public, max-age=31536000, immutable']);
    const theme = await server.ask('GET', '/theme.js');
    expect([theme.status, theme.headers.get('Cache-Control')]).toEqual([200, 'public, max-age=0']);
  });

  it('finds its own screens: any path that is no file is its page', async () => {
    for (const path of ['/', '/alarms/0199', '/pumps/x?tab=wiring']) {
      const { status, headers, body } = await server.ask('GET', path);
      expect([path, status, headers.get('Cache-Control')]).toEqual([path, 200, 'no-cache']);
      expect(body).toContain('<title>Millrace</title>');
    }
  });

  it('does not take a missing file for a screen, nor show hidden files, nor leave its folder', async () => {
    const gone = await server.ask('GET', '/assets/gone-1234.js');
    expect([gone.status, gone.body.code]).toEqual([404, 'not-found']);
    expect((await server.ask('GET', '/assets/%')).status).toBe(400);
    expect((await server.ask('GET', '/.fingerprint')).body).not.toContain('private');
    const outside = await server.ask('GET', '/assets/%2e%2e/%2e%2e/%2e%2e/etc/passwd');
    expect(outside.body).not.toContain('root:');
  });

  it('runs under a policy that lets in nothing inline and nothing from elsewhere', async () => {
    const policy = (await server.ask('GET', '/')).headers.get('Content-Security-Policy') ?? '';
    expect(policy).toMatch(/default-src 'none'/);
    expect(policy).toMatch(/script-src 'self'/);
    expect(policy).toContain(`connect-src 'self' ${server.url.replace('http', 'ws')}`);
    expect(policy).not.toMatch(/unsafe|\*|data:/);
    const { headers } = await server.ask('GET', '/');
    expect(headers.get('X-Content-Type-Options')).toBe('nosniff');
    expect(headers.get('X-Powered-By')).toBeNull();
  });

  it('is compressed on its way', async () => {
    const answer = await fetch(`${server.url}/assets/index-4f1c.js`, { headers: { 'Accept-Encoding': 'gzip' } });
    expect(answer.headers.get('Content-Encoding')).toBe('gzip');
  });

  it('says what to type where it was not built', async () => {
    const { status, body } = await unbuilt.ask('GET', '/');
    expect([status, body]).toEqual([503, expect.stringContaining('npm run build')]);
  });
});
