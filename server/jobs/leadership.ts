import pg from 'pg';

/** Names the lock among all advisory locks of the database: "jobs" in ASCII. */
const LOCK = 0x6a6f6273;

/** One process of all leads for as long as its connection lives; the next one takes over when it is gone. */
export type Leadership = {
  /** Whether we lead now, which is tried anew at every call. */
  readonly isOurs: () => Promise<boolean>;
  readonly end: () => Promise<void>;
};

/** `databaseUrl` is that of the machine role. */
export function createLeadership(databaseUrl: string): Leadership {
  let client: pg.Client | undefined;
  const open = async (): Promise<pg.Client> => {
    const next = new pg.Client({ connectionString: databaseUrl, application_name: 'millrace jobs' });
    const forget = (): void => {
      if (client === next) client = undefined;
    };
    next.on('error', forget);
    next.on('end', forget);
    await next.connect();
    client = next;
    return next;
  };
  return {
    isOurs: async () => {
      const held = client ?? (await open());
      // Taking a lock again that is held only counts up, so the table of locks is asked first.
      const { rows } = await held.query<{ ours: boolean }>(
        `select exists (select from pg_locks where locktype = 'advisory' and pid = pg_backend_pid() and classid = 0
           and objid = $1::bigint and granted) or pg_try_advisory_lock($1::bigint) as ours`,
        [LOCK],
      );
      return rows[0]?.ours === true;
    },
    end: async () => {
      const open = client;
      client = undefined;
      await open?.end();
    },
  };
}
