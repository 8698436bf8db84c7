import type { WebSocket } from 'ws';
import type { Actor } from '#server/context.ts';
import { CLOSE_BAD_FRAME, CLOSE_NOT_SIGNED_IN, CLOSE_TOO_SLOW, ClientFrame } from '#shared/contract/socket/frames.ts';
import { type CompanyNews, composeNews, type Sight } from './compose-news.ts';

/** Above this nothing more is queued for a connection; it is told to read again once it has caught up. */
export const SLOW_BYTES = 64 * 1024;
/** A connection this far behind, or behind for this long, is closed: it comes back by itself. */
export const TOO_SLOW_BYTES = 1024 * 1024;
export const TOO_SLOW_MS = 10_000;
/** The browser answers every heartbeat, one every ten seconds. */
export const SILENT_MS = 35_000;

export type LiveConnection = {
  readonly actor: Actor;
  readonly setVisible: (visible: Sight) => void;
  readonly isWatching: () => boolean;
  readonly hello: (cursor: string) => void;
  readonly tell: (news: CompanyNews) => void;
  readonly resync: (reason: 'too-much' | 'restart') => void;
  readonly heartbeat: (cursor: string) => void;
  readonly close: (code: number) => void;
};

type Options = {
  readonly socket: WebSocket;
  readonly actor: Actor;
  readonly visible: Sight;
  readonly now: () => number;
};

const parseFrame = (data: unknown): ClientFrame | undefined => {
  try {
    return ClientFrame.safeParse(JSON.parse(String(data))).data;
  } catch {
    return undefined;
  }
};

/** One open connection: what it watches, what it may see, and how far behind it is. */
export function createLiveConnection({ socket, actor, now, ...start }: Options): LiveConnection {
  let visible = start.visible;
  let watched: ReadonlySet<string> = new Set();
  let behindSince: number | undefined;
  let heardAt = now();

  socket.on('message', (data, isBinary) => {
    const frame = isBinary ? undefined : parseFrame(data);
    if (frame === undefined) return socket.close(CLOSE_BAD_FRAME);
    heardAt = now();
    if (frame.type === 'watch') watched = new Set(frame.pumps);
  });

  /** Sends unless the connection is behind; then it only learns, once it has caught up, that it missed something. */
  const send = (text: string): void => {
    if (socket.readyState !== socket.OPEN) return;
    if (socket.bufferedAmount > SLOW_BYTES) {
      behindSince ??= now();
      if (socket.bufferedAmount > TOO_SLOW_BYTES || now() - behindSince > TOO_SLOW_MS) socket.close(CLOSE_TOO_SLOW);
      return;
    }
    if (behindSince !== undefined) {
      behindSince = undefined;
      socket.send('{"type":"resync","reason":"slow"}');
    }
    socket.send(text);
  };

  return {
    actor,
    setVisible: (next) => {
      visible = next;
    },
    isWatching: () => socket.readyState === socket.OPEN,
    hello: (cursor) => send(JSON.stringify({ type: 'hello', serverNow: now(), cursor })),
    tell: (news) => {
      const text = composeNews(news, { role: actor.role, visible, watched });
      if (text !== undefined) send(text);
    },
    resync: (reason) => send(JSON.stringify({ type: 'resync', reason })),
    heartbeat: (cursor) => {
      if (now() - heardAt > SILENT_MS) return socket.terminate();
      if (actor.accessUntil <= now()) return socket.close(CLOSE_NOT_SIGNED_IN);
      send(JSON.stringify({ type: 'heartbeat', serverNow: now(), cursor }));
    },
    close: (code) => {
      socket.close(code);
      // A peer that does not answer the close is not waited for.
      setTimeout(() => socket.terminate(), 2000).unref();
    },
  };
}
