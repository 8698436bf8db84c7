import { sql } from 'drizzle-orm';
import {
  bigint,
  date,
  doublePrecision,
  foreignKey,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, managersOnly } from './policies.ts';
import { pumps } from './pumps.ts';

/** What one tariff period of a month came to; micros, not rounded. */
export type MonthLine = {
  readonly tariffId: string;
  readonly name: string;
  readonly kwh: number;
  readonly micros: number;
};

/** What was saved in a month, after the IPMVP. */
export type MonthSaved = {
  readonly baselineKwh: number;
  readonly savedKwh: number;
  readonly sigmaKwh: number;
  readonly savedMicros: number;
  readonly sigmaMicros: number;
  readonly method: 'A' | 'B';
};

/** A number of `saved` as a column: taking ten thousand of them out of JSON takes longer than adding them up. */
const savedNumber = (name: string, field: keyof MonthSaved) =>
  doublePrecision(name).generatedAlwaysAs(sql.raw(`(saved ->> '${field}')::float8`));

/**
 * A calendar month of a pump with its price, kept for ever; worked out with its days, so that a fleet's month is one range
 * of this key. It names money, so it is the managers' alone.
 */
export const pumpMonths = pgTable(
  'pump_months',
  {
    companyId: companyId(),
    month: date({ mode: 'string' }).notNull(),
    pumpId: uuid('pump_id').notNull(),
    pricedAt: instant('priced_at').notNull(),
    wattHours: doublePrecision('watt_hours').notNull(),
    gallons: doublePrecision().notNull(),
    spanMs: bigint('span_ms', { mode: 'number' }).notNull(),
    coveredMs: bigint('covered_ms', { mode: 'number' }).notNull(),
    onMs: bigint('on_ms', { mode: 'number' }).notNull(),
    unknownFlowMs: bigint('unknown_flow_ms', { mode: 'number' }).notNull(),
    /** Whole minor units of energy and demand, rounded once; null without a tariff for all of it. */
    costMinor: bigint('cost_minor', { mode: 'number' }),
    days: integer().notNull(),
    currency: text(),
    lines: jsonb().$type<readonly MonthLine[]>().notNull(),
    saved: jsonb().$type<MonthSaved>(),
    savedKwh: savedNumber('saved_kwh', 'savedKwh'),
    savedSigmaKwh: savedNumber('saved_sigma_kwh', 'sigmaKwh'),
    savedMicros: savedNumber('saved_micros', 'savedMicros'),
    savedSigmaMicros: savedNumber('saved_sigma_micros', 'sigmaMicros'),
    /** The lines again, side by side: a fleet's month adds up those of all its pumps. */
    lineNames: text('line_names').array(),
    lineKwh: doublePrecision('line_kwh').array(),
    lineMicros: doublePrecision('line_micros').array(),
  },
  (table) => [
    primaryKey({ name: 'pump_months_pkey', columns: [table.companyId, table.month, table.pumpId] }),
    foreignKey({
      name: 'pump_months_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    appReads('pump_months', managersOnly),
    machineWorks('pump_months'),
  ],
);
