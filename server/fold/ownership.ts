import { randomInt } from 'node:crypto';
import type pg from 'pg';

/*
 * Which process folds a pump. Every process takes a number of its own (the epoch) and holds an advisory lock under it
 * for as long as it lives, through every connection that stores readings or folds them. A pump's state row bears the
 * epoch of its owner: a write under another epoch changes nothing, and an epoch whose lock nobody holds is free.
 */

/** Names our advisory locks among all of the database: "fold" in ASCII. */
const LOCK_CLASS = 0x666f6c64;
const LARGEST_EPOCH = 2_147_483_647;

/** A number no other living process has, almost surely; `holdEpoch` makes sure. */
export function chooseEpoch(): number {
  return randomInt(1, LARGEST_EPOCH);
}

/** Says through this connection, until it ends, that the epoch's process lives. Many connections may say so. */
export async function holdEpoch(client: pg.ClientBase, epoch: number): Promise<void> {
  await client.query('select pg_advisory_lock_shared($1, $2)', [LOCK_CLASS, epoch]);
}

/** The epochs of the processes that live, ours among them. */
export async function listLivingEpochs(database: Pick<pg.ClientBase, 'query'>): Promise<number[]> {
  const { rows } = await database.query<{ epoch: number }>(
    `select distinct objid::bigint::float8 as epoch from pg_locks
     where locktype = 'advisory' and classid = $1 and objsubid = 2 and granted
       and database = (select oid from pg_database where datname = current_database())`,
    [LOCK_CLASS],
  );
  return rows.map(({ epoch }) => epoch);
}
