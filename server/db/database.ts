import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import type pg from 'pg';

/** A database or a transaction of it, whichever role it works under. */
export type Database = Pick<
  NodePgDatabase,
  'select' | 'selectDistinct' | 'insert' | 'update' | 'delete' | 'execute' | 'transaction' | '$with' | 'with'
>;

export const openDatabase = (pool: pg.Pool | pg.PoolClient): NodePgDatabase => drizzle(pool);
