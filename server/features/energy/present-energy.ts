import { dayText, epochDayOf } from '#server/db/day-text.ts';
import type { PadPrices } from '#server/db/tariffs-in-force.ts';
import type { EnergyQuery, EnergySpan, PumpEnergy } from '#shared/contract/http/energy.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import { DEMAND_NAME } from '#shared/domain/energy/month-bill.ts';
import { type DayTerm, periodName } from '#shared/domain/energy/price-days.ts';
import { groupBy } from '#shared/domain/grouping/group-by.ts';
import { localDay } from '#shared/domain/time/local-days.ts';
import type { EnergyWindow } from './energy-window.ts';
import { listPeriodNames, type SettledDay } from './reckon-days.ts';
import { shareCents } from './share-cents.ts';
import { type FigureDay, type FigureTerms, sumFigures, sumMoney } from './sum-figures.ts';

type Answer = Pick<PumpEnergy, 'money' | 'currency' | 'tariffs' | 'periods' | 'totals' | 'spans'>;

const labelOf = (day: string, by: EnergyQuery['by']): string => (by === 'day' ? day : day.slice(0, 7));

function presentSpans(days: readonly FigureDay[], by: EnergyQuery['by'], terms: FigureTerms): EnergySpan[] {
  const groups = groupBy(days, ({ day }) => labelOf(day.day, by));
  return [...groups]
    .sort(([left], [right]) => (left < right ? -1 : 1))
    .map(([label, own]) => ({
      label,
      from: Math.min(...own.map(({ day }) => day.from)),
      to: Math.max(...own.map(({ day }) => day.to)),
      ...sumFigures(own, terms),
    }));
}

const settledOf = (days: readonly FigureDay[]): SettledDay[] => days.flatMap(({ settled }) => settled ?? []);

/** kWh and cost by period: the parts share the total by largest remainder, so that they add up to it. */
function presentPeriods(days: readonly FigureDay[], names: readonly string[], showsMoney: boolean): Answer['periods'] {
  const sums = new Map(names.map((name) => [name, { kwh: 0, micros: 0 }]));
  const add = (name: string, kwh: number, micros: number): void => {
    const known = sums.get(name) ?? { kwh: 0, micros: 0 };
    sums.set(name, { kwh: known.kwh + kwh, micros: known.micros + micros });
  };
  for (const day of settledOf(days)) {
    if (day.term === undefined) continue;
    for (const [period, kwh] of day.kwhByPeriod.entries())
      add(periodName(day.term.tariff, period), kwh, day.energyMicrosByPeriod[period] ?? 0);
    if (day.demandMicros !== 0) add(DEMAND_NAME, 0, day.demandMicros);
  }
  const parts = [...sums];
  const money = showsMoney ? sumMoney(days) : undefined;
  const minor =
    money &&
    shareCents(
      parts.map(([, { micros }]) => micros),
      money,
    );
  return parts.map(([name, { kwh }], index) => {
    const units = minor?.[index];
    return { name, kwh, cost: units === undefined || money === undefined ? null : formatMinor(units, money.currency) };
  });
}

const instantOf = (zone: string, epochDay: number | undefined): number | null =>
  epochDay === undefined ? null : (localDay(zone, epochDay)?.from ?? null);

function presentTariffs(window: EnergyWindow, zone: string, { terms, names }: PadPrices): Answer['tariffs'] {
  const [from, until] = [epochDayOf(window.from), epochDayOf(window.until)];
  const isMet = ({ fromDay = -Infinity, toDay = Infinity }: DayTerm): boolean => fromDay < until && toDay > from;
  return terms.filter(isMet).map(({ id, fromDay, toDay }) => ({
    id,
    name: names.get(id) ?? '',
    from: instantOf(zone, fromDay),
    to: instantOf(zone, toDay),
  }));
}

type Presented = {
  readonly window: EnergyWindow;
  readonly by: EnergyQuery['by'];
  readonly zone: string;
  readonly prices: PadPrices;
  readonly poolGallons: number | null;
  readonly showsMoney: boolean;
  readonly knownTo: number;
};

/** Figures of a window by span and in all, with their periods. */
export function presentEnergy(days: readonly FigureDay[], asked: Presented): Answer {
  const { window, by, zone, prices, showsMoney } = asked;
  const periods = listPeriodNames(settledOf(days));
  const terms = { ...asked, periods };
  const money = sumMoney(days);
  const isPriced = money !== undefined || (days.length === 0 && prices.terms.length > 0);
  return {
    money: showsMoney ? (isPriced ? 'shown' : 'no-tariff') : 'withheld',
    currency: showsMoney ? (money?.currency ?? prices.terms.at(-1)?.tariff.currency ?? null) : null,
    tariffs: presentTariffs(window, zone, prices),
    periods: presentPeriods(days, periods, showsMoney),
    totals: sumFigures(days, terms),
    spans: presentSpans(days, by, terms),
  };
}

/** The first and last instants of a window in a zone, ms. */
export const spanOf = (window: EnergyWindow, zone: string): { from: number; to: number } => ({
  from: localDay(zone, epochDayOf(window.from))?.from ?? Date.parse(window.from),
  to: localDay(zone, epochDayOf(window.until))?.from ?? Date.parse(dayText(epochDayOf(window.until))),
});
