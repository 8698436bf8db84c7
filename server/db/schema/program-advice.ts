import { doublePrecision, foreignKey, index, jsonb, pgTable, real, text, uuid } from 'drizzle-orm/pg-core';
import type { KeptAdvice } from '#shared/domain/advisor/advise-pump.ts';
import type { CostlyMemory } from '#shared/domain/advisor/judge-costly-program.ts';
import type { PadNeeds } from '#shared/domain/advisor/pad-needs.ts';
import type { TimeOfUseFinding } from '#shared/domain/energy/time-of-use-check.ts';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, staffOnly } from './policies.ts';
import { pumps } from './pumps.ts';

/** What the advice was worked out from: prices and needs are those of the month (0 = January). */
export type AdviceBasis = {
  readonly month: number;
  readonly tariffId: string | undefined;
  readonly tariffName: string | undefined;
  readonly currency: string | undefined;
  readonly needs: PadNeeds | undefined;
};

/** The advisor's last word on a pump's program, worked out daily by the worker. */
export const programAdvice = pgTable(
  'program_advice',
  {
    pumpId: uuid('pump_id').primaryKey(),
    companyId: companyId(),
    madeAt: instant('made_at').notNull(),
    savedMicrosPerMonth: doublePrecision('saved_micros_per_month'),
    dearMicrosPerYear: doublePrecision('dear_micros_per_year').notNull(),
    /** Of the present cost; null without a comparison. */
    savedShare: real('saved_share'),
    kind: text().$type<KeptAdvice['kind']>().notNull(),
    basis: jsonb().$type<AdviceBasis>().notNull(),
    advice: jsonb().$type<KeptAdvice>().notNull(),
    dearHours: jsonb('dear_hours').$type<readonly TimeOfUseFinding[]>().notNull(),
    /** What `costly-program` remembers between days; null = it was never judged. */
    costlyMemory: jsonb('costly_memory').$type<CostlyMemory>(),
  },
  (table) => [
    foreignKey({
      name: 'program_advice_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    index('program_advice_saved_index').on(table.companyId, table.savedMicrosPerMonth),
    appReads('program_advice', staffOnly),
    machineWorks('program_advice'),
  ],
);
