import type { z } from 'zod';
import type { EnergyFigures, MoneyState, TariffInForce } from '#shared/contract/http/energy-figures.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { coverageOf, shareText } from './energy-view.ts';

export type AnswerNotesProps = {
  readonly totals: EnergyFigures;
  readonly money: z.infer<typeof MoneyState>;
  readonly tariffs: readonly z.infer<typeof TariffInForce>[];
  readonly upTo: number | null;
  readonly zone: string;
  readonly now: number;
  /** How many stretches were not read, and the longest. */
  readonly gaps?: {
    readonly count: number;
    readonly longest: { readonly from: number; readonly to: number } | undefined;
  };
};

/** What one must know to read the figures: what is covered, up to when, and why no money is named. */
export function AnswerNotes({ totals, money, tariffs, upTo, zone, now, gaps }: AnswerNotesProps) {
  const format = useFormat();
  const coverage = coverageOf(totals);
  const names = [...new Set(tariffs.map(({ name }) => name))];
  const notes = [
    coverage === undefined || totals.coveredSeconds === 0
      ? t('energy.coverage.none')
      : t('energy.coverage', { share: shareText(coverage, format) }),
    ...(gaps?.longest === undefined
      ? []
      : [
          t('energy.gaps', {
            count: gaps.count,
            span: format.span(gaps.longest.to - gaps.longest.from),
            time: format.moment(gaps.longest.from, zone, now),
          }),
        ]),
    ...(money === 'shown' ? [] : [t(`energy.money.${money}`)]),
    ...(names.length === 0 ? [] : [t('energy.tariff', { count: names.length, names: names.join(', ') })]),
    upTo === null ? t('energy.upTo.never') : t('energy.upTo', { time: format.moment(upTo, zone, now) }),
  ];
  return (
    <p className="text-13 text-ink-2">
      <Figures text={notes.join(' ')} />
    </p>
  );
}
