import { sql } from 'drizzle-orm';
import { check, foreignKey, integer, jsonb, pgTable, unique, uuid } from 'drizzle-orm/pg-core';
import type { RuleSettings } from '#shared/domain/detectors/rule-settings.ts';
import { companyId, id, instant } from './columns.ts';
import { companies } from './companies.ts';
import { motorModels } from './motor-models.ts';
import { appReads, appWrites, machineWorks, managersOnly, staffOnly } from './policies.ts';
import { pumps } from './pumps.ts';
import { users } from './users.ts';

/** What a company, one of its motor models or a pump sets otherwise than the rules' defaults; the most specific wins. */
export const ruleSettings = pgTable(
  'rule_settings',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    /** Neither = the whole company. */
    modelId: uuid('model_id'),
    pumpId: uuid('pump_id'),
    rules: jsonb().$type<RuleSettings>().notNull(),
    version: integer().notNull().default(1),
    changedAt: instant('changed_at').notNull(),
    changedBy: uuid('changed_by'),
  },
  (table) => [
    foreignKey({
      name: 'rule_settings_model_fkey',
      columns: [table.companyId, table.modelId],
      foreignColumns: [motorModels.companyId, motorModels.id],
    }).onDelete('cascade'),
    foreignKey({
      name: 'rule_settings_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }).onDelete('cascade'),
    foreignKey({
      name: 'rule_settings_changed_by_fkey',
      columns: [table.companyId, table.changedBy],
      foreignColumns: [users.companyId, users.id],
    }),
    unique('rule_settings_scope_key').on(table.companyId, table.modelId, table.pumpId).nullsNotDistinct(),
    check('rule_settings_one_scope', sql`model_id is null or pump_id is null`),
    appReads('rule_settings', staffOnly),
    ...appWrites('rule_settings', managersOnly),
    machineWorks('rule_settings'),
  ],
);
