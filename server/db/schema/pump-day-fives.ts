import { date, foreignKey, index, pgTable, primaryKey, real, smallint, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, ofVisiblePumpSince } from './policies.ts';
import { pumps } from './pumps.ts';

/**
 * A pump's local day in steps of five minutes, in one row, kept 60 days and written once the day is over: until then its
 * readings answer. Element k begins k × 5 minutes after `from_at`; null = no reading covers it.
 */
export const pumpDayFives = pgTable(
  'pump_day_fives',
  {
    pumpId: uuid('pump_id').notNull(),
    companyId: companyId(),
    fromAt: instant('from_at').notNull(),
    day: date({ mode: 'string' }).notNull(),
    wattHours: real('watt_hours').array().notNull(),
    rpmMean: real('rpm_mean').array().notNull(),
    rpmMin: smallint('rpm_min').array().notNull(),
    rpmMax: smallint('rpm_max').array().notNull(),
    wattsMean: real('watts_mean').array().notNull(),
    wattsMin: real('watts_min').array().notNull(),
    wattsMax: real('watts_max').array().notNull(),
    closedInputs: smallint('closed_inputs').array().notNull(),
  },
  (table) => [
    primaryKey({ name: 'pump_day_fives_pkey', columns: [table.pumpId, table.day] }),
    foreignKey({
      name: 'pump_day_fives_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    index('pump_day_fives_day_index').on(table.day),
    appReads('pump_day_fives', ofVisiblePumpSince('from_at')),
    machineWorks('pump_day_fives'),
  ],
);
