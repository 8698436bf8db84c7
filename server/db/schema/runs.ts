import { sql } from 'drizzle-orm';
import {
  bigint,
  doublePrecision,
  foreignKey,
  index,
  pgTable,
  primaryKey,
  real,
  smallint,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import type { RunSource } from '#shared/domain/readings/reading.ts';
import type { RunFlag } from '#shared/domain/runs/run.ts';
import { companyId, instant, xid8 } from './columns.ts';
import { appReads, machineWorks, ofVisiblePumpSince } from './policies.ts';
import { pumps } from './pumps.ts';

/** A stretch of time under one source at one settled speed; kept for ever. `to_at` is null while it is open. */
export const runs = pgTable(
  'runs',
  {
    pumpId: uuid('pump_id').notNull(),
    companyId: companyId(),
    fromAt: instant('from_at').notNull(),
    toAt: instant('to_at'),
    coveredMs: bigint('covered_ms', { mode: 'number' }).notNull(),
    changedIn: xid8('changed_in').notNull().default(sql`pg_current_xact_id()`),
    wattHours: doublePrecision('watt_hours').notNull(),
    expectedRpm: real('expected_rpm').notNull(),
    meanRpm: real('mean_rpm').notNull(),
    meanWatts: real('mean_watts').notNull(),
    /** US gallons; null where the readings cannot tell. */
    gallons: real(),
    /** One standard deviation of the gallons. */
    gallonsSigma: real('gallons_sigma'),
    closedInputs: smallint('closed_inputs').notNull(),
    activeInput: smallint('active_input').notNull(),
    source: text().$type<RunSource>().notNull(),
    expectedSource: text('expected_source').$type<RunSource>().notNull(),
    flags: text().array().$type<RunFlag[]>().notNull().default(sql`'{}'::text[]`),
  },
  (table) => [
    primaryKey({ name: 'runs_pkey', columns: [table.pumpId, table.fromAt] }),
    foreignKey({
      name: 'runs_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    index('runs_changed_index').on(table.companyId, table.changedIn),
    // What a pump's gaps are asked for by: a year has thousands of runs and few gaps.
    index('runs_gaps_index').on(table.pumpId, table.fromAt).where(sql`source = 'no-data'`),
    appReads('runs', ofVisiblePumpSince('from_at')),
    machineWorks('runs'),
  ],
);
