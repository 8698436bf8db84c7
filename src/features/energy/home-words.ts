import type { EnergySpan, PumpEnergy } from '#shared/contract/http/energy.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { findTurnoverCompletion } from '#shared/domain/turnover/find-turnover-completion.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { isLeast, kwhText, volumeText } from './energy-view.ts';
import { nameOfMonth } from './local-month.ts';

export type HomeCell = {
  readonly figure: string;
  readonly beside?: string | undefined;
  readonly lines: readonly string[];
};

/** Water of today in plain words: how often the pool went round, or that nobody can tell. */
export function waterCell(today: EnergySpan | undefined, poolGallons: number | null, format: Format): HomeCell {
  const water = today?.water ?? null;
  if (today === undefined || water === null || (water.gallons === 0 && water.unknownSeconds > 0)) {
    return { figure: t('home.water.cannot'), lines: [t('home.water.cannot.detail')] };
  }
  const unknown = isLeast(water) ? [t('home.water.some', { span: format.span(water.unknownSeconds * 1000) })] : [];
  if (today.turnovers === null || poolGallons === null) {
    return { figure: volumeText(water.gallons, format), beside: t('home.water.moved'), lines: unknown };
  }
  const times = format.number(today.turnovers, 2);
  return {
    figure: isLeast(water) ? t('home.water.least', { times }) : times,
    beside: t('home.water.times', { volume: format.quantity(poolGallons, 'volume') }),
    lines: unknown,
  };
}

export type TurnoverAsked = {
  readonly runs: readonly Run[];
  readonly from: number;
  readonly now: number;
  readonly poolGallons: number | null;
  readonly zone: string;
};

/** When the first turnover of today was done, or that it is still to come; undefined where nobody can tell. */
export function turnoverLine(
  { runs, from, now, poolGallons, zone }: TurnoverAsked,
  format: Format,
): string | undefined {
  if (poolGallons === null || runs.every(({ gallons }) => gallons === null)) return undefined;
  const closed = runs.map((run) => ({ from: run.from, to: run.to ?? now, gallons: run.gallons ?? undefined }));
  const done = findTurnoverCompletion(closed, from, now, poolGallons);
  if (done.kind === 'refused') return undefined;
  return done.kind === 'completed'
    ? t('home.water.done', { time: format.time(done.at, zone) })
    : t('home.water.notYet');
}

const monthLine = (span: EnergySpan, energy: PumpEnergy, soFar: boolean, format: Format): string => {
  const values = { month: nameOfMonth(span.label, format.locale), kwh: kwhText(span.kwh, format) };
  if (span.cost === null) return soFar ? t('home.cost.monthKwh', values) : t('home.cost.lastKwh', values);
  const cost = format.money(span.cost, energy.currency);
  return soFar ? t('home.cost.month', { ...values, cost }) : t('home.cost.last', { ...values, cost });
};

/** What today and the months cost, in plain words; energy alone where nobody has said what a kWh costs. */
export function costCell(
  today: EnergySpan | undefined,
  days: PumpEnergy,
  months: PumpEnergy | undefined,
  format: Format,
): HomeCell {
  const spans = months?.spans ?? [];
  const present = spans.at(-1)?.label;
  // On its first day the month is today, which stands above already.
  const lines = spans
    .slice(-2)
    .filter(({ label }) => label !== present || today === undefined || !today.label.endsWith('-01'))
    .toReversed()
    .map((span) => monthLine(span, months as PumpEnergy, span.label === present, format));
  const missing = days.money === 'no-tariff' ? [t('home.cost.noTariff')] : [];
  if (today === undefined || today.coveredSeconds === 0) {
    return { figure: '–', lines: [t('home.cost.none'), ...lines, ...missing] };
  }
  const kwh = kwhText(today.kwh, format);
  return today.cost === null
    ? { figure: kwh, lines: [...lines, ...missing] }
    : { figure: format.money(today.cost, days.currency), beside: t('home.cost.sofar', { kwh }), lines };
}
