import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, smallint, text, unique, uuid } from 'drizzle-orm/pg-core';
import { bytes, companyId, id, instant } from './columns.ts';
import { companies } from './companies.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';

/** A telemetry unit. Its secret is kept as a keyed hash, which the app role can write but not read. */
export const devices = pgTable(
  'devices',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    serial: text().notNull(),
    secretHash: bytes('secret_hash'),
    secretSetAt: instant('secret_set_at'),
    revokedAt: instant('revoked_at'),
    /** Provisioned reading interval. */
    intervalSeconds: smallint('interval_seconds').notNull().default(10),
    firmware: text(),
    /** The connection and the boot that its last `online` named. */
    connection: uuid(),
    boot: uuid(),
    state: text().$type<'online' | 'lost' | 'never'>().notNull().default('never'),
    heardAt: instant('heard_at'),
    /** Messages and readings refused from it so far. */
    refused: integer().notNull().default(0),
    /** Grows with every change that a person makes: the base of its ETag. */
    version: integer().notNull().default(1),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [
    unique('devices_serial_key').on(table.serial),
    unique('devices_company_id_id_key').on(table.companyId, table.id),
    index('devices_company_serial_index').on(table.companyId, table.serial),
    check('devices_interval', sql`interval_seconds between 5 and 60`),
    ...commissionedByManagers('devices', staffOr(sql`id in (select f.device_id from device_fittings f)`)),
    machineWorks('devices'),
  ],
);
