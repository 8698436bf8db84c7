import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';
import type { Role } from '#shared/contract/primitives.ts';

/** What a query may be sent through: a transaction of either role. It cannot begin another one. */
export type Transaction = Pick<
  NodePgDatabase,
  'select' | 'selectDistinct' | 'selectDistinctOn' | 'insert' | 'update' | 'delete' | 'execute' | '$count'
>;

/** What row-level security compares rows with. */
export type Sight = {
  readonly companyId: string;
  readonly userId: string;
  readonly role: Role;
  readonly customerId: string | undefined;
};

/** Statements one by one, each its own transaction, through a pool of either role. */
export const openDatabase = (pool: pg.Pool): Transaction => drizzle(pool);

export type TransactionMode = 'read' | 'write';

/**
 * Runs `work` as a person: the database shows and takes only what is theirs. Reading happens in one snapshot, so that
 * every figure of an answer agrees with every other, and cannot write.
 */
export function asPerson<T>(
  app: pg.Pool,
  sight: Sight,
  mode: TransactionMode,
  work: (db: Transaction, client: pg.PoolClient) => Promise<T>,
): Promise<T> {
  const isolation = mode === 'read' ? 'isolation level repeatable read read only' : '';
  return inTransaction(app, `begin ${isolation}; ${setLocal(sight)}`, work);
}

/** Runs `work` in one transaction of the machine role, which works for every company. */
export function asMachine<T>(
  machine: pg.Pool,
  work: (db: Transaction, client: pg.PoolClient) => Promise<T>,
): Promise<T> {
  return inTransaction(machine, 'begin', work);
}

const setLocal = ({ companyId, userId, role, customerId }: Sight) =>
  Object.entries({ company: companyId, user: userId, role, customer: customerId ?? '' })
    .map(([name, value]) => `set local millrace."${name}" = ${pg.escapeLiteral(value)}`)
    .join('; ');

async function inTransaction<T>(
  pool: pg.Pool,
  begin: string,
  work: (db: Transaction, client: pg.PoolClient) => Promise<T>,
): Promise<T> {
  const client = await pool.connect();
  let broken: Error | undefined;
  try {
    await client.query(begin);
    const result = await work(drizzle(client), client);
    await client.query('commit');
    return result;
  } catch (error) {
    broken = await rollBack(client);
    throw error;
  } finally {
    // A connection that could not roll back is thrown away with whatever it still holds.
    client.release(broken);
  }
}

async function rollBack(client: pg.PoolClient): Promise<Error | undefined> {
  try {
    await client.query('rollback');
    return undefined;
  } catch (error) {
    return error instanceof Error ? error : new Error(String(error));
  }
}
