import { and, eq, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { newId } from '#server/db/new-id.ts';
import { deviceFittings } from '#server/db/schema/device-fittings.ts';
import { devices } from '#server/db/schema/devices.ts';
import { pumps } from '#server/db/schema/pumps.ts';

export type LockedDevice = { readonly id: string; readonly serial: string; readonly version: number };

/** A device of the person's company, locked until the end of the transaction. */
export async function findDeviceForUpdate({ db, actor }: Context, deviceId: string): Promise<LockedDevice | undefined> {
  const [row] = await db
    .select({ id: devices.id, serial: devices.serial, version: devices.version })
    .from(devices)
    .where(and(eq(devices.companyId, actor.companyId), eq(devices.id, deviceId)))
    .for('update');
  return row;
}

/** Adds a device; undefined where its serial is taken, by whichever company. */
export async function addDevice(
  { db, actor, now }: Context,
  device: { readonly serial: string; readonly intervalSeconds: number; readonly secretHash: Buffer },
): Promise<string | undefined> {
  const id = newId();
  const added = await db
    .insert(devices)
    .values({ ...device, id, companyId: actor.companyId, secretSetAt: new Date(now), createdAt: new Date(now) })
    .onConflictDoNothing()
    .returning({ id: devices.id });
  return added[0]?.id;
}

/** Whether the company has this pump and no device reports it now. */
export async function checkPump({ db, actor, now }: Context, pumpId: string): Promise<'free' | 'taken' | 'missing'> {
  const known = await db.$count(pumps, and(eq(pumps.companyId, actor.companyId), eq(pumps.id, pumpId)));
  if (known === 0) return 'missing';
  const at = new Date(now).toISOString();
  const fitted = sql`pump_id = ${pumpId} and (ends_at is null or ends_at > ${at}::timestamptz)`;
  return (await db.$count(deviceFittings, and(eq(deviceFittings.companyId, actor.companyId), fitted))) === 0
    ? 'free'
    : 'taken';
}

/** Lets a device report a pump from now on; the fold reads the pump's context anew. */
export async function fitDevice({ db, actor, now }: Context, deviceId: string, pumpId: string): Promise<void> {
  await db
    .insert(deviceFittings)
    .values({ id: newId(), companyId: actor.companyId, deviceId, pumpId, startsAt: new Date(now) });
  await db.execute(sql`select pg_notify('millrace_context', ${pumpId})`);
}

/** Gives a device another secret, or none; the broker closes what the old one opened. */
export async function saveSecret(
  { db, actor, now }: Context,
  device: LockedDevice,
  secretHash: Buffer | null,
): Promise<void> {
  const at = new Date(now);
  await db
    .update(devices)
    .set({
      secretHash,
      ...(secretHash === null ? { revokedAt: at } : { secretSetAt: at, revokedAt: null }),
      version: device.version + 1,
    })
    .where(and(eq(devices.companyId, actor.companyId), eq(devices.id, device.id)));
  await db.execute(sql`select pg_notify('millrace_credentials', ${device.serial})`);
}
