import { type SQL, sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';
import type { StoredRules } from '#shared/contract/http/rules.ts';

/** A scope with its name and what is set for it. */
export type RuleRow = {
  readonly scopeId: string;
  readonly name: string;
  readonly rules: StoredRules | null;
  /** Of the motor that is fitted to a pump now. */
  readonly modelRules?: StoredRules | null;
  readonly version: number | null;
  readonly changedAt: number | null;
  readonly changedBy: string | null;
};

const ruleColumns = sql`r.rules, r.version, round(extract(epoch from r.changed_at) * 1000)::float8 as "changedAt",
  changer.name as "changedBy"`;
const changer = sql`left join users changer on changer.id = r.changed_by`;

/** The company's own. */
export async function getCompanyRules(db: Transaction, companyId: string): Promise<RuleRow | undefined> {
  const { rows } = await db.execute<RuleRow>(sql`
    select c.id as "scopeId", c.name, ${ruleColumns} from companies c
    left join rule_settings r on r.company_id = c.id and r.model_id is null and r.pump_id is null ${changer}
    where c.id = ${companyId}`);
  return rows[0];
}

/** Motor models of the company by name: all, or one. */
export async function listModelRules(db: Transaction, companyId: string, modelId?: string): Promise<RuleRow[]> {
  const which: SQL = modelId === undefined ? sql`true` : sql`model.id = ${modelId}`;
  const { rows } = await db.execute<RuleRow>(sql`
    select model.id as "scopeId", model.name, ${ruleColumns} from motor_models model
    left join rule_settings r on r.company_id = model.company_id and r.model_id = model.id ${changer}
    where model.company_id = ${companyId} and ${which} order by lower(model.name)`);
  return rows;
}

/** Pumps with settings of their own by name, or one pump whether it has any or not. */
export async function listPumpRules(db: Transaction, companyId: string, pumpId?: string): Promise<RuleRow[]> {
  const which: SQL = pumpId === undefined ? sql`r.id is not null` : sql`p.id = ${pumpId}`;
  const { rows } = await db.execute<RuleRow>(sql`
    select p.id as "scopeId", pad.name || ', ' || p.name as name, ${ruleColumns},
      (select above.rules from motor_fittings f join motors m on m.id = f.motor_id
        join rule_settings above on above.company_id = p.company_id and above.model_id = m.model_id
        where f.pump_id = p.id and f.starts_at <= now() and (f.ends_at is null or f.ends_at > now()) limit 1) as "modelRules"
    from pumps p join pads pad on pad.id = p.pad_id
    left join rule_settings r on r.company_id = p.company_id and r.pump_id = p.id ${changer}
    where p.company_id = ${companyId} and ${which} order by lower(pad.name), p.name`);
  return rows;
}
