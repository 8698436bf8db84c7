import type { PumpEnergy } from '#shared/contract/http/energy.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { kwhText, shareText } from './energy-view.ts';
import { savedAmount, savedSigma } from './saved-view.ts';

const LARGE = 'text-34 font-semibold tracking-[-0.03em]';

/** What was saved since the motor came, in plain words, and how that is known; or why nobody can say. */
export function HomeSaved({ energy }: { readonly energy: PumpEnergy }) {
  const format = useFormat();
  const { saved, savedMissing, currency } = energy;
  if (saved === null) {
    return (
      <>
        <p className={LARGE}>–</p>
        <p className="text-ink-2">{t(`home.saved.missing.${savedMissing ?? 'nothing-yet'}`)}</p>
      </>
    );
  }
  const lost = saved.savedKwh < 0;
  const amount = savedAmount(saved, currency, format).replace(/^[-−]/, '');
  return (
    <>
      <p className="flex flex-wrap items-baseline gap-x-2">
        <span className={LARGE}>
          <Figures text={amount} />
        </span>
        <span className="text-17">
          <Figures text={t('home.saved.sigma', { sigma: savedSigma(saved, currency, format) })} />
        </span>
      </p>
      <p className="text-ink-2">{lost ? t('home.saved.lost') : t(`home.saved.${saved.baseline.basis}`)}</p>
      <TableToggle label={t('home.saved.how')}>
        <p className="text-ink-2">
          <Figures
            text={[
              t('home.saved.plain', {
                baseline: kwhText(saved.baselineKwh, format),
                actual: kwhText(saved.actualKwh, format),
              }),
              t(`home.saved.${saved.baseline.kind}`),
              t('home.saved.coverage', { share: shareText(saved.coverage, format) }),
            ].join(' ')}
          />
        </p>
      </TableToggle>
    </>
  );
}
