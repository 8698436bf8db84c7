import { pino } from 'pino';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createCompanyHub, NEWS_EVERY_MS } from '#server/live/company-hub.ts';
import type { LiveConnection } from '#server/live/live-connection.ts';
import type { Changes } from '#shared/contract/http/changes.ts';

const SOON_MS = NEWS_EVERY_MS + 1;

/** A connection that writes down what it is told. */
function createListener() {
  const heard: string[] = [];
  const connection = {
    hello: (cursor: string) => heard.push(`hello ${cursor}`),
    tell: () => heard.push('news'),
    heartbeat: (cursor: string) => heard.push(`heartbeat ${cursor}`),
    resync: () => heard.push('resync'),
  } as unknown as LiveConnection;
  return { heard, connection };
}

const changesAt = (cursor: string): Changes => ({
  cursor,
  complete: true,
  pumps: [],
  runs: [],
  alarms: [],
  serverNow: 0,
});

const readChanges = vi.fn<(companyId: string, since: string | undefined) => Promise<Changes>>();
const createHub = () =>
  createCompanyHub('company', {
    readChanges,
    hideStaffWords: (alarm) => alarm,
    now: () => Date.now(),
    log: pino({ level: 'silent' }),
  });

beforeEach(() => vi.useFakeTimers());
afterEach(() => {
  vi.useRealTimers();
  readChanges.mockReset();
});

describe('a heartbeat', () => {
  it('says with a fresh cursor that the screens are up to date', async () => {
    const { heard, connection } = createListener();
    const hub = createHub();
    readChanges.mockResolvedValueOnce(changesAt('1'));
    await hub.add(connection);
    readChanges.mockResolvedValueOnce(changesAt('7'));
    hub.heartbeat();
    await vi.advanceTimersByTimeAsync(SOON_MS);
    expect(heard).toEqual(['hello 1', 'news', 'heartbeat 7']);
  });

  it('is kept back while the database cannot be asked, and comes once it can', async () => {
    const { heard, connection } = createListener();
    const hub = createHub();
    readChanges.mockResolvedValueOnce(changesAt('1'));
    await hub.add(connection);
    readChanges.mockRejectedValue(new Error('the database is gone'));
    hub.heartbeat();
    await vi.advanceTimersByTimeAsync(30_000);
    expect(heard).toEqual(['hello 1']);
    readChanges.mockResolvedValue(changesAt('9'));
    await vi.advanceTimersByTimeAsync(SOON_MS);
    expect(heard.at(-1)).toBe('heartbeat 9');
  });
});
