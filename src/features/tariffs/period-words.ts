import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import type { Stretch } from './list-stretches.ts';
import type { PeriodDraft } from './tariff-draft.ts';

/** What a period is called; one that nobody named by its number. */
export const periodName = (periods: readonly PeriodDraft[], index: number | null): string => {
  if (index === null) return t('grid.hole');
  const name = periods[index]?.name.trim() ?? '';
  return name === '' ? t('period.usual', { number: String(index + 1) }) : name;
};

/** Any year will do. */
const monthStart = (month: number): number => Date.UTC(2026, month, 1);

/** A month's name, 0 = January. @example monthName(6, 'en-US') // 'July' */
export const monthName = (month: number, locale: string, length: 'long' | 'short' = 'long'): string =>
  new Intl.DateTimeFormat(locale, { month: length, timeZone: 'UTC' }).format(monthStart(month));

/** @example monthsText(5, 8, 'en-US') // 'June – September' */
export const monthsText = (from: number, to: number, locale: string): string =>
  from === to ? monthName(from, locale) : `${monthName(from, locale)} – ${monthName(to, locale)}`;

/** @example hoursText(16, 21, format) // '4 PM to 9 PM' */
export const hoursText = (from: number, to: number, format: Format): string =>
  from === 0 && to === 24
    ? t('grid.allDay')
    : t('grid.hours', { from: format.minuteOfDay(from * 60), to: format.minuteOfDay(to * 60) });

/** Months and hours of a stretch. */
export const stretchText = ({ fromMonth, toMonth, from, to }: Omit<Stretch, 'period'>, format: Format): string =>
  t('grid.stretch', { months: monthsText(fromMonth, toMonth, format.locale), hours: hoursText(from, to, format) });
