import { ApiError } from '#src/lib/api/api-error.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { listStretches } from './list-stretches.ts';
import { stretchText } from './period-words.ts';
import type { ShapeOutcome } from './shape-of-draft.ts';
import type { ScheduleDraft, TariffDraft } from './tariff-draft.ts';

export type ServerFault = { readonly field: string; readonly reason: string; readonly allowed: string };

/** What keeps a tariff from being saved, by the place it belongs to. */
export type Faults = ReadonlyMap<string, string>;

const SENTENCES: Readonly<Record<string, () => string>> = {
  'no-name': () => t('fault.no-name'),
  'no-currency': () => t('fault.no-currency'),
  'no-periods': () => t('fault.no-periods'),
  'hole-above-last-tier': () => t('fault.hole-above-last-tier'),
  'tiers-not-rising': () => t('fault.tiers-not-rising'),
  'not-twelve-months': () => t('fault.month'),
};

/** Holes and unknown periods of the hours are said from what is drawn, not hour by hour. */
const isOfHours = ({ field }: ServerFault): boolean => /\.(weekday|weekend)\[/.test(field);

function sayFault({ field, reason, allowed }: ServerFault): string {
  if (/^flatDemand\.months/.test(field)) return t('fault.month');
  if (field.endsWith('.upTo') && SENTENCES[reason] === undefined) return t('fault.bound');
  return SENTENCES[reason]?.() ?? t('fault.number', { allowed });
}

function listHoles(schedule: ScheduleDraft | null, place: string, format: Format): [string, string][] {
  if (schedule === null) return [];
  return (['weekday', 'weekend'] as const).flatMap((days): [string, string][] => {
    const [first, ...more] = listStretches(schedule[days]).filter(({ period }) => period === null);
    if (first === undefined) return [];
    const where = `${t(`grid.title.${days}`)}, ${stretchText(first, format)}`;
    const said = more.length === 0 ? t('fault.hole', { where }) : t('fault.holes', { where, count: more.length });
    return [[`${place}.${days}`, said]];
  });
}

/** Everything that is wrong: texts that are no numbers, hours without a period, and what the server says. */
export function collectFaults(
  draft: TariffDraft,
  outcome: ShapeOutcome,
  told: readonly ServerFault[],
  format: Format,
): Faults {
  const texts = outcome.faults.map(({ field, reason }) => [field, t(`fault.${reason}`)] as const);
  const said = told.filter((fault) => !isOfHours(fault)).map((fault) => [fault.field, sayFault(fault)] as const);
  const holes = [...listHoles(draft.energy, 'energy', format), ...listHoles(draft.demand, 'demand', format)];
  return new Map([...said, ...texts, ...holes]);
}

/** What the server refused, as it says it field by field; undefined for any other error. */
export function refusalsOf(error: unknown): ServerFault[] | undefined {
  if (!(error instanceof ApiError) || error.code !== 'validation') return undefined;
  return error.issues.map(({ path, message }) => {
    const [reason = '', ...allowed] = message.split(': ');
    return { field: path, reason, allowed: allowed.join(': ') };
  });
}
