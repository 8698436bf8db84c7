import pg from 'pg';
import type { Stream } from '#server/stream.ts';
import { makeBenchCompany } from './bench-company.ts';
import type { BenchDatabase } from './bench-database.ts';
import { type BenchChild, startChild } from './child-process.ts';
import type { DeviceLogin } from './load-device.ts';

export type WatchCounts = ReturnType<Stream['count']> & { readonly rss: number };

/** The real path in a process of its own. */
export type Watch = {
  readonly port: number;
  readonly counts: () => Promise<WatchCounts>;
  /** How long each message waited to be understood since this was last asked, ms. */
  readonly takeLags: () => Promise<readonly number[]>;
  /** Resolves when everything stored is understood. */
  readonly understood: () => Promise<void>;
  readonly stop: () => Promise<void>;
};

const UNDERSTOOD_WITHIN_MS = 60_000;

/** Fills a database with a company of as many pumps; answers the logins of its devices. */
export async function fillDatabase({ superuserUrl }: BenchDatabase, pumps: number): Promise<DeviceLogin[]> {
  const owner = new pg.Client({ connectionString: superuserUrl });
  await owner.connect();
  try {
    return await makeBenchCompany(owner, pumps);
  } finally {
    await owner.end();
  }
}

/** Starts broker, ingest and fold on a database. */
export async function startWatch({ databaseUrl }: BenchDatabase): Promise<Watch> {
  const child: BenchChild = startChild('watch-server.ts', [databaseUrl]);
  const port = await child.next<number>('port', 120_000);
  const counts = async () => {
    child.send('counts');
    return child.next<WatchCounts>('counts');
  };
  return {
    port,
    counts,
    takeLags: async () => {
      child.send('lags');
      return child.next<readonly number[]>('lags');
    },
    understood: async () => {
      const until = performance.now() + UNDERSTOOD_WITHIN_MS;
      for (;;) {
        const { fold } = await counts();
        if (fold.lagMs === 0 && fold.behind === 0) return;
        if (performance.now() > until) throw new Error('the fold does not catch up');
        await new Promise((resolve) => setTimeout(resolve, 100));
      }
    },
    stop: child.stop,
  };
}
