import { nextMonth } from '#server/db/day-text.ts';
import { createCompareKeys, createPriceKeys } from '#server/db/price-keys.ts';
import type { MonthSaved } from '#server/db/schema/pump-months.ts';
import { listBaselines } from '#server/db/stated-baselines.ts';
import { listStoredHours, toDayUse } from '#server/db/stored-days.ts';
import { findPadPrices } from '#server/db/tariffs-in-force.ts';
import type { Transaction } from '#server/db/transaction.ts';
import { compareDays } from '#shared/domain/energy/compare-days.ts';
import { billOf } from '#shared/domain/energy/month-bill.ts';
import { priceDays } from '#shared/domain/energy/price-days.ts';
import { sumSavings } from '#shared/domain/energy/sum-savings.ts';
import { writeComparedDays, writeDayPrices } from './day-price-repository.ts';
import { writeMonth } from './month-repository.ts';
import type { TakenPump } from './rollup-work.ts';

type Priced = Pick<TakenPump, 'pumpId' | 'companyId' | 'padId' | 'zone' | 'highWater'>;

/** Works out what some calendar months of a pump and their days used, cost and saved, from their hours, in their transaction. */
export async function priceMonths(
  db: Pick<Transaction, 'execute'>,
  pump: Priced,
  months: readonly string[],
  now: number,
): Promise<void> {
  if (months.length === 0) return;
  const prices = await findPadPrices(db, pump.padId);
  const keyOf = createPriceKeys(pump.zone, prices);
  const baseline = (await listBaselines(db, [pump.pumpId])).get(pump.pumpId);
  for (const month of months) {
    const stored = await listStoredHours(db, [pump.pumpId], { from: month, until: nextMonth(month) });
    const days = stored.map((day) => toDayUse(pump.zone, day));
    const priced = priceDays(days, prices.terms, prices);
    await writeDayPrices(db, pump.pumpId, keyOf(month), priced);
    const bill = billOf(priced);
    const compared = baseline === undefined ? [] : compareDays(baseline, days, prices.terms, prices.otherKwhByPeriod);
    const comparedBy = baseline && createCompareKeys(keyOf, baseline)(month);
    await writeComparedDays(db, { pumpId: pump.pumpId, month }, comparedBy, compared);
    const saved = baseline && sumSavings(baseline, compared);
    const savedMonth: MonthSaved | null =
      saved === undefined
        ? null
        : { ...saved, savedMicros: saved.savedMicros ?? 0, sigmaMicros: saved.sigmaMicros ?? 0 };
    await writeMonth(db, pump, { month, days: days.length, bill, saved: savedMonth }, now);
  }
}
