import type { z } from 'zod';
import type { EnergyFigures, Water } from '#shared/contract/http/energy-figures.ts';
import { gallonsToCubicMetres } from '#shared/units/volume.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';

type WaterFigure = z.infer<typeof Water>;

/** Energy is kept in watt-hours by whoever formats it, and crosses the wire in kWh. */
export const kwhText = (kwh: number, format: Format): string => format.quantity(kwh * 1000, 'energy');

const MILLION = 1_000_000;

const toSignificant = (value: number, digits: number): number => {
  if (value === 0) return 0;
  const step = 10 ** (Math.floor(Math.log10(Math.abs(value))) - digits + 1);
  return step <= 1 ? value : Math.round(value / step) * step;
};

/**
 * A sum of water to the figures it is worth: the flow behind it is known to some per cent at best.
 *
 * @example volumeText(868_512, us) // '869,000 gal'
 */
export const volumeText = (gallons: number, format: Format, digits = 3): string =>
  format.units === 'us' && gallons >= MILLION
    ? t('energy.million', { value: format.number(gallons / MILLION, gallons < 100 * MILLION ? 1 : 0) })
    : format.quantity(toSignificant(gallons, digits), 'volume');

/** How uncertain a sum of water is: two figures. */
export const sigmaText = (gallons: number, format: Format): string => volumeText(gallons, format, 2);

/** A share with a tenth where a whole per cent would hide it. */
export function shareText(share: number, format: Format): string {
  const small = share !== 0 && Math.abs(share) < 0.0995;
  // Just short of everything is not everything.
  const shown = share < 1 && share > 0.999 ? 0.999 : share;
  return `${format.number(shown * 100, small || (shown > 0.995 && shown < 1) ? 1 : 0)} %`;
}

/** Water with how sure it is, and whether it is the least there was. */
export type WaterWords = { readonly figure: string; readonly sure: string };

export function waterWords(water: WaterFigure | null, format: Format): WaterWords {
  if (water === null) return { figure: t('energy.water.cannot'), sure: t('energy.water.why') };
  const { gallons, sigmaGallons, unknownSeconds } = water;
  const unknown = unknownSeconds * 1000;
  if (gallons === 0 && unknown > 0) {
    return { figure: t('energy.water.cannot'), sure: t('energy.water.unknownAll', { span: format.span(unknown) }) };
  }
  const sigma =
    sigmaGallons === null ? t('energy.sigma.none') : t('energy.sigma', { sigma: sigmaText(sigmaGallons, format) });
  const least = unknown > 0 ? [t('energy.atLeast.why', { span: format.span(unknown) })] : [];
  return { figure: volumeText(gallons, format), sure: [sigma, ...least].join('; ') };
}

/** Whether water is the least there was: for some of the running time the flow is not known. */
export const isLeast = (water: WaterFigure | null): boolean =>
  water !== null && water.gallons > 0 && water.unknownSeconds > 0;

/** Part of the time that readings cover, 0 to 1; undefined where no time was asked for. */
export const coverageOf = ({ seconds, coveredSeconds }: Pick<EnergyFigures, 'seconds' | 'coveredSeconds'>) =>
  seconds > 0 ? Math.min(1, coveredSeconds / seconds) : undefined;

/** Energy a volume in the reader's units, with two decimals; a dash where it is not known. */
export function perVolumeText(kwhPerThousandGallons: number | null, format: Format): string {
  if (kwhPerThousandGallons === null) return '–';
  const shown = format.units === 'si' ? kwhPerThousandGallons / gallonsToCubicMetres(1000) : kwhPerThousandGallons;
  return format.number(shown, 2);
}

export const perVolumeHead = (format: Format): string =>
  format.units === 'si' ? t('energy.column.perCubicMetre') : t('energy.column.perVolume');

/** More or less than before, as a share; undefined where there is no before. */
export const changeOf = (now: number, before: number | null): number | undefined =>
  before === null || before <= 0 ? undefined : now / before - 1;

export function changeText(change: number | undefined, format: Format): string {
  if (change === undefined) return t('energy.change.new');
  const sign = change > 0.0005 ? '+' : change < -0.0005 ? '−' : '';
  return `${sign}${shareText(Math.abs(change), format)}`;
}
