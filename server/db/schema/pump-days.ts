import { date, doublePrecision, foreignKey, integer, pgTable, primaryKey, real, text, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, ofVisiblePumpSince } from './policies.ts';
import { pumps } from './pumps.ts';

/**
 * What a pump did in one local day of its pad; kept for ever. Times in ms: a day has 23, 24 or 25 hours. Means are over
 * the time it turned; null where it did not.
 */
export const pumpDays = pgTable(
  'pump_days',
  {
    pumpId: uuid('pump_id').notNull(),
    companyId: companyId(),
    fromAt: instant('from_at').notNull(),
    toAt: instant('to_at').notNull(),
    wattHours: doublePrecision('watt_hours').notNull(),
    gallons: doublePrecision('gallons').notNull(),
    /** One sigma; null where the flow meter did not say. */
    gallonsSigma: doublePrecision('gallons_sigma'),
    day: date({ mode: 'string' }).notNull(),
    onMs: integer('on_ms').notNull(),
    coveredMs: integer('covered_ms').notNull(),
    /** Time turning of which the flow is not known. */
    unknownFlowMs: integer('unknown_flow_ms').notNull(),
    readings: integer().notNull(),
    rpmMean: real('rpm_mean'),
    rpmMin: real('rpm_min'),
    rpmMax: real('rpm_max'),
    wattsMean: real('watts_mean'),
    wattsMin: real('watts_min'),
    wattsMax: real('watts_max'),
    /** By source, in the order of the list of sources and then `no-data`, `unknown`. */
    sourceMs: integer('source_ms').array().notNull(),
    /** What the day was priced by, as `createPriceKeys` writes it; null = not priced yet. What follows is as old as it. */
    pricedBy: text('priced_by'),
    /** By period of the tariff in force; empty without one. */
    kwhByPeriod: doublePrecision('kwh_by_period').array(),
    energyMicrosByPeriod: doublePrecision('energy_micros_by_period').array(),
    /** The month's demand, on the day of its peak. */
    demandMicros: doublePrecision('demand_micros'),
    /** By what the day was compared with the pump's baseline, as `createCompareKeys` writes it; null = it was not. */
    comparedBy: text('compared_by'),
    /** What the motor before would have used and cost, and what counts of this one; null where nothing can be compared. */
    beforeKwh: doublePrecision('before_kwh'),
    beforeMicros: doublePrecision('before_micros'),
    afterKwh: doublePrecision('after_kwh'),
    afterMicros: doublePrecision('after_micros'),
  },
  (table) => [
    primaryKey({ name: 'pump_days_pkey', columns: [table.pumpId, table.day] }),
    foreignKey({
      name: 'pump_days_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    appReads('pump_days', ofVisiblePumpSince('from_at')),
    machineWorks('pump_days'),
  ],
);
