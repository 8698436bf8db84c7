import type { ProgramAdvice, ProgramFigures, ProgramRow } from '#shared/contract/http/energy-programs.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { shareText } from './energy-view.ts';

const withoutSign = (text: string) => text.replace(/^[-−]/, '');

/** What the advisor says of a program, in one sentence. */
export function programHeading(row: Omit<ProgramRow, 'dearHours'>, format: Format): string {
  const { kind, savedPerMonth, savedShare, currency } = row;
  if (kind !== 'advice') return t(`program.heading.${kind}`);
  const saved = withoutSign(format.money(savedPerMonth, currency));
  if (savedShare !== null && savedShare < 0) return t('program.heading.dearer', { saved });
  return t('program.heading.advice', { saved, share: shareText(savedShare ?? 0, format) });
}

/** A name of a month by its number, 0 = January. */
export const nameOfMonthNumber = (month: number, locale: string, length: 'long' | 'short' = 'long'): string =>
  new Intl.DateTimeFormat(locale, { month: length, timeZone: 'UTC' }).format(Date.UTC(2024, month, 1));

/** What a program leaves short, in words; empty = nothing. */
export const shortNeeds = ({ shortfalls }: ProgramFigures): string =>
  shortfalls.map(({ need }) => t(`program.need.${need}`)).join(', ');

/** Months in a row as one: "Jun to Sep, Dec". */
export function spellMonths(months: readonly number[], locale: string): string {
  const name = (month: number) => nameOfMonthNumber(month, locale, 'short');
  const stretches: [number, number][] = [];
  for (const month of [...new Set(months)].sort((a, b) => a - b)) {
    const last = stretches.at(-1);
    if (last !== undefined && last[1] === month - 1) last[1] = month;
    else stretches.push([month, month]);
  }
  return stretches.map(([from, to]) => (from === to ? name(from) : `${name(from)}–${name(to)}`)).join(', ');
}

/** In which months, or all year. */
const spellWhen = (months: readonly number[], locale: string): string =>
  new Set(months).size === 12
    ? t('program.dear.allYear')
    : t('program.dear.inMonths', { months: spellMonths(months, locale) });

type Dear = ProgramRow['dearHours'][number];

export const nameOfCaller = ({ caller }: Dear): string =>
  caller.kind === 'program'
    ? t('program.dear.program', { number: caller.entry + 1 })
    : t('program.dear.clock', { number: caller.input });

/** What runs in dear hours, one caller a sentence. */
export const dearLine = (dear: Dear, currency: string | null, format: Format): string =>
  t('program.dear.line', {
    what: nameOfCaller(dear),
    when: spellWhen(
      dear.months.map(({ month }) => month),
      format.locale,
    ),
    extra: format.money(dear.extraPerYear, currency),
  });

/** Why no program can meet all needs, or why it could not be looked at. */
export const listObstacles = ({ unmet, reasons }: Pick<ProgramAdvice, 'unmet' | 'reasons'>): string[] => [
  ...unmet.map(({ need, reason }) => t(`program.unmet.${reason}`, { need: t(`program.need.${need}`) })),
  ...reasons.map((each) => t('program.refused.reason', each)),
];
