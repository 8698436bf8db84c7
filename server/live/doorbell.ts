import pg from 'pg';
import type { Logger } from 'pino';

/** Channels of PostgreSQL's NOTIFY. A message is a pointer to what changed, never the news itself. */
export type Channel =
  /** Pumps whose state, runs or alarms changed, by id, comma separated; empty = look for yourself. */
  | 'millrace_live'
  /** A pump whose commissioning changed, by id. */
  | 'millrace_context'
  /** A device whose secret was set, rotated or revoked, by serial. */
  | 'millrace_credentials'
  /** A backtest waits. */
  | 'millrace_backtest'
  /** The outbox has new mail. */
  | 'millrace_mail';

/** `payload` undefined = anything may have been missed: look at everything. */
type Listener = (payload: string | undefined) => void;

/** Hears what other processes, and our own, say through the database. */
export type Doorbell = {
  readonly on: (channel: Channel, listener: Listener) => void;
  /** Resolves when the first connection listens. */
  readonly start: () => Promise<void>;
  readonly stop: () => Promise<void>;
};

const RECONNECT_MS = 500;

/** `databaseUrl` is that of the machine role. After a break of the connection every listener is told to look. */
export function createDoorbell({ databaseUrl, log }: { readonly databaseUrl: string; readonly log: Logger }): Doorbell {
  const listeners = new Map<Channel, Listener[]>();
  let client: pg.Client | undefined;
  let retry: NodeJS.Timeout | undefined;
  let stopped = false;

  const tell = (channel: string, payload: string | undefined): void => {
    for (const [name, ones] of listeners) if (name === channel) for (const listener of ones) listener(payload);
  };
  const connect = async (): Promise<void> => {
    const next = new pg.Client({ connectionString: databaseUrl, application_name: 'millrace doorbell' });
    const lost = (): void => {
      if (client !== next || stopped) return;
      client = undefined;
      retry = setTimeout(again, RECONNECT_MS);
    };
    next.on('error', lost);
    next.on('end', lost);
    next.on('notification', ({ channel, payload }) => tell(channel, payload));
    await next.connect();
    await next.query([...listeners.keys()].map((channel) => `listen ${channel}`).join('; '));
    client = next;
  };
  const again = (): void => {
    connect().then(
      () => {
        for (const channel of listeners.keys()) tell(channel, undefined);
      },
      (error: unknown) => {
        log.debug({ err: error }, 'the doorbell cannot reach the database yet');
        if (!stopped) retry = setTimeout(again, RECONNECT_MS);
      },
    );
  };
  return {
    on: (channel, listener) => listeners.set(channel, [...(listeners.get(channel) ?? []), listener]),
    start: connect,
    stop: async () => {
      stopped = true;
      clearTimeout(retry);
      await client?.end();
    },
  };
}
