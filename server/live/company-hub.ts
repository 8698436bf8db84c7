import { writeNews } from './compose-news.ts';
import type { LiveConnection } from './live-connection.ts';
import type { LiveNeeds } from './live-needs.ts';

/** Screens are told at most this often, however fast the readings come. */
export const NEWS_EVERY_MS = 250;

/** The open connections of one company, and how far they have been told. */
export type CompanyHub = {
  readonly add: (connection: LiveConnection) => Promise<void>;
  readonly remove: (connection: LiveConnection) => void;
  readonly connections: () => Iterable<LiveConnection>;
  /** Something may have changed. */
  readonly ring: () => void;
  readonly heartbeat: () => void;
  readonly isEmpty: () => boolean;
};

/** Reads what changed once for all connections of a company; each gets what its person may see of it. */
export function createCompanyHub(
  companyId: string,
  needs: Pick<LiveNeeds, 'readChanges' | 'hideStaffWords' | 'now' | 'log'>,
): CompanyHub {
  const { now, log } = needs;
  const connections = new Set<LiveConnection>();
  let cursor: string | undefined;
  let reading: Promise<void> | undefined;
  let isRung = false;
  let isHeartbeatDue = false;
  let readAt = 0;
  let timer: NodeJS.Timeout | undefined;

  const read = async (): Promise<void> => {
    isRung = false;
    readAt = now();
    const changes = await needs.readChanges(companyId, cursor);
    cursor = changes.cursor;
    if (!changes.complete) {
      for (const connection of connections) connection.resync('too-much');
      return;
    }
    const news = writeNews(changes, needs.hideStaffWords);
    for (const connection of connections) connection.tell(news);
    if (!isHeartbeatDue) return;
    isHeartbeatDue = false;
    for (const connection of connections) connection.heartbeat(changes.cursor);
  };

  const schedule = (): void => {
    if (timer !== undefined || reading !== undefined || connections.size === 0) return;
    timer = setTimeout(
      () => {
        timer = undefined;
        reading = read()
          .catch((err) => {
            // The cursor stays: the next ring reads from there, nothing is lost.
            isRung = true;
            log.warn({ err, companyId }, 'cannot read what changed');
          })
          .finally(() => {
            reading = undefined;
            if (isRung) schedule();
          });
      },
      Math.max(0, readAt + NEWS_EVERY_MS - now()),
    );
    timer.unref();
  };

  const ring = (): void => {
    isRung = true;
    schedule();
  };

  return {
    add: async (connection) => {
      // A cursor that nobody moved since is too old to hand out.
      if (connections.size === 0) cursor = undefined;
      if (cursor === undefined) cursor = (await needs.readChanges(companyId, undefined)).cursor;
      connections.add(connection);
      connection.hello(cursor);
    },
    remove: (connection) => {
      connections.delete(connection);
      if (connections.size > 0) return;
      clearTimeout(timer);
      timer = undefined;
    },
    connections: () => connections,
    ring,
    // Says that the screens are up to date, so it waits for a look at the database: without one they grow stale.
    heartbeat: () => {
      isHeartbeatDue = true;
      ring();
    },
    isEmpty: () => connections.size === 0,
  };
}
