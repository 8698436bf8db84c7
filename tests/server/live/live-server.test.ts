import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { pino } from 'pino';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { WebSocket } from 'ws';
import { createContainer } from '#server/container.ts';
import { newId } from '#server/db/new-id.ts';
import type { Pools } from '#server/db/pools.ts';
import { signAccessToken } from '#server/features/session/access-token.ts';
import { type LiveServer, startLiveServer } from '#server/live/live-server.ts';
import { createLiveSight } from '#server/live-sight.ts';
import { CLOSE_BAD_FRAME, CLOSE_NOT_SIGNED_IN, LIVE_PATH, ServerFrame } from '#shared/contract/socket/frames.ts';
import { makeTestCompany, TEST_DEVICE_KEY, type TestCompany, type TestPerson } from '#tests/support/test-company.ts';
import { addAlarm, addHour, setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { TEST_TOKEN_KEY } from '#tests/support/test-server.ts';

type News = Extract<ServerFrame, { type: 'news' }>;

/** A browser's end of a live connection, every frame held against the contract. */
class Screen {
  readonly frames: ServerFrame[] = [];
  readonly #socket: WebSocket;
  #wake: () => void = () => undefined;

  constructor(url: string, headers: Record<string, string>) {
    this.#socket = new WebSocket(url, { headers });
    this.#socket.on('message', (data) => {
      this.frames.push(ServerFrame.parse(JSON.parse(String(data))));
      this.#wake();
    });
    this.#socket.on('error', () => undefined);
  }

  /** Resolves with the first frame that fits, waiting for it where it has not come yet. */
  async see<Type extends ServerFrame['type']>(
    type: Type,
    fits: (frame: Extract<ServerFrame, { type: Type }>) => boolean = () => true,
  ): Promise<Extract<ServerFrame, { type: Type }>> {
    const isType = (frame: ServerFrame): frame is Extract<ServerFrame, { type: Type }> => frame.type === type;
    for (;;) {
      const found = this.frames.filter(isType).find(fits);
      if (found !== undefined) return found;
      await new Promise<void>((resolve) => {
        this.#wake = resolve;
      });
    }
  }

  watch(pumps: readonly string[]): void {
    this.#socket.send(JSON.stringify({ type: 'watch', pumps }));
  }
  send(text: string): void {
    this.#socket.send(text);
  }
  async closed(): Promise<number> {
    const [code] = await once(this.#socket, 'close');
    return code;
  }
  /** The status with which the upgrade was refused. */
  async refused(): Promise<number | undefined> {
    const [, response] = await once(this.#socket, 'unexpected-response');
    return response.statusCode;
  }
  close(): void {
    this.#socket.close();
  }
}

describe('live connections', () => {
  let pools: Pools;
  let company: TestCompany;
  let other: TestCompany;
  let live: LiveServer;
  let address: string;
  let endSession: (sessionId: string) => void;
  const clock = { now: Date.now() };
  const screens: Screen[] = [];
  const server = createServer();

  beforeAll(async () => {
    pools = await openTestPools();
    [company, other] = [await makeTestCompany(pools.machine), await makeTestCompany(pools.machine)];
    server.listen(0, '127.0.0.1');
    await once(server, 'listening');
    address = `127.0.0.1:${(server.address() as AddressInfo).port}`;
    const log = pino({ level: 'silent' });
    const now = () => clock.now;
    const { authenticate, endedSessions } = createContainer({
      env: {
        publicUrl: `http://${address}`,
        tokenKey: TEST_TOKEN_KEY,
        deviceKey: TEST_DEVICE_KEY,
        isDemo: false,
        checksAnswers: true,
        http: { trustedProxies: 0 },
      },
      pools,
      log,
      now,
      watch: { isBrokerUp: () => true, findFoldLagSeconds: () => 0 },
    });
    endSession = endedSessions.end;
    live = startLiveServer(server, {
      log,
      now,
      publicUrl: `http://${address}`,
      authenticate,
      onSessionEnded: endedSessions.onEnded,
      ...createLiveSight(pools.app, now),
    });
  });
  afterAll(async () => {
    for (const screen of screens) screen.close();
    await live.stop();
    server.close();
  });

  function open(person: TestPerson | undefined, headers: Record<string, string> = {}, sessionId = newId()): Screen {
    const token =
      person && signAccessToken(TEST_TOKEN_KEY, { ...person.sight, name: person.email, sessionId }, clock.now).token;
    const cookie: Record<string, string> = token === undefined ? {} : { Cookie: `millrace-access=${token}` };
    const screen = new Screen(`ws://${address}${LIVE_PATH}`, { Origin: `http://${address}`, ...cookie, ...headers });
    screens.push(screen);
    return screen;
  }

  const pumpAt = (index: number): string => {
    const pump = company.pumps[index];
    if (pump === undefined) throw new Error('the test company has three pumps');
    return pump.pumpId;
  };
  const pumpsOf = (frame: News): string[] => frame.pumps.map(({ pumpId }) => pumpId);

  it('refuses a stranger, and a page of another site', async () => {
    expect(await open(undefined).refused()).toBe(401);
    expect(await open(company.manager, { Origin: 'http://elsewhere.example' }).refused()).toBe(403);
  });

  it('tells a manager of watched pumps, of their runs, and of every alarm of the company', async () => {
    const screen = open(company.manager);
    await screen.see('hello');
    screen.watch([pumpAt(0)]);
    await setState(pools.machine, pumpAt(0), new Date(clock.now), { rpm: 2345 });
    await addHour(pools.machine, pumpAt(0), new Date(clock.now - 7_200_000));
    const alarmId = await addAlarm(pools.machine, pumpAt(2));
    live.ring();

    const news = await screen.see('news', (frame) => frame.alarms.some(({ id }) => id === alarmId));

    expect(news.pumps.find(({ pumpId }) => pumpId === pumpAt(0))?.now?.rpm).toBe(2345);
    expect(pumpsOf(news)).toContain(pumpAt(2));
    expect(news.runs.map(({ pumpId }) => pumpId)).toContain(pumpAt(0));
  });

  it('tells nobody of another company’s pump, nor a homeowner of a neighbour’s', async () => {
    const [stranger, homeowner] = [open(other.manager), open(company.homeowner)];
    await Promise.all([stranger.see('hello'), homeowner.see('hello')]);
    for (const screen of [stranger, homeowner]) screen.watch([pumpAt(0), pumpAt(2)]);
    const theirs = await addAlarm(pools.machine, pumpAt(2), { detector: 'stopped' });
    const own = await addAlarm(pools.machine, pumpAt(0), { detector: 'stopped' });
    const elsewhere = await addAlarm(pools.machine, other.pumps[0]?.pumpId ?? '', { detector: 'stopped' });
    live.ring();

    const seen = await homeowner.see('news', (frame) => frame.alarms.some(({ id }) => id === own));
    await stranger.see('news', (frame) => frame.alarms.some(({ id }) => id === elsewhere));

    expect(seen.alarms.map(({ id }) => id)).not.toContain(theirs);
    expect(seen.alarms[0]).toMatchObject({ customerName: null, acknowledgedBy: null });
    const heard = stranger.frames.flatMap((frame) =>
      frame.type === 'news' ? [...pumpsOf(frame), ...frame.alarms.map(({ id }) => id)] : [],
    );
    expect(heard).not.toContain(own);
    expect(heard).not.toContain(pumpAt(0));
  });

  it('closes at the end of the session, and on a frame that is not of the contract', async () => {
    const sessionId = newId();
    const [ending, babbling] = [open(company.technician, {}, sessionId), open(company.technician)];
    await Promise.all([ending.see('hello'), babbling.see('hello')]);
    const codes = [ending.closed(), babbling.closed()];
    endSession(sessionId);
    babbling.send('{"type":"start-the-pump"}');

    expect(await Promise.all(codes)).toEqual([CLOSE_NOT_SIGNED_IN, CLOSE_BAD_FRAME]);
  });
});
