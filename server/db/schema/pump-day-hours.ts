import { date, foreignKey, integer, pgTable, primaryKey, real, smallint, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, ofVisiblePumpSince } from './policies.ts';
import { pumps } from './pumps.ts';

/**
 * The hours of a pump's local day in one row, kept two years: element k is the k-th hour that began on that day, so that a
 * doubled hour has two. Null = no reading covers it.
 */
export const pumpDayHours = pgTable(
  'pump_day_hours',
  {
    pumpId: uuid('pump_id').notNull(),
    companyId: companyId(),
    fromAt: instant('from_at').notNull(),
    day: date({ mode: 'string' }).notNull(),
    /** Which hour of the wall clock each element is, 0 to 23, in the zone of the pad then; null = as the zone is now. */
    wallHours: smallint('wall_hours').array(),
    wattHours: real('watt_hours').array().notNull(),
    /** The largest quarter-hour's watt-hours: what a demand price goes by. */
    quarterWattHours: real('quarter_watt_hours').array().notNull(),
    gallons: real().array().notNull(),
    onMs: integer('on_ms').array().notNull(),
    coveredMs: integer('covered_ms').array().notNull(),
    unknownFlowMs: integer('unknown_flow_ms').array().notNull(),
    rpmMean: real('rpm_mean').array().notNull(),
    rpmMin: real('rpm_min').array().notNull(),
    rpmMax: real('rpm_max').array().notNull(),
    wattsMean: real('watts_mean').array().notNull(),
    wattsMin: real('watts_min').array().notNull(),
    wattsMax: real('watts_max').array().notNull(),
  },
  (table) => [
    primaryKey({ name: 'pump_day_hours_pkey', columns: [table.pumpId, table.day] }),
    foreignKey({
      name: 'pump_day_hours_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    appReads('pump_day_hours', ofVisiblePumpSince('from_at')),
    machineWorks('pump_day_hours'),
  ],
);
