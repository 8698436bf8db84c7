import { listCommissionedPumps } from '#server/db/commissioned-pumps.ts';
import { findPadPrices } from '#server/db/tariffs-in-force.ts';
import type { Transaction } from '#server/db/transaction.ts';
import { advisePump, type PumpAdvice } from '#shared/domain/advisor/advise-pump.ts';
import { termOn } from '#shared/domain/energy/price-days.ts';
import { localDayAt } from '#shared/domain/time/local-days.ts';
import { saveAdvice } from './advice-repository.ts';

/** Works a pump's program out by what is commissioned and the tariff of today, and keeps it. Seconds of work at worst. */
export async function advisePumpNow(db: Transaction, pumpId: string, now: number): Promise<PumpAdvice | undefined> {
  const [pump] = await listCommissionedPumps(db, [pumpId]);
  if (pump === undefined) return undefined;
  const { zone } = pump.context;
  const { terms, names, otherKwhByPeriod } = await findPadPrices(db, pump.padId);
  const today = localDayAt(zone, now)?.epochDay ?? 0;
  const term = termOn(terms, today);
  const month = new Date(today * 86_400_000).getUTCMonth();
  const made = advisePump(pump.context, { tariff: term?.tariff, month, otherKwhByPeriod });
  const basis = {
    month,
    tariffId: term?.id,
    tariffName: term === undefined ? undefined : names.get(term.id),
    currency: term?.tariff.currency,
    needs: made.needs,
  };
  await saveAdvice(db, pump, basis, made, now);
  return made;
}
