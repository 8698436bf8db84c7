import type { AlarmHealthFigures } from '#shared/contract/http/alarm-health.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/health-words.ts';
import { AlarmLink, PumpLink } from './alarm-links.tsx';

type Stale = AlarmHealthFigures['stale'];
type StaleRow = Stale['now'][number];

export type StaleSheetProps = { readonly stale: Stale; readonly zone: string; readonly now: number };

/** What has stood for over a day and still does. */
export function StaleSheet({ stale, zone, now }: StaleSheetProps) {
  const format = useFormat();
  return (
    <Sheet id="stale" title={t('health.stale')}>
      <div className="flex flex-col gap-2 px-4 py-3 sm:px-5">
        {stale.now.length === 0 ? (
          <p className="text-ink-2">{t('health.stale.none')}</p>
        ) : (
          <DataTable
            caption={t('health.stale')}
            rows={stale.now}
            keyOf={({ alarmId }) => alarmId}
            columns={[
              {
                head: t('health.stale.since'),
                figures: true,
                cell: ({ since }: StaleRow) => format.moment(since, zone, now),
              },
              { head: t('health.offenders.alarm'), cell: (alarm) => <AlarmLink alarm={alarm} /> },
              { head: t('health.offenders.pump'), cell: (alarm) => <PumpLink alarm={alarm} /> },
            ]}
          />
        )}
        {stale.nowCount > stale.now.length ? (
          <p className="text-13 text-ink-2">
            {t('health.stale.more', { shown: stale.now.length, count: stale.nowCount })}
          </p>
        ) : null}
      </div>
    </Sheet>
  );
}
