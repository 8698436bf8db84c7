import type { Context } from '#server/context.ts';
import { newId } from './new-id.ts';
import { auditEntries } from './schema/audit-entries.ts';

/** What a person did, and to what; `detail` holds nothing secret. */
export type Act = {
  readonly action: string;
  readonly subjectKind: 'alarm' | 'backtest' | 'company' | 'device' | 'motor-model' | 'pad' | 'pump' | 'tariff';
  readonly subjectId: string;
  readonly detail?: Readonly<Record<string, string | number | boolean | null>>;
};

/** Adds a line to the company's audit trail, in the transaction of what was done. */
export async function recordAct({ db, actor, now, address, requestId }: Context, act: Act): Promise<void> {
  const { action, subjectKind, subjectId, detail = {} } = act;
  await db.insert(auditEntries).values({
    id: newId(),
    companyId: actor.companyId,
    at: new Date(now),
    actorUserId: actor.userId,
    actorName: actor.name,
    action,
    subjectKind,
    subjectId,
    detail,
    address: address ?? null,
    requestId,
  });
}
