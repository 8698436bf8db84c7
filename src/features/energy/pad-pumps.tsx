import { Link } from 'react-router-dom';
import type { PadEnergy } from '#shared/contract/http/energy.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { paths } from '#src/lib/paths.ts';
import { isLeast, kwhText, volumeText } from './energy-view.ts';
import { savedAmount, savedSigma } from './saved-view.ts';

type PumpOfPad = PadEnergy['pumps'][number];

/** The pumps of a pad one by one; each leads to its page. */
export function PadPumps({ pumps, currency }: Pick<PadEnergy, 'pumps' | 'currency'>) {
  const format = useFormat();
  return (
    <Sheet id="pumps" title={t('energy.pumps')}>
      <div className="px-4 py-3 sm:px-5">
        <DataTable
          caption={t('energy.pumps')}
          rows={pumps}
          keyOf={({ pumpId }) => pumpId}
          columns={[
            {
              head: t('energy.column.pump'),
              cell: ({ pumpId, pumpName }: PumpOfPad) => (
                <Link to={paths.pump(pumpId)} className="underline underline-offset-2 hover:bg-wash">
                  {pumpName}
                </Link>
              ),
            },
            {
              head: t('energy.column.kwh'),
              figures: true,
              right: true,
              cell: ({ totals }) => kwhText(totals.kwh, format),
            },
            {
              head: t('energy.column.cost'),
              figures: true,
              right: true,
              cell: ({ totals }) => format.money(totals.cost, currency),
            },
            {
              head: t('energy.column.water'),
              figures: true,
              right: true,
              cell: ({ totals: { water } }) =>
                water === null ? '–' : `${isLeast(water) ? '≥ ' : ''}${volumeText(water.gallons, format)}`,
            },
            {
              head: t('energy.column.saved'),
              figures: true,
              right: true,
              cell: ({ saved }) =>
                saved === null
                  ? '–'
                  : `${savedAmount(saved, currency, format)} ${t('energy.sigma', { sigma: savedSigma(saved, currency, format) })}`,
            },
          ]}
        />
      </div>
    </Sheet>
  );
}
