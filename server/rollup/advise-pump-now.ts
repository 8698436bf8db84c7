import type pg from 'pg';
import { type CommissionedPump, listCommissionedPumps } from '#server/db/commissioned-pumps.ts';
import { findPadPrices, type PadPrices } from '#server/db/tariffs-in-force.ts';
import { asMachine, openDatabase } from '#server/db/transaction.ts';
import { ringForPumps } from '#server/live/ring.ts';
import { announceAlarms } from '#server/mail/announce-alarms.ts';
import { advisePump, type PumpAdvice } from '#shared/domain/advisor/advise-pump.ts';
import { COSTLY_PROGRAM, type CostlyMemory } from '#shared/domain/advisor/judge-costly-program.ts';
import { monthOfDay, rememberPastDays } from '#shared/domain/advisor/remember-past-days.ts';
import { termOn } from '#shared/domain/energy/price-days.ts';
import { localDay, localDayAt } from '#shared/domain/time/local-days.ts';
import { saveAdvice } from './advice-repository.ts';
import { findCostlyMemory, listToldDays } from './costly-repository.ts';
import { noteCostlyProgram } from './note-costly-program.ts';

export type AdviseOptions = { readonly pool: pg.Pool; readonly publicUrl: string; readonly now: number };

/**
 * Works a pump's program out by what is commissioned and the tariff of today, keeps it, and notes a program that has
 * cost too much for two weeks. Seconds of work at worst, of which the transaction is none.
 */
export async function advisePumpNow(options: AdviseOptions, pumpId: string): Promise<PumpAdvice | undefined> {
  const { pool, publicUrl, now } = options;
  const db = openDatabase(pool);
  const [pump] = await listCommissionedPumps(db, [pumpId]);
  if (pump === undefined) return undefined;
  const { zone, padState } = pump.context;
  const prices = await findPadPrices(db, pump.padId);
  const today = localDayAt(zone, now)?.epochDay ?? 0;
  const term = termOn(prices.terms, today);
  const month = monthOfDay(today);
  const made = advisePump(pump.context, {
    tariff: term?.tariff,
    month,
    otherKwhByPeriod: prices.otherKwhByPeriod,
  });
  const past = await learnPast(pool, pump, prices, { today, made });
  const currency = term?.tariff.currency;
  const tariffName = term === undefined ? undefined : prices.names.get(term.id);
  const changes = await asMachine(pool, async (tx, client) => {
    await saveAdvice(tx, pump, { month, tariffId: term?.id, tariffName, currency, needs: made.needs }, made, now);
    const daily = { advice: made.advice, currency: currency ?? '', localDay: today, at: now, padState };
    const noted = await noteCostlyProgram(client, pump, daily, past);
    await announceAlarms(client, noted, { publicUrl, now });
    return noted;
  });
  if (changes.length > 0) await ringForPumps(pool, 'millrace_live', [pumpId]);
  return made;
}

/** Of a pump that is looked at for the first time: the two weeks before, as far as its readings tell of them. */
async function learnPast(
  pool: pg.Pool,
  pump: CommissionedPump,
  { terms, otherKwhByPeriod }: PadPrices,
  { today, made }: { readonly today: number; readonly made: PumpAdvice },
): Promise<CostlyMemory | undefined> {
  if (made.savedShare === undefined || (await findCostlyMemory(pool, pump.pumpId)) !== undefined) return undefined;
  // Where there is nothing to save today, yesterday is no news.
  if (made.savedShare < COSTLY_PROGRAM.savedShare) return undefined;
  const before = Array.from({ length: COSTLY_PROGRAM.days - 1 }, (_, index) => today - COSTLY_PROGRAM.days + 1 + index);
  const days = before.map((day) => localDay(pump.context.zone, day)).filter((day) => day !== undefined);
  const told = await listToldDays(pool, pump.pumpId, days);
  return rememberPastDays(pump.context, told, { terms, otherKwhByPeriod, today, made });
}
