import { newId } from '#server/db/new-id.ts';
import { baselines } from '#server/db/schema/baselines.ts';
import { carbonChoices } from '#server/db/schema/carbon-choices.ts';
import { tariffPlans } from '#server/db/schema/tariff-plans.ts';
import { tariffTerms } from '#server/db/schema/tariff-terms.ts';
import { tariffs } from '#server/db/schema/tariffs.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { DemoEnergy } from '#shared/contract/demo/demo-company.ts';
import { checkTariff } from '#shared/domain/energy/check-tariff.ts';
import { type CommissionedDevice, idOf } from './commissioning.ts';

type Made = {
  readonly companyId: string;
  readonly padIds: ReadonlyMap<string, string>;
  readonly pumps: readonly CommissionedDevice[];
};

/** Writes a company's tariffs with their terms, what its pumps used before, and its grid. */
export async function commissionEnergy(db: Transaction, energy: DemoEnergy, made: Made): Promise<void> {
  const { companyId, padIds, pumps } = made;
  const tariffIds = new Map<string, string>();
  for (const { key, tariff } of energy.tariffs) {
    const [fault] = checkTariff(tariff);
    if (fault !== undefined)
      throw new Error(`The company's tariff "${key}" is not one: ${fault.field} ${fault.reason}`);
    const id = newId();
    await db.insert(tariffs).values({ id, companyId, name: tariff.name, tariff });
    tariffIds.set(key, id);
  }
  const planId = newId();
  await db.insert(tariffPlans).values({ id: planId, companyId });
  for (const { tariff, from, to } of energy.companyTerms)
    await db
      .insert(tariffTerms)
      .values({ planId, companyId, tariffId: idOf(tariffIds, tariff), fromDay: from, toDay: to });
  for (const { pad, tariff, from, ownMeter, otherKwhByPeriod } of energy.padTerms) {
    const own = newId();
    const padId = idOf(padIds, pad);
    await db.insert(tariffPlans).values({ id: own, companyId, padId, ownMeter, otherKwhByPeriod });
    await db
      .insert(tariffTerms)
      .values({ planId: own, companyId, tariffId: idOf(tariffIds, tariff), fromDay: from, toDay: null });
  }
  const pumpIds = new Map(pumps.map(({ serial, pumpId }) => [serial, pumpId]));
  for (const { serial, ...stated } of energy.baselines)
    await db.insert(baselines).values({ pumpId: idOf(pumpIds, serial), companyId, stated });
  await db.insert(carbonChoices).values({ companyId, region: energy.carbonRegion });
}
