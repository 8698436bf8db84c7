import type { Context } from '#server/context.ts';
import { epochDayOf } from '#server/db/day-text.ts';
import { listBaselines } from '#server/db/stated-baselines.ts';
import { listStoredHours, type StoredHours } from '#server/db/stored-days.ts';
import { findPadPrices, type PadPrices } from '#server/db/tariffs-in-force.ts';
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

/** Loads and prices a window of some pumps of one pad. */
export async function readEnergy(
  { db }: Context,
  padId: string,
  pumps: readonly EnergyPump[],
  window: EnergyWindow,
): Promise<EnergyReckoning> {
  const pumpIds = pumps.map(({ pumpId }) => pumpId);
  const prices = await findPadPrices(db, padId);
  const days = groupBy(await listEnergyDays(db, pumpIds, window), ({ pumpId }) => pumpId);
  const months = { from: window.monthsFrom, until: window.monthsUntil };
  const baselines = await listBaselines(db, pumpIds);
  const demand = prices.terms.some(({ tariff }) => tariff.demand !== undefined || tariff.flatDemand !== undefined);
  const needed = { demand, savings: baselines.size > 0 };
  const hours = groupBy(await listStoredHours(db, pumpIds, months, needed), ({ pumpId }) => pumpId);
  return {
    prices,
    pumps: pumps.map((pump) =>
      reckonPump(pump, days.get(pump.pumpId) ?? [], hours.get(pump.pumpId) ?? [], {
        prices,
        baseline: baselines.get(pump.pumpId),
      }),
    ),
  };
}

function reckonPump(
  pump: EnergyPump,
  days: readonly EnergyDay[],
  hours: readonly StoredHours[],
  { prices, baseline }: { readonly prices: PadPrices; readonly baseline: Baseline | undefined },
): PumpReckoning {
  const reckoned = reckonDays(pump.zone, hours, prices);
  const turnsPool = pump.purpose === 'filter';
  return {
    pump,
    reckoned,
    baseline,
    days: days.map((day) => ({ day, turnsPool, settled: reckoned.byDay.get(epochDayOf(day.day)) })),
  };
}
