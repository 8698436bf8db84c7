import { createServer, type Server } from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { findPortTrouble, listPortTroubles } from '#server/bootstrap/ports.mjs';
import { findFreePort } from '#tests/support/free-port.ts';

const listening: Server[] = [];

afterEach(() => {
  for (const server of listening.splice(0)) server.close();
});

async function listenOn(host: string): Promise<number> {
  const server = createServer();
  listening.push(server);
  const port = await findFreePort();
  await new Promise<void>((done) => server.listen(port, host, done));
  return port;
}

describe('findPortTrouble', () => {
  it('finds nothing wrong with a free port, and leaves it free', async () => {
    const port = await findFreePort();
    expect(await findPortTrouble(port)).toBeUndefined();
    expect(await findPortTrouble(port)).toBeUndefined();
  });

  it.each(['127.0.0.1', '0.0.0.0', '::'])('notices a program that listens on %s', async (host) => {
    expect(await findPortTrouble(await listenOn(host))).toBe('EADDRINUSE');
  });
});

describe('listPortTroubles', () => {
  it('names each port that is taken, and a variable with a value that may be typed', async () => {
    const taken = await listenOn('127.0.0.1');
    const lines = await listPortTroubles({ PORT: await findFreePort(), SMTP_PORT: taken });
    expect(lines).toHaveLength(1);
    const [, port] = /SMTP_PORT=(\d+) npm start$/.exec(lines[0] ?? '') ?? [];
    expect(Number(port)).toBeGreaterThan(0);
    expect(Number(port)).toBeLessThan(65_536);
    expect(Number(port)).not.toBe(taken);
  });
});
