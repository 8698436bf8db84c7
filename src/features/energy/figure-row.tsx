import type { EnergyFigures, Saved } from '#shared/contract/http/energy-figures.ts';
import { type FigureCell, FigureCells } from '#src/components/ui/figure-cells.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { isLeast, kwhText, shareText, waterWords } from './energy-view.ts';
import { savedAmount, savedSigma } from './saved-view.ts';

export type FigureRowProps = {
  readonly totals: EnergyFigures;
  readonly currency: string | null;
  readonly saved: Saved | null;
  readonly poolGallons: number | null;
  readonly wanted: number | null;
  readonly framed?: boolean;
};

const DAY_SECONDS = 86_400;

const energyCell = (
  { kwh, seconds, onSeconds, coveredSeconds, meanWatts }: EnergyFigures,
  format: Format,
): FigureCell => ({
  name: t('energy.cell.energy'),
  figure: kwhText(kwh, format),
  beside:
    seconds < 2 * DAY_SECONDS
      ? undefined
      : t('energy.dayMean', { value: kwhText((kwh / seconds) * DAY_SECONDS, format) }),
  below:
    meanWatts === null || coveredSeconds === 0
      ? undefined
      : t('energy.runningShare', {
          share: shareText(onSeconds / coveredSeconds, format),
          watts: format.watts(meanWatts),
        }),
});

function waterCell({ totals, poolGallons, wanted }: FigureRowProps, format: Format): FigureCell {
  const { turnovers, water, seconds } = totals;
  const { figure, sure } = waterWords(water, format);
  const days = seconds / DAY_SECONDS;
  if (turnovers === null || days <= 0) {
    const below = water !== null && poolGallons === null ? `${sure}; ${t('energy.noPool')}` : sure;
    return { name: t('energy.cell.water'), figure, below };
  }
  const least = isLeast(water) ? `${t('energy.atLeast')} ` : '';
  return {
    name: t('energy.cell.turnovers'),
    figure: format.number(turnovers / Math.max(1, days), 2),
    beside: wanted === null ? t('energy.notWanted') : t('energy.wanted', { count: wanted }),
    below: `${least}${figure} ${sure}`,
  };
}

/** Energy, money, water and what was saved, large, each with how sure it is. */
export function FigureRow(props: FigureRowProps) {
  const { totals, currency, saved } = props;
  const format = useFormat();
  const cells: FigureCell[] = [energyCell(totals, format)];
  if (totals.cost !== null) {
    cells.push({ name: t('energy.cell.cost'), figure: format.money(totals.cost, currency) });
  }
  cells.push(waterCell(props, format));
  if (saved !== null) {
    cells.push({
      name: t('energy.cell.saved'),
      figure: savedAmount(saved, currency, format),
      beside: t('energy.sigma', { sigma: savedSigma(saved, currency, format) }),
      below: (
        <a href="#saved" className="underline underline-offset-2">
          {t('energy.saved.title')}
        </a>
      ),
    });
  }
  return <FigureCells framed={props.framed ?? false} cells={cells} />;
}
