import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { CLOSE_NOT_SIGNED_IN, type ServerFrame } from '#shared/contract/socket/frames.ts';
import { LiveSocket } from '#src/lib/live/live-socket.ts';

/** The part of a browser's socket that ours uses, driven by the test. */
class FakeSocket extends EventTarget {
  readyState = 0;
  readonly sent: string[] = [];
  send(text: string) {
    this.sent.push(text);
  }
  close() {
    this.readyState = 3;
  }
  accept() {
    this.readyState = 1;
    this.dispatchEvent(new Event('open'));
  }
  say(frame: ServerFrame | string) {
    this.dispatchEvent(
      new MessageEvent('message', { data: typeof frame === 'string' ? frame : JSON.stringify(frame) }),
    );
  }
  break(code = 1006) {
    this.readyState = 3;
    this.dispatchEvent(Object.assign(new Event('close'), { code }));
  }
}

const PUMP = '00000001-0000-4000-8000-000000000001';
const HELLO: ServerFrame = { type: 'hello', serverNow: 1, cursor: '1' };

function setUp(renewed = true) {
  const sockets: FakeSocket[] = [];
  const phases: string[] = [];
  const frames: ServerFrame[] = [];
  const renewals = vi.fn(async () => renewed);
  const live = new LiveSocket({
    open: () => {
      const socket = new FakeSocket();
      sockets.push(socket);
      return socket as unknown as WebSocket;
    },
    now: () => Date.now(),
    chance: () => 1,
    isOnline: () => true,
    renewSession: renewals,
    onFrame: (frame) => frames.push(frame),
    onPhase: (phase) => phases.push(phase),
    listWatched: () => [PUMP],
  });
  live.start();
  const first = sockets[0]!;
  return { live, sockets, first, phases, frames, renewals };
}

beforeEach(() => {
  vi.useFakeTimers();
  vi.stubGlobal('WebSocket', { OPEN: 1 });
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

describe('the live connection', () => {
  it('says what is on screen after the hello and answers heartbeats', () => {
    const { first, live } = setUp();
    first.accept();
    first.say(HELLO);
    first.say({ type: 'heartbeat', serverNow: 2, cursor: '1' });
    expect(first.sent.map((text) => JSON.parse(text).type)).toEqual(['watch', 'heartbeat']);
    live.stop();
  });

  it('drops a frame that is not of the contract and goes on', () => {
    const { first, frames, live } = setUp();
    first.accept();
    first.say('{"type":"news"}');
    first.say('no json');
    first.say(HELLO);
    expect(frames).toEqual([HELLO]);
    live.stop();
  });

  it('is stale after a missed heartbeat, and given up and made again after two', async () => {
    const { first, phases, sockets, live } = setUp();
    first.accept();
    first.say(HELLO);
    await vi.advanceTimersByTimeAsync(16_000);
    expect(phases.at(-1)).toBe('stale');
    await vi.advanceTimersByTimeAsync(10_000);
    expect(phases.at(-1)).toBe('broken');
    await vi.advanceTimersByTimeAsync(1000);
    expect(sockets).toHaveLength(2);
    live.stop();
  });

  it('comes back with growing waits, and at once when it is hurried', async () => {
    const { first, sockets, live } = setUp();
    first.accept();
    first.say(HELLO);
    first.break();
    await vi.advanceTimersByTimeAsync(500);
    expect(sockets).toHaveLength(2);
    sockets[1]?.break();
    await vi.advanceTimersByTimeAsync(900);
    expect(sockets).toHaveLength(2);
    live.hurry();
    expect(sockets).toHaveLength(3);
    live.stop();
  });

  it('renews the session when the server asks who we are, and stops for good when that fails', async () => {
    const kept = setUp();
    kept.first.accept();
    kept.first.break(CLOSE_NOT_SIGNED_IN);
    await vi.advanceTimersByTimeAsync(500);
    expect(kept.renewals).toHaveBeenCalledTimes(1);
    expect(kept.sockets).toHaveLength(2);
    kept.live.stop();

    const lost = setUp(false);
    lost.first.accept();
    lost.first.break(CLOSE_NOT_SIGNED_IN);
    await vi.advanceTimersByTimeAsync(60_000);
    expect(lost.phases.at(-1)).toBe('signed-out');
    expect(lost.sockets).toHaveLength(1);
    lost.live.stop();
  });

  it('leaves nothing running when it is stopped', async () => {
    const { first, sockets, live } = setUp();
    first.break();
    await vi.advanceTimersByTimeAsync(0);
    live.stop();
    await vi.advanceTimersByTimeAsync(60_000);
    expect(sockets).toHaveLength(1);
    expect(vi.getTimerCount()).toBe(0);
  });
});
