import pg from 'pg';
import type { Logger } from 'pino';

export type ChannelListener = { readonly close: () => Promise<void> };

type Options = {
  /** The address of the role that listens. */
  readonly roleUrl: string;
  readonly channels: readonly string[];
  readonly log: Logger;
  readonly onNotification: (channel: string, payload: string) => void;
  /** The connection was lost and is back: whatever was said meanwhile was not heard. */
  readonly onGap: () => void;
};

const FIRST_RETRY_MS = 250;
const LONGEST_RETRY_MS = 5000;

/**
 * Listens to PostgreSQL's notifications on a connection of its own, and comes back when it breaks. A notification is a
 * doorbell: it may be missed, so that whoever listens reads what changed from a cursor.
 */
export function listenToChannels({ roleUrl, channels, log, onNotification, onGap }: Options): ChannelListener {
  let client: pg.Client | undefined;
  let retry: NodeJS.Timeout | undefined;
  let retryMs = FIRST_RETRY_MS;
  let isClosed = false;
  let wasOpen = false;

  const comeBack = (): void => {
    client = undefined;
    if (isClosed || retry !== undefined) return;
    retry = setTimeout(() => {
      retry = undefined;
      void open();
    }, retryMs);
    retryMs = Math.min(retryMs * 2, LONGEST_RETRY_MS);
  };

  const open = async (): Promise<void> => {
    const opening = new pg.Client({
      connectionString: roleUrl,
      application_name: 'millrace_listener',
      keepAlive: true,
    });
    opening.on('notification', ({ channel, payload }) => onNotification(channel, payload ?? ''));
    opening.on('error', (err) => log.warn({ err }, 'the listening connection broke'));
    opening.on('end', () => opening === client && comeBack());
    try {
      client = opening;
      await opening.connect();
      await opening.query(channels.map((channel) => `listen ${pg.escapeIdentifier(channel)}`).join('; '));
    } catch {
      await opening.end().catch(() => undefined);
      comeBack();
      return;
    }
    retryMs = FIRST_RETRY_MS;
    if (wasOpen) onGap();
    wasOpen = true;
  };

  void open();
  return {
    close: async () => {
      isClosed = true;
      clearTimeout(retry);
      const closing = client;
      client = undefined;
      await closing?.end().catch(() => undefined);
    },
  };
}
