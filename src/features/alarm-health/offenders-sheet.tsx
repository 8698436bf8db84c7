import type { AlarmHealthFigures, Offender } from '#shared/contract/http/alarm-health.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/health-words.ts';
import { AlarmLink, nameOfAlarm, nameOfPump, PumpLink } from './alarm-links.tsx';
import { percent } from './health-view.ts';

type Listed = { readonly rows: readonly Offender[]; readonly caption: string; readonly total?: number };

function Offenders({ rows, caption, total }: Listed) {
  const format = useFormat();
  return (
    <DataTable
      caption={caption}
      rows={rows}
      keyOf={({ alarmId }) => alarmId}
      columns={[
        {
          head: t('health.offenders.times'),
          figures: true,
          right: true,
          cell: ({ count }: Offender) => format.number(count),
        },
        { head: t('health.offenders.alarm'), cell: (alarm) => <AlarmLink alarm={alarm} /> },
        { head: t('health.offenders.pump'), cell: (alarm) => <PumpLink alarm={alarm} /> },
        ...(total === undefined
          ? []
          : [
              {
                head: t('health.offenders.share'),
                figures: true,
                right: true,
                cell: ({ count }: Offender) => percent(count / total, format),
              },
            ]),
      ]}
    />
  );
}

const exportRows = (rows: readonly Offender[]) => [
  [t('health.offenders.times'), t('health.offenders.alarm'), t('health.offenders.pump')],
  ...rows.map((alarm) => [alarm.count, nameOfAlarm(alarm), nameOfPump(alarm)]),
];

/** The worst offenders, each with the alarm and the pump to look at. */
export function OffendersSheet({ figures }: { readonly figures: AlarmHealthFigures }) {
  const { topTen, chattering, fleeting, count } = figures;
  return (
    <Sheet
      id="offenders"
      title={t('health.offenders')}
      aside={topTen.length === 0 ? null : <ExportButton name="alarm-offenders" rows={() => exportRows(topTen)} />}
    >
      <div className="flex flex-col gap-4 px-4 py-3 sm:px-5">
        {topTen.length === 0 ? (
          <p className="text-ink-2">{t('health.offenders.none')}</p>
        ) : (
          <Offenders rows={topTen} caption={t('health.offenders')} total={count} />
        )}
        {chattering.length === 0 ? null : (
          <div>
            <h3 className="font-semibold">{t('health.chattering')}</h3>
            <Offenders rows={chattering} caption={t('health.chattering')} />
          </div>
        )}
        {fleeting.length === 0 ? null : (
          <div>
            <h3 className="font-semibold">{t('health.fleeting')}</h3>
            <Offenders rows={fleeting} caption={t('health.fleeting')} />
          </div>
        )}
      </div>
    </Sheet>
  );
}
