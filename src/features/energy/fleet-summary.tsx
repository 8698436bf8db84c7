import type { FleetEnergy } from '#shared/contract/http/energy-fleet.ts';
import { type FigureCell, FigureCells } from '#src/components/ui/figure-cells.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { changeOf, coverageOf, kwhText, shareText, volumeText } from './energy-view.ts';
import { nameOfMonth } from './local-month.ts';

const SAME = 0.005;

/** How the month stands to the one before, once it is over; a month that still runs is not compared. */
function compareLine({ previous, kwh, month }: FleetEnergy, present: string, format: Format): string | undefined {
  const change = previous === null || month === present ? undefined : changeOf(kwh, previous.kwh);
  if (previous === null || change === undefined) return undefined;
  const name = nameOfMonth(previous.month, format.locale);
  if (Math.abs(change) < SAME) return t('energy.lead.same', { month: name });
  const share = shareText(Math.abs(change), format);
  return change > 0 ? t('energy.lead.more', { share, month: name }) : t('energy.lead.less', { share, month: name });
}

/** The page's fact. */
export function fleetHeading(energy: FleetEnergy, present: string, format: Format): string {
  const month = nameOfMonth(energy.month, format.locale);
  if (energy.coveredSeconds === 0) return t('energy.heading.none', { month });
  const kwh = kwhText(energy.kwh, format);
  const soFar = energy.month === present;
  if (energy.cost === null)
    return soFar ? t('energy.heading.sofarKwh', { month, kwh }) : t('energy.heading.pastKwh', { month, kwh });
  const values = { month, kwh, cost: format.money(energy.cost, energy.currency) };
  return soFar ? t('energy.heading.sofar', values) : t('energy.heading.past', values);
}

/** Whatever keeps the sums from being whole. */
export function listFleetNotes(energy: FleetEnergy, present: string, zone: string, format: Format): string[] {
  const { pumps, priced, otherCurrencies, pending, upTo, serverNow } = energy;
  const coverage = coverageOf(energy);
  return [
    compareLine(energy, present, format),
    coverage === undefined || energy.coveredSeconds === 0
      ? undefined
      : t('energy.coverage', { share: shareText(coverage, format) }),
    priced === 0 && pumps > 0 ? t('energy.money.fleet') : undefined,
    priced > 0 && priced < pumps ? t('energy.unpriced', { count: priced, all: pumps }) : undefined,
    otherCurrencies > 0 ? t('energy.otherCurrencies', { count: otherCurrencies }) : undefined,
    pending > 0 ? t('energy.pending', { count: pending }) : undefined,
    upTo === null ? t('energy.upTo.never') : t('energy.upTo', { time: format.moment(upTo, zone, serverNow) }),
  ].filter((note) => note !== undefined);
}

function savedCell({ saved, currency }: FleetEnergy, format: Format): FigureCell[] {
  if (saved === null) return [];
  const money = saved.saved !== null;
  return [
    {
      name: t('energy.cell.saved'),
      figure: money ? format.money(saved.saved, currency) : kwhText(saved.savedKwh, format),
      beside: t('energy.sigma', {
        sigma: money ? format.money(saved.sigma, currency) : kwhText(saved.sigmaKwh, format),
      }),
      below: t('energy.saved.fleet', { count: saved.pumps }),
    },
  ];
}

/** The month of the whole company, large. */
export function FleetSummary({ energy }: { readonly energy: FleetEnergy }) {
  const format = useFormat();
  const { kwh, cost, currency, gallons, onSeconds, coveredSeconds, carbon, pumps } = energy;
  const cells: FigureCell[] = [
    {
      name: t('energy.cell.energy'),
      figure: kwhText(kwh, format),
      below: <Figures text={t('energy.fleet.pumps', { count: pumps })} />,
    },
    ...(cost === null ? [] : [{ name: t('energy.cell.cost'), figure: format.money(cost, currency) }]),
    {
      name: t('energy.cell.water'),
      figure: gallons === null ? t('energy.water.cannot') : volumeText(gallons, format),
      below: gallons === null ? t('energy.water.why') : t('energy.fleet.water'),
    },
    ...(coveredSeconds === 0
      ? []
      : [
          {
            name: t('energy.cell.running'),
            figure: shareText(onSeconds / coveredSeconds, format),
            below: t('energy.fleet.running'),
          },
        ]),
    ...savedCell(energy, format),
    ...(carbon === null
      ? []
      : [
          {
            name: t('energy.cell.carbon'),
            figure: t('energy.fleet.carbon', { kilograms: format.number(carbon.kilograms) }),
            below: t('energy.fleet.carbonOf', {
              gas: carbon.factor.gas === 'CO2' ? 'CO₂' : 'CO₂e',
              region: carbon.factor.region,
              year: String(carbon.factor.year),
            }),
          },
        ]),
  ];
  return <FigureCells framed cells={cells} />;
}
