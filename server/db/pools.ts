import pg from 'pg';
import { type DatabaseRole, deriveRoleUrl } from './database-roles.ts';

/** Connections of the two roles the server works with; the owner's login is for migrations alone. */
export type Pools = { readonly app: pg.Pool; readonly machine: pg.Pool; readonly end: () => Promise<void> };

type Sizes = { readonly app?: number; readonly machine?: number };

/** A request that waits this long for the database has failed; the person is told to try again. */
const STATEMENT_LIMIT_MS = 15_000;

export function createPools(
  databaseUrl: string,
  { onError, sizes = {} }: { readonly onError: (error: Error) => void; readonly sizes?: Sizes },
): Pools {
  const create = (role: DatabaseRole, max: number, limits: pg.PoolConfig): pg.Pool => {
    const pool = new pg.Pool({
      connectionString: deriveRoleUrl(databaseUrl, role),
      application_name: role,
      max,
      // Compiling a statement costs seconds where running it takes milliseconds: row-level security makes them long.
      options: '-c jit=off',
      connectionTimeoutMillis: 10_000,
      ...limits,
    });
    // An idle connection that dies (the database restarts) is replaced by the next query; it must not end the process.
    pool.on('error', onError);
    // The same for one that is in use: its query fails, and the event must not end the process either.
    pool.on('connect', (client) => client.on('error', onError));
    return pool;
  };
  const app = create('millrace_app', sizes.app ?? 10, { statement_timeout: STATEMENT_LIMIT_MS });
  const machine = create('millrace_machine', sizes.machine ?? 10, {});
  return {
    app,
    machine,
    end: async () => {
      await Promise.all([app.end(), machine.end()]);
    },
  };
}
