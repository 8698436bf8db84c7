import { and, eq, isNull } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { newId } from '#server/db/new-id.ts';
import { pads } from '#server/db/schema/pads.ts';
import { tariffPlans } from '#server/db/schema/tariff-plans.ts';
import { tariffTerms } from '#server/db/schema/tariff-terms.ts';
import { changedMeanwhile } from '#server/http/etag.ts';

export type Term = { readonly tariffId: string; readonly from: string; readonly to: string | null };

export type Plan = {
  readonly id: string;
  readonly ownMeter: boolean;
  readonly otherKwhByPeriod: readonly number[];
  readonly version: number;
  readonly terms: readonly Term[];
};

const ofPad = (padId: string | undefined) =>
  padId === undefined ? isNull(tariffPlans.padId) : eq(tariffPlans.padId, padId);

/** The plan of a pad, or (without one) of the company; undefined where nothing was said yet. */
export async function findPlan({ db, actor }: Context, padId: string | undefined): Promise<Plan | undefined> {
  const [plan] = await db
    .select()
    .from(tariffPlans)
    .where(and(eq(tariffPlans.companyId, actor.companyId), ofPad(padId)));
  if (plan === undefined) return undefined;
  const terms = await db
    .select({ tariffId: tariffTerms.tariffId, from: tariffTerms.fromDay, to: tariffTerms.toDay })
    .from(tariffTerms)
    .where(eq(tariffTerms.planId, plan.id))
    .orderBy(tariffTerms.fromDay);
  const { id, ownMeter, otherKwhByPeriod, version } = plan;
  return { id, ownMeter, otherKwhByPeriod, version, terms };
}

/** Whether the company has this pad. */
export const hasPad = async ({ db, actor }: Context, padId: string): Promise<boolean> =>
  (await db.$count(pads, and(eq(pads.companyId, actor.companyId), eq(pads.id, padId)))) > 0;

type SavedPlan = Omit<Plan, 'id' | 'version'> & { readonly padId: string | undefined };

/** Puts a plan in the place of the one that was there; two at once do not both succeed. */
export async function savePlan({ db, actor }: Context, known: Plan | undefined, plan: SavedPlan): Promise<void> {
  const { companyId } = actor;
  const { ownMeter, terms } = plan;
  const otherKwhByPeriod = [...plan.otherKwhByPeriod];
  const planId = known?.id ?? newId();
  const written =
    known === undefined
      ? await db
          .insert(tariffPlans)
          .values({ id: planId, companyId, padId: plan.padId ?? null, ownMeter, otherKwhByPeriod })
          .onConflictDoNothing()
          .returning({ id: tariffPlans.id })
      : await db
          .update(tariffPlans)
          .set({ ownMeter, otherKwhByPeriod, version: known.version + 1 })
          .where(and(eq(tariffPlans.id, planId), eq(tariffPlans.version, known.version)))
          .returning({ id: tariffPlans.id });
  if (written.length === 0) throw changedMeanwhile();
  await db.delete(tariffTerms).where(and(eq(tariffTerms.companyId, companyId), eq(tariffTerms.planId, planId)));
  if (terms.length > 0)
    await db
      .insert(tariffTerms)
      .values(terms.map(({ tariffId, from, to }) => ({ planId, companyId, tariffId, fromDay: from, toDay: to })));
}
