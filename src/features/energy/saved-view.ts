import type { Saved } from '#shared/contract/http/energy-figures.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { kwhText, shareText } from './energy-view.ts';

/** Money where it is shown, else energy. */
export const savedAmount = (saved: Saved, currency: string | null, format: Format): string =>
  saved.saved === null ? kwhText(saved.savedKwh, format) : format.money(saved.saved, currency);

export const savedSigma = (saved: Saved, currency: string | null, format: Format): string =>
  saved.sigma === null ? kwhText(saved.sigmaKwh, format) : format.money(saved.sigma, currency);

const withoutSign = (text: string) => text.replace(/^[-−]/, '');

/** What was saved in one sentence, with its uncertainty. */
export function savedLine(saved: Saved, currency: string | null, format: Format): string {
  const values = {
    saved: withoutSign(savedAmount(saved, currency, format)),
    sigma: savedSigma(saved, currency, format),
    actual: kwhText(saved.actualKwh, format),
    baseline: kwhText(saved.baselineKwh, format),
  };
  return saved.savedKwh < 0 ? t('energy.saved.lost', values) : t('energy.saved.line', values);
}

/** How it was worked out: the method, what the baseline is, how sure it is, how much was covered. */
export function savedMethod(saved: Saved, format: Format): string[] {
  const { baseline, method, stipulated, coverage } = saved;
  const what = stipulated.map((each) => t(`energy.saved.stipulated.${each}`)).join(', ');
  return [
    t(`energy.saved.basis.${baseline.basis}`, {
      watts: format.watts(baseline.watts),
      sigma: format.watts(baseline.sigmaWatts),
    }),
    t(`energy.saved.kind.${baseline.kind}`),
    method === 'A' ? t('energy.saved.method.A', { what }) : t('energy.saved.method.B'),
    t('energy.saved.coverage', { share: shareText(coverage, format) }),
    t('energy.saved.sigma'),
    ...(Math.abs(saved.savedKwh) < saved.sigmaKwh ? [t('energy.saved.within')] : []),
  ];
}
