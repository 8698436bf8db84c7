import type { Context } from '#server/context.ts';
import { epochDayOf, previousMonth } from '#server/db/day-text.ts';
import type { FleetEnergy } from '#shared/contract/http/energy-fleet.ts';
import { toMinorUnits } from '#shared/domain/energy/money.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import { localDay, localDayAt } from '#shared/domain/time/local-days.ts';
import { monthWindow } from './energy-window.ts';
import {
  type FleetMonthRow,
  findCompanyZone,
  findFleetMonth,
  findFleetProgress,
  listFleetDays,
  listFleetPeriods,
} from './fleet-month-read-model.ts';
import { spanOf } from './present-energy.ts';
import { presentCarbon } from './reckon-savings.ts';
import { shareCents } from './share-cents.ts';

/** Figures older than this say that a pump is silent, ms. */
const FRESH_MS = 3_600_000;

type Asked = { readonly month?: string | undefined };

/** A month of the whole company. */
export async function readFleetMonth({ db, actor, now }: Context, asked: Asked): Promise<FleetEnergy> {
  const { companyId } = actor;
  const zone = await findCompanyZone(db, companyId);
  const window = monthWindow(asked.month, zone, now);
  const month = window.from;
  const row = await findFleetMonth(db, companyId, month);
  const span = spanOf(window, zone);
  const progress = await findFleetProgress(db, companyId, { ...span, freshMs: FRESH_MS, now });
  const periods = row.currency === null ? [] : await listFleetPeriods(db, companyId, month, row.currency);
  const days = await listFleetDays(db, companyId, month, window.until);
  const before = await findFleetMonth(db, companyId, previousMonth(month));
  const { currency } = row;
  const isKnown = row.gallons > 0;
  return {
    month: month.slice(0, 7),
    upTo: progress.upTo,
    currency,
    pumps: row.pumps,
    priced: row.priced,
    otherCurrencies: row.otherCurrencies,
    pending: progress.pending,
    kwh: row.wattHours / 1000,
    cost: costOf(row),
    seconds: (row.spanMs + progress.behindMs) / 1000,
    coveredSeconds: row.coveredMs / 1000,
    onSeconds: row.onMs / 1000,
    gallons: isKnown ? row.gallons : null,
    saved: presentSaved(row, progress.region),
    carbon: presentCarbon(row.wattHours / 1000, 'consumption', progress.region),
    periods: presentPeriods(periods, row),
    days: days.map(({ day, pumps, wattHours }) => ({ day, pumps, kwh: wattHours / 1000 })),
    previous:
      before.pumps === 0
        ? null
        : {
            month: previousMonth(month).slice(0, 7),
            kwh: before.wattHours / 1000,
            cost: before.currency === currency ? costOf(before) : null,
          },
    firstMonth: progress.firstMonth,
    serverNow: now,
  };
}

const costOf = ({ costMinor, currency }: FleetMonthRow): string | null =>
  costMinor === null || currency === null ? null : formatMinor(costMinor, currency);

function presentSaved(row: FleetMonthRow, region: string | null): FleetEnergy['saved'] {
  if (row.savedPumps === 0) return null;
  const { currency, savedKwh } = row;
  const text = (micros: number): string | null => {
    const units = currency === null ? undefined : toMinorUnits(micros, currency);
    return units === undefined || currency === null ? null : formatMinor(units, currency);
  };
  return {
    pumps: row.savedPumps,
    savedKwh,
    sigmaKwh: row.savedSigmaKwh,
    saved: text(row.savedMicros),
    sigma: text(row.savedSigmaMicros),
    carbon: presentCarbon(savedKwh, 'savings', region),
  };
}

type PeriodRow = { readonly name: string; readonly kwh: number; readonly micros: number };

/** The periods share the sum of the pumps' cents, so that they add up to it. */
function presentPeriods(rows: readonly PeriodRow[], { currency, costMinor }: FleetMonthRow): FleetEnergy['periods'] {
  const micros = rows.map((row) => row.micros);
  const minor = currency === null ? undefined : shareCents(micros, { minorUnits: costMinor ?? 0, currency });
  return rows.map(({ name, kwh }, index) => {
    const units = minor?.[index];
    return { name, kwh, cost: units === undefined || currency === null ? null : formatMinor(units, currency) };
  });
}

/** A month of the whole company hour by hour; hours that have not come yet are empty. */
export async function readFleetHours({ db, actor, now }: Context, asked: Asked) {
  const { companyId } = actor;
  const zone = await findCompanyZone(db, companyId);
  const window = monthWindow(asked.month, zone, now);
  const rows = await listFleetDays(db, companyId, window.from, window.until);
  const today = localDayAt(zone, now);
  const days = rows.map(({ day, hours }) => {
    const from = localDay(zone, epochDayOf(day))?.from ?? 0;
    const isToday = today !== undefined && epochDayOf(day) >= today.epochDay;
    const wattHours = Array.from({ length: 24 }, (_, hour) =>
      isToday && from + hour * 3_600_000 > now ? null : (hours[hour] ?? null),
    );
    return { day, wattHours };
  });
  return { days, prices: null, serverNow: now };
}
