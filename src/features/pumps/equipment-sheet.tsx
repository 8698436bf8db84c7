import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';

type Equipment = PumpDetail['equipment'][number];

/** What hangs on this pump, what feeds it, and whether it knows by itself that water moves. */
export function EquipmentSheet({ pump }: { readonly pump: PumpDetail }) {
  const format = useFormat();
  return (
    <Sheet id="equipment" title={t('pump.equipment')}>
      <div className="flex flex-col gap-3 px-4 py-3 sm:px-5">
        {pump.equipment.length === 0 ? (
          <p className="text-ink-2">{t('pump.equipment.none')}</p>
        ) : (
          <>
            <DataTable
              caption={t('pump.equipment')}
              rows={pump.equipment}
              keyOf={(_, index) => index}
              columns={[
                { head: t('pump.equipment.kind'), cell: ({ kind }: Equipment) => t(`pump.kindOf.${kind}`) },
                {
                  head: t('pump.equipment.fed'),
                  cell: ({ input }) =>
                    input === undefined ? t('pump.equipment.fedOwn') : t('pump.equipment.fedInput', { input }),
                },
                { head: t('pump.equipment.interlock'), cell: ({ interlock }) => t(`pump.interlock.${interlock}`) },
                {
                  head: t('pump.equipment.minimum'),
                  figures: true,
                  right: true,
                  cell: ({ minimumGpm }) => (minimumGpm === undefined ? '–' : format.quantity(minimumGpm, 'flow')),
                },
              ]}
            />
            <p className="text-13 text-ink-2">{t('pump.equipment.caution')}</p>
          </>
        )}
      </div>
    </Sheet>
  );
}
