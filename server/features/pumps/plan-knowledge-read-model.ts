import { sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';

/** Those parts of a pump's saved fold that its plan rests on, opaque here. */
export type PlanKnowledgeRow = { readonly control: unknown; readonly inputs: unknown };

/** The same of several pumps the person may see, by pump; a pump of which nothing is known yet is missing. */
export async function listPlanKnowledge(
  db: Transaction,
  pumpIds: readonly string[],
): Promise<ReadonlyMap<string, PlanKnowledgeRow>> {
  const { rows } = await db.execute<PlanKnowledgeRow & { readonly pumpId: string }>(sql`
    select s.pump_id as "pumpId", s.hot #> '{fold,control}' as control, l.learnt -> 'inputs' as inputs
    from pump_states s left join pump_learnt l on l.pump_id = s.pump_id
    where s.pump_id = any(${sql.param(pumpIds)}::uuid[])`);
  return new Map(rows.map(({ pumpId, ...row }) => [pumpId, row]));
}
