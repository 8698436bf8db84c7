import { foreignKey, integer, jsonb, pgTable, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, appWrites, machineWorks, ofVisiblePump, staffOnly } from './policies.ts';
import { pumps } from './pumps.ts';
import { users } from './users.ts';

/** What a pump used before, as whoever stood at the pad stated it. */
export type StatedBaseline = {
  readonly kind: 'clamped' | 'logged' | 'nameplate';
  readonly watts?: number | undefined;
  readonly sigmaWatts?: number | undefined;
  readonly horsepower?: number | undefined;
  readonly serviceFactor?: number | undefined;
  readonly basis:
    | { readonly kind: 'same-hours' }
    | { readonly kind: 'same-volume'; readonly gpm: number; readonly sigmaGpm: number };
  readonly note: string;
};

/** One a pump; `stated` is null where it was taken back. */
export const baselines = pgTable(
  'baselines',
  {
    pumpId: uuid('pump_id').primaryKey(),
    companyId: companyId(),
    stated: jsonb().$type<StatedBaseline>(),
    statedAt: instant('stated_at').notNull().defaultNow(),
    statedBy: uuid('stated_by'),
    version: integer().notNull().default(1),
  },
  (table) => [
    foreignKey({
      name: 'baselines_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    foreignKey({
      name: 'baselines_stated_by_fkey',
      columns: [table.companyId, table.statedBy],
      foreignColumns: [users.companyId, users.id],
    }),
    appReads('baselines', ofVisiblePump),
    ...appWrites('baselines', staffOnly),
    machineWorks('baselines'),
  ],
);
