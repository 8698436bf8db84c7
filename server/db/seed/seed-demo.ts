import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { sql } from 'drizzle-orm';
import type pg from 'pg';
import { asMachine } from '#server/db/transaction.ts';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import { type CommissionOptions, commissionCompany } from './commission-company.ts';

/** The password of everyone in the demo company. Production refuses to start where anybody has it. */
export const DEMO_PASSWORD = 'millrace-demo';

/** Where the simulated devices find their secrets: `{"devices":[{"serial":"…","secret":"…"}]}`, for its owner's eyes. */
export const DEMO_DEVICES_FILE = 'demo-devices.json';

type Options = CommissionOptions & { readonly dataFolder: string };

/**
 * Makes the demo company in a database without any company, and says whether it did. The file of device secrets is
 * written before the rows are committed: a crash between the two leaves a file that the next start overwrites.
 */
export function seedDemo(machine: pg.Pool, { dataFolder, ...options }: Options): Promise<boolean> {
  return asMachine(machine, async (db) => {
    await db.execute(sql`select pg_advisory_xact_lock(hashtext('millrace demo'))`);
    const { rows } = await db.execute(sql`select from companies limit 1`);
    if (rows.length > 0) return false;
    const { pumps } = await commissionCompany(db, LARKMOOR, options);
    const devices = pumps.map(({ serial, secret }) => ({ serial, secret }));
    await mkdir(dataFolder, { recursive: true });
    await writeFile(join(dataFolder, DEMO_DEVICES_FILE), `${JSON.stringify({ devices }, null, 2)}\n`, { mode: 0o600 });
    return true;
  });
}
