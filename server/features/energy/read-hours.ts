import type { z } from 'zod';
import type { Context } from '#server/context.ts';
import { dayText, epochDayOf } from '#server/db/day-text.ts';
import { listStoredHours, type StoredHours, toDayUse } from '#server/db/stored-days.ts';
import { findPadPrices } from '#server/db/tariffs-in-force.ts';
import { notFound } from '#server/errors.ts';
import type { HourCells, HourMap } from '#shared/contract/http/energy.ts';
import { marginalMicros } from '#shared/domain/energy/charge-tiers.ts';
import { formatMicros } from '#shared/domain/energy/money-text.ts';
import { termOn } from '#shared/domain/energy/price-days.ts';
import { periodAt, type Tariff } from '#shared/domain/energy/tariff.ts';
import { groupBy } from '#shared/domain/grouping/group-by.ts';
import { findEnergyPad, findEnergyPump, listEnergyPumps } from './energy-read-model.ts';
import { type EnergyWindow, monthWindow } from './energy-window.ts';
import { seesMoney } from './read-energy.ts';

const HOURS = 24;
const MONDAY = 0;
const SATURDAY = 5;
/** Any length does for the price of a first kWh. */
const ANY_DAYS = 30;

/** Watt-hours of wall-clock hours of one day, pumps together; null where no reading covers the hour. */
function cellsOf(zone: string, day: string, stored: readonly StoredHours[]): z.infer<typeof HourCells> {
  const cells: (number | null)[] = Array.from({ length: HOURS }, () => null);
  for (const one of stored) {
    const { hours } = toDayUse(zone, one);
    for (const [index, { hour }] of hours.entries()) {
      const wattHours = one.wattHours[index];
      if (wattHours !== null && wattHours !== undefined) cells[hour] = (cells[hour] ?? 0) + wattHours;
    }
  }
  return { day, wattHours: cells };
}

/** What a first kWh costs in each hour of a month's weekdays and weekends. */
export function hourPrices(tariff: Tariff, month: number): NonNullable<HourMap['prices']> {
  const extra = tariff.monthlyAdjustmentMicros?.[month] ?? 0;
  const priceAt = (weekday: number, hour: number): string => {
    const period = periodAt(tariff.energy, month, weekday, hour) ?? 0;
    return formatMicros(marginalMicros(tariff.energy.periods[period] ?? [], 0, ANY_DAYS) + extra);
  };
  const day = (weekday: number) => Array.from({ length: HOURS }, (_, hour) => priceAt(weekday, hour));
  return { currency: tariff.currency, weekday: day(MONDAY), weekend: day(SATURDAY) };
}

async function readHours(
  { db, actor, now }: Context,
  place: { readonly padId: string; readonly zone: string; readonly pumpIds: readonly string[] },
  window: EnergyWindow,
): Promise<HourMap> {
  const stored = groupBy(
    await listStoredHours(db, place.pumpIds, window, { demand: false, savings: false }),
    ({ day }) => day,
  );
  const { terms } = await findPadPrices(db, place.padId);
  const first = epochDayOf(window.from);
  const term = termOn(terms, first) ?? terms.at(-1);
  const month = Number(window.from.slice(5, 7)) - 1;
  const count = epochDayOf(window.until) - first;
  const days = Array.from({ length: count }, (_, index) => dayText(first + index));
  return {
    days: days.filter((day) => stored.has(day)).map((day) => cellsOf(place.zone, day, stored.get(day) ?? [])),
    prices: term === undefined || !seesMoney(actor.role) ? null : hourPrices(term.tariff, month),
    serverNow: now,
  };
}

type MonthAsked = { readonly month?: string | undefined };

/** A month of a pump hour by hour. */
export async function readPumpHours(context: Context, { pumpId, month }: MonthAsked & { readonly pumpId: string }) {
  const pump = await findEnergyPump(context.db, pumpId);
  if (pump === undefined) throw notFound('pump');
  const window = monthWindow(month, pump.zone, context.now);
  return readHours(context, { padId: pump.padId, zone: pump.zone, pumpIds: [pumpId] }, window);
}

/** A month of a pad hour by hour. */
export async function readPadHours(context: Context, { padId, month }: MonthAsked & { readonly padId: string }) {
  const pad = await findEnergyPad(context.db, padId);
  if (pad === undefined) throw notFound('pad');
  const pumpIds = (await listEnergyPumps(context.db, padId)).map(({ pumpId }) => pumpId);
  return readHours(context, { padId, zone: pad.zone, pumpIds }, monthWindow(month, pad.zone, context.now));
}
