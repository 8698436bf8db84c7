import type { Context } from '#server/context.ts';
import { epochDayOf } from '#server/db/day-text.ts';
import { createPriceKeys } from '#server/db/price-keys.ts';
import { listBaselines } from '#server/db/stated-baselines.ts';
import { listStoredHours, type StoredHours, toDayUse } from '#server/db/stored-days.ts';
import { findPadPrices, type PadPrices } from '#server/db/tariffs-in-force.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { Role } from '#shared/contract/primitives.ts';
import type { Baseline } from '#shared/domain/energy/savings-baseline.ts';
import { type EnergyDay, type EnergyPump, listEnergyDays } from './energy-read-model.ts';
import type { EnergyWindow } from './energy-window.ts';
import { groupBy } from './group-by.ts';
import { type ReckonedDays, reckonDays } from './reckon-days.ts';
import type { FigureDay } from './sum-figures.ts';

/** A pump's window, reckoned. */
export type PumpReckoning = {
  readonly pump: EnergyPump;
  readonly days: readonly FigureDay[];
  readonly reckoned: ReckonedDays;
  readonly baseline: Baseline | undefined;
};

export type EnergyReckoning = { readonly pumps: readonly PumpReckoning[]; readonly prices: PadPrices };

/** Money is the manager's and the homeowner's own; a technician's work needs it only in the advice for a program. */
export const seesMoney = (role: Role): boolean => role !== 'technician';

/** Figures younger than this count as present: time since then is no gap yet, ms. */
const PRESENT_MS = 3_600_000;

/** Up to when something could be known of pumps: now, or the last rollup while that is fresh. */
export function knownTo(pumps: readonly EnergyPump[], now: number): number {
  const rolledTo = Math.max(...pumps.map((pump) => pump.rolledTo ?? 0));
  return now - rolledTo <= PRESENT_MS ? rolledTo : now;
}

/** Loads and prices a window of some pumps of one pad: from stored prices, and from hours where those are out of date. */
export async function readEnergy(
  { db }: Context,
  padId: string,
  pumps: readonly EnergyPump[],
  window: EnergyWindow,
): Promise<EnergyReckoning> {
  const pumpIds = pumps.map(({ pumpId }) => pumpId);
  const prices = await findPadPrices(db, padId);
  const whole = { from: window.monthsFrom, until: window.monthsUntil };
  const days = await listEnergyDays(db, pumpIds, whole);
  const outdated = findOutdated(days, createPriceKeys(pumps[0]?.zone ?? '', prices));
  const baselines = await listBaselines(db, pumpIds);
  const hours = await listNeededHours(db, pumpIds, whole, { prices, outdated, savings: baselines.size > 0 });
  const daysByPump = groupBy(days, ({ pumpId }) => pumpId);
  const hoursByPump = groupBy(hours, ({ pumpId }) => pumpId);
  return {
    prices,
    pumps: pumps.map((pump) => {
      const uses = (hoursByPump.get(pump.pumpId) ?? []).map((day) => toDayUse(pump.zone, day));
      const own = { days: daysByPump.get(pump.pumpId) ?? [], uses, outdated };
      const reckoned = reckonDays(own, prices);
      return {
        pump,
        reckoned,
        baseline: baselines.get(pump.pumpId),
        days: toFigures(pump, own.days, reckoned, window),
      };
    }),
  };
}

type Needs = { readonly prices: PadPrices; readonly outdated: ReadonlySet<string>; readonly savings: boolean };

/** Hours of the months that are priced here and now; of all of them where savings are reckoned. */
async function listNeededHours(
  db: Transaction,
  pumpIds: readonly string[],
  whole: { readonly from: string; readonly until: string },
  { prices, outdated, savings }: Needs,
): Promise<StoredHours[]> {
  if (!savings && outdated.size === 0) return [];
  const demand = prices.terms.some(({ tariff }) => tariff.demand !== undefined || tariff.flatDemand !== undefined);
  const asked = savings ? whole : { ...whole, months: [...outdated] };
  return await listStoredHours(db, pumpIds, asked, { demand, savings });
}

/** First days of the months in which some day was priced by something else than now, or not yet. */
function findOutdated(days: readonly EnergyDay[], keyOf: (month: string) => string): ReadonlySet<string> {
  const outdated = new Set<string>();
  for (const { day, pricedBy } of days) {
    const month = `${day.slice(0, 7)}-01`;
    if (pricedBy !== keyOf(month)) outdated.add(month);
  }
  return outdated;
}

function toFigures(
  { purpose }: EnergyPump,
  days: readonly EnergyDay[],
  { byDay }: ReckonedDays,
  { from, until }: EnergyWindow,
): FigureDay[] {
  const turnsPool = purpose === 'filter';
  return days
    .filter(({ day }) => day >= from && day < until)
    .map((day) => ({ day, turnsPool, settled: byDay.get(epochDayOf(day.day)) }));
}
