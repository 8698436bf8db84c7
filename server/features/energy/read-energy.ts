import type { Context } from '#server/context.ts';
import { epochDayOf } from '#server/db/day-text.ts';
import { createCompareKeys, createPriceKeys } from '#server/db/price-keys.ts';
import { listBaselines } from '#server/db/stated-baselines.ts';
import { listStoredHours, type StoredHours, toDayUse } from '#server/db/stored-days.ts';
import { findPadPrices, type PadPrices } from '#server/db/tariffs-in-force.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { Role } from '#shared/contract/primitives.ts';
import type { ComparedDay } from '#shared/domain/energy/compare-days.ts';
import type { Baseline } from '#shared/domain/energy/savings-baseline.ts';
import { groupBy } from '#shared/domain/grouping/group-by.ts';
import { type EnergyDay, type EnergyPump, listEnergyDays } from './energy-read-model.ts';
import type { EnergyWindow } from './energy-window.ts';
import { readCompared } from './read-compared.ts';
import { reckonDays, type SettledDay } from './reckon-days.ts';
import type { FigureDay } from './sum-figures.ts';

/** A pump's window, reckoned. */
export type PumpReckoning = {
  readonly pump: EnergyPump;
  readonly days: readonly FigureDay[];
  readonly baseline: Baseline | undefined;
  /** Days of the window beside what the motor before would have used; empty without a baseline. */
  readonly compared: readonly ComparedDay[];
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
  const keyOf = createPriceKeys(pumps[0]?.zone ?? '', prices);
  const outdated = listMonths(days, ({ pricedBy }, month) => pricedBy !== keyOf(month));
  const baselines = await listBaselines(db, pumpIds);
  const comparing = new Map([...baselines].map(([pumpId, baseline]) => [pumpId, createCompareKeys(keyOf, baseline)]));
  const incomparable = listMonths(days, ({ pumpId, comparedBy }, month) => {
    const compareKeyOf = comparing.get(pumpId);
    return compareKeyOf !== undefined && comparedBy !== compareKeyOf(month);
  });
  const hours = await listNeededHours(db, pumpIds, whole, { prices, outdated, incomparable });
  const daysByPump = groupBy(days, ({ pumpId }) => pumpId);
  const hoursByPump = groupBy(hours, ({ pumpId }) => pumpId);
  return {
    prices,
    pumps: pumps.map((pump) => {
      const uses = (hoursByPump.get(pump.pumpId) ?? []).map((day) => toDayUse(pump.zone, day));
      const own = { days: daysByPump.get(pump.pumpId) ?? [], uses, outdated, incomparable };
      const baseline = baselines.get(pump.pumpId);
      const within = ({ epochDay }: ComparedDay): boolean =>
        epochDay >= epochDayOf(window.from) && epochDay < epochDayOf(window.until);
      return {
        pump,
        baseline,
        compared: baseline === undefined ? [] : readCompared(own, baseline, prices).filter(within),
        days: toFigures(pump, own.days, reckonDays(own, prices), window),
      };
    }),
  };
}

type Needs = {
  readonly prices: PadPrices;
  readonly outdated: ReadonlySet<string>;
  readonly incomparable: ReadonlySet<string>;
};

/** Hours of the months that are priced or compared here and now. */
async function listNeededHours(
  db: Transaction,
  pumpIds: readonly string[],
  whole: { readonly from: string; readonly until: string },
  { prices, outdated, incomparable }: Needs,
): Promise<StoredHours[]> {
  const months = [...new Set([...outdated, ...incomparable])];
  if (months.length === 0) return [];
  const demand = prices.terms.some(({ tariff }) => tariff.demand !== undefined || tariff.flatDemand !== undefined);
  return await listStoredHours(db, pumpIds, { ...whole, months }, { demand, savings: incomparable.size > 0 });
}

/** First days of the months in which some day was worked out by something else than now, or not yet. */
function listMonths(
  days: readonly EnergyDay[],
  isOutdated: (day: EnergyDay, month: string) => boolean,
): ReadonlySet<string> {
  const months = new Set<string>();
  for (const day of days) {
    const month = `${day.day.slice(0, 7)}-01`;
    if (isOutdated(day, month)) months.add(month);
  }
  return months;
}

function toFigures(
  { purpose }: EnergyPump,
  days: readonly EnergyDay[],
  byDay: ReadonlyMap<number, SettledDay>,
  { from, until }: EnergyWindow,
): FigureDay[] {
  const turnsPool = purpose === 'filter';
  return days
    .filter(({ day }) => day >= from && day < until)
    .map((day) => ({ day, turnsPool, settled: byDay.get(epochDayOf(day.day)) }));
}
