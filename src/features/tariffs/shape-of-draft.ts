import type { TariffShape } from '#shared/contract/http/tariffs.ts';
import { parseMoney } from '#shared/domain/energy/money-text.ts';
import type { FlatDraft, PeriodDraft, ScheduleDraft, TariffDraft, TierDraft } from './tariff-draft.ts';

/** What is wrong with a text that was typed, by the place that the server's faults would name. */
export type TextFault = { readonly field: string; readonly reason: 'money' | 'empty' | 'negative' | 'bound' };

export type ShapeOutcome =
  | { readonly shape: TariffShape; readonly faults: readonly [] }
  | { readonly shape: undefined; readonly faults: readonly TextFault[] };

type Note = (field: string, reason: TextFault['reason']) => void;
type Tier = TariffShape['energy']['periods'][number][number];

/** A text without group separators, and `0` where nothing was typed for what may be left out. */
const plain = (text: string): string => text.trim().replaceAll(',', '');

function moneyOf(text: string, field: string, note: Note): string {
  const amount = plain(text)
    .replace(/^([-+]?)\./, '$10.')
    .replace(/^\+/, '');
  if (parseMoney(amount) === undefined) note(field, amount === '' ? 'empty' : 'money');
  return amount;
}

function tierOf({ rate, adjustment, upTo, perDay }: TierDraft, at: string, note: Note): Tier {
  const bound = plain(upTo);
  const number = bound === '' ? null : Number(bound);
  if (number !== null && !(number > 0)) note(`${at}.upTo`, 'bound');
  return {
    rate: moneyOf(rate, `${at}.rateMicros`, note),
    adjustment: plain(adjustment) === '' ? '0' : moneyOf(adjustment, `${at}.adjustmentMicros`, note),
    upTo: number,
    perDay: perDay && number !== null,
  };
}

const periodsOf = (periods: readonly PeriodDraft[], at: string, note: Note): Tier[][] =>
  periods.map(({ tiers }, period) => tiers.map((tier, index) => tierOf(tier, `${at}[${period}][${index}]`, note)));

const scheduleOf = ({ periods, weekday, weekend }: ScheduleDraft, at: string, note: Note): TariffShape['energy'] => ({
  periods: periodsOf(periods, `${at}.periods`, note),
  weekday: weekday.map((hours) => [...hours]),
  weekend: weekend.map((hours) => [...hours]),
});

const flatOf = ({ periods, months }: FlatDraft, note: Note): NonNullable<TariffShape['flatDemand']> => ({
  periods: periodsOf(periods, 'flatDemand.periods', note),
  months: [...months],
});

/** A draft as the server takes it, or which of its texts are no numbers. Holes and the like are the server's to name. */
export function shapeOfDraft(draft: TariffDraft): ShapeOutcome {
  const faults: TextFault[] = [];
  const note: Note = (field, reason) => faults.push({ field, reason });
  const fixedPerMonth = moneyOf(
    draft.fixedPerMonth.trim() === '' ? '0' : draft.fixedPerMonth,
    'fixedMicrosPerMonth',
    note,
  );
  if ((parseMoney(fixedPerMonth) ?? 0) < 0) note('fixedMicrosPerMonth', 'negative');
  const names = draft.energy.periods.map(({ name }) => name.trim());
  const shape: TariffShape = {
    name: draft.name.trim(),
    currency: draft.currency.trim().toUpperCase(),
    fixedPerMonth,
    energy: scheduleOf(draft.energy, 'energy', note),
    monthlyAdjustment:
      draft.monthlyAdjustment?.map((text, month) =>
        text.trim() === '' ? '0' : moneyOf(text, `monthlyAdjustmentMicros[${month}]`, note),
      ) ?? null,
    demand: draft.demand === null ? null : scheduleOf(draft.demand, 'demand', note),
    flatDemand: draft.flatDemand === null ? null : flatOf(draft.flatDemand, note),
    periodNames: names.some((name) => name !== '') ? names : [],
  };
  return faults.length > 0 ? { shape: undefined, faults } : { shape, faults: [] };
}
