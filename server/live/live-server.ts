import type { IncomingMessage, Server } from 'node:http';
import type { Duplex } from 'node:stream';
import { WebSocketServer } from 'ws';
import type { Actor } from '#server/context.ts';
import { isFromOwnPage } from '#server/http/same-origin.ts';
import { CLOSE_NOT_SIGNED_IN, LIVE_PATH } from '#shared/contract/socket/frames.ts';
import { type CompanyHub, createCompanyHub } from './company-hub.ts';
import type { Sight } from './compose-news.ts';
import { createLiveConnection, type LiveConnection } from './live-connection.ts';
import type { LiveNeeds } from './live-needs.ts';

const HEARTBEAT_MS = 10_000;
/** What a person may see is asked again this often: a pad that was sold, a person who moved. */
const LOOK_AGAIN_MS = 120_000;
/** No frame of the contract is longer. */
const MAX_FRAME_BYTES = 64 * 1024;
/** Windows and tabs of one person; beyond it something is wrong. */
const MOST_PER_PERSON = 20;
const GOING_AWAY = 1001;

export type LiveServer = {
  /** Something may have changed, in any company. */
  readonly ring: () => void;
  readonly count: () => number;
  readonly stop: () => Promise<void>;
};

const refuse = (socket: Duplex, status: string): void => {
  socket.end(`HTTP/1.1 ${status}\r\nConnection: close\r\nContent-Length: 0\r\n\r\n`);
};

/**
 * Live connections at /api/live: who asks is known before the upgrade, what leaves is only what they may see. The
 * socket is a convenience, never the record: after any break the browser asks GET /api/changes from its cursor.
 */
export function startLiveServer(server: Server, needs: LiveNeeds): LiveServer {
  const sockets = new WebSocketServer({ noServer: true, maxPayload: MAX_FRAME_BYTES, perMessageDeflate: false });
  const hubs = new Map<string, CompanyHub>();

  const hubOf = (companyId: string): CompanyHub => {
    const hub = hubs.get(companyId) ?? createCompanyHub(companyId, needs);
    hubs.set(companyId, hub);
    return hub;
  };
  const everyConnection = (): LiveConnection[] => [...hubs.values()].flatMap((hub) => [...hub.connections()]);

  const accept = async (request: IncomingMessage, socket: Duplex, head: Buffer): Promise<void> => {
    if (isFromOwnPage(request.headers, needs.publicUrl) === false) return refuse(socket, '403 Forbidden');
    const actor = await needs.authenticate(request);
    if (actor === undefined) return refuse(socket, '401 Unauthorized');
    const own = everyConnection().filter((connection) => connection.actor.userId === actor.userId);
    if (own.length >= MOST_PER_PERSON) return refuse(socket, '429 Too Many Requests');
    const visible = await needs.listVisiblePumps(actor);
    sockets.handleUpgrade(request, socket, head, (webSocket) => {
      const hub = hubOf(actor.companyId);
      const connection = createLiveConnection({ socket: webSocket, actor, visible, now: needs.now });
      webSocket.on('error', (err) => needs.log.debug({ err }, 'a live connection failed'));
      webSocket.on('close', () => hub.remove(connection));
      hub.add(connection).catch((err) => {
        needs.log.warn({ err }, 'cannot open a live connection');
        webSocket.terminate();
      });
    });
  };

  const onUpgrade = (request: IncomingMessage, socket: Duplex, head: Buffer): void => {
    socket.on('error', () => socket.destroy());
    if (new URL(request.url ?? '/', 'http://localhost').pathname !== LIVE_PATH) {
      refuse(socket, '404 Not Found');
      return;
    }
    accept(request, socket, head).catch((err) => {
      needs.log.warn({ err }, 'a live connection was refused');
      refuse(socket, '503 Service Unavailable');
    });
  };
  server.on('upgrade', onUpgrade);

  const heartbeat = setInterval(() => {
    for (const hub of hubs.values()) hub.heartbeat();
  }, HEARTBEAT_MS);
  const lookAgain = setInterval(() => void refreshSight(everyConnection(), needs), LOOK_AGAIN_MS);
  const stopHearing = needs.onSessionEnded((sessionId) => {
    for (const connection of everyConnection()) {
      if (connection.actor.sessionId === sessionId) connection.close(CLOSE_NOT_SIGNED_IN);
    }
  });

  return {
    ring: () => {
      for (const hub of hubs.values()) hub.ring();
    },
    count: () => sockets.clients.size,
    stop: async () => {
      clearInterval(heartbeat);
      clearInterval(lookAgain);
      stopHearing();
      server.off('upgrade', onUpgrade);
      for (const connection of everyConnection()) connection.close(GOING_AWAY);
      await new Promise<void>((resolve) => sockets.close(() => resolve()));
    },
  };
}

async function refreshSight(connections: readonly LiveConnection[], needs: LiveNeeds): Promise<void> {
  const seen = new Map<string, Promise<Sight>>();
  const look = (actor: Actor) => {
    const known = seen.get(actor.userId) ?? needs.listVisiblePumps(actor);
    seen.set(actor.userId, known);
    return known;
  };
  for (const connection of connections) {
    try {
      connection.setVisible(await look(connection.actor));
    } catch (err) {
      needs.log.warn({ err }, 'cannot look up what a person may see');
    }
  }
}
