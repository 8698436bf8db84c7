import type { EnergyFigures } from '#shared/contract/http/energy-figures.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import { periodName } from '#shared/domain/energy/price-days.ts';
import { RUN_SOURCES } from '#shared/domain/rollup/slice-sums.ts';
import { turnovers } from '#shared/domain/turnover/turnover-rate.ts';
import type { EnergyDay } from './energy-read-model.ts';
import type { SettledDay } from './reckon-days.ts';

/** A stored day beside its price, and whether its water is the pool's: that of its filter pump. */
export type FigureDay = {
  readonly day: EnergyDay;
  readonly settled: SettledDay | undefined;
  readonly turnsPool: boolean;
};

export type FigureTerms = {
  readonly periods: readonly string[];
  readonly poolGallons: number | null;
  readonly showsMoney: boolean;
  /** Up to here time has passed of which something could be known, ms. */
  readonly knownTo: number;
};

const sumOf = (days: readonly FigureDay[], value: (day: EnergyDay) => number): number =>
  days.reduce((sum, { day }) => sum + value(day), 0);
const extreme = (values: readonly (number | null)[], choose: (...numbers: number[]) => number): number | null => {
  const known = values.filter((value) => value !== null);
  return known.length === 0 ? null : choose(...known);
};
const weighted = (days: readonly FigureDay[], value: (day: EnergyDay) => number | null): number | null => {
  const onMs = sumOf(days, (day) => day.onMs);
  return onMs > 0 ? sumOf(days, (day) => (value(day) ?? 0) * day.onMs) / onMs : null;
};

function kwhByPeriod(days: readonly FigureDay[], periods: readonly string[]): number[] {
  const sums = periods.map(() => 0);
  for (const { settled } of days) {
    if (settled?.term === undefined) continue;
    for (const [period, kwh] of settled.kwhByPeriod.entries()) {
      const place = periods.indexOf(periodName(settled.term.tariff, period));
      sums[place] = (sums[place] ?? 0) + kwh;
    }
  }
  return sums;
}

/** Minor units of some days with their currency; undefined where a day with use has no price, or of two currencies. */
export function sumMoney(days: readonly FigureDay[]): { minorUnits: number; currency: string } | undefined {
  const currencies = new Set(days.flatMap(({ settled }) => settled?.currency ?? []));
  const [currency] = currencies;
  if (currency === undefined || currencies.size > 1) return undefined;
  let minorUnits = 0;
  for (const { settled, day } of days) {
    if (settled?.minorUnits === undefined) {
      if (day.wattHours > 0) return undefined;
    } else minorUnits += settled.minorUnits;
  }
  return { minorUnits, currency };
}

function waterOf(days: readonly FigureDay[]): EnergyFigures['water'] {
  const own = days.filter(({ turnsPool }) => turnsPool);
  const gallons = sumOf(own, (day) => day.gallons);
  const unknown = sumOf(own, (day) => day.unknownFlowMs);
  if (gallons === 0 && (unknown > 0 || own.length === 0)) return null;
  const sigmas = own.filter(({ day }) => day.gallons > 0).map(({ day }) => day.gallonsSigma);
  const isKnown = sigmas.every((sigma) => sigma !== null);
  return {
    gallons,
    // The flow meter errs the same way every day: errors add up, they do not cancel.
    sigmaGallons: isKnown ? sigmas.reduce((sum, sigma) => sum + (sigma ?? 0), 0) : null,
    unknownSeconds: unknown / 1000,
  };
}

function sourcesOf(days: readonly FigureDay[]): EnergyFigures['secondsBySource'] {
  const entries = RUN_SOURCES.flatMap((source, index) => {
    const ms = sumOf(days, (day) => day.sourceMs[index] ?? 0);
    return ms > 0 ? [[source, ms / 1000] as const] : [];
  });
  return Object.fromEntries(entries);
}

/** What some days of one pump or of several come to. */
export function sumFigures(days: readonly FigureDay[], terms: FigureTerms): EnergyFigures {
  const money = terms.showsMoney ? sumMoney(days) : undefined;
  const water = waterOf(days);
  return {
    seconds: sumOf(days, ({ from, to }) => Math.max(0, Math.min(to, terms.knownTo) - from)) / 1000,
    coveredSeconds: sumOf(days, (day) => day.coveredMs) / 1000,
    onSeconds: sumOf(days, (day) => day.onMs) / 1000,
    kwh: sumOf(days, (day) => day.wattHours) / 1000,
    kwhByPeriod: kwhByPeriod(days, terms.periods),
    cost: money === undefined ? null : formatMinor(money.minorUnits, money.currency),
    water,
    turnovers:
      water === null || terms.poolGallons === null ? null : (turnovers(water.gallons, terms.poolGallons) ?? null),
    secondsBySource: sourcesOf(days),
    meanRpm: weighted(days, (day) => day.rpmMean),
    leastRpm: extreme(
      days.map(({ day }) => day.rpmMin),
      Math.min,
    ),
    mostRpm: extreme(
      days.map(({ day }) => day.rpmMax),
      Math.max,
    ),
    meanWatts: weighted(days, (day) => day.wattsMean),
    mostWatts: extreme(
      days.map(({ day }) => day.wattsMax),
      Math.max,
    ),
  };
}
