import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { AlarmPage } from '#shared/contract/http/alarms.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { AlarmFilters } from '#src/features/alarms/alarm-filters.tsx';
import { AlarmList } from '#src/features/alarms/alarm-list.tsx';
import { alarmQueries } from '#src/features/alarms/alarm-queries.ts';
import { AlarmTable } from '#src/features/alarms/alarm-table.tsx';
import { AlarmTools } from '#src/features/alarms/alarm-tools.tsx';
import { AlarmTotals } from '#src/features/alarms/alarm-totals.tsx';
import { alarmListFilter, parseAlarmsAddress } from '#src/features/alarms/alarms-address.ts';
import { SelectableAlarms } from '#src/features/alarms/selectable-alarms.tsx';
import { WorkList } from '#src/features/alarms/work-list.tsx';
import { StripSource } from '#src/features/pumps/strip-source.tsx';
import { useNow } from '#src/hooks/use-now.ts';
import { t } from '#src/lib/messages/page-words.ts';

const headingOf = ({ items, totals }: AlarmPage): string => {
  if (totals.unacknowledged > 0) return t('alarms.heading.waiting', { count: totals.unacknowledged });
  return items.length === 0 ? t('alarms.heading.calm') : t('alarms.heading.seen');
};

/** What needs somebody: alarms by priority with their evidence, and beside them what can wait for the next stop. */
export function AlarmsPage() {
  const [search] = useSearchParams();
  const { filter, view } = useMemo(() => parseAlarmsAddress(search), [search]);
  const { data } = useQuery(alarmQueries.standing());
  const now = useNow(15_000);
  const empty = { title: t('alarms.empty'), detail: t('alarms.empty.detail') };
  return (
    <div className="px-4 pb-10 sm:px-7">
      <div className="flex flex-col gap-3.5 pt-5 pb-3">
        <div className="flex flex-wrap items-baseline gap-x-6 gap-y-1">
          <PageHeading title={t('alarms.page')}>
            {data === undefined ? t('alarms.page') : <Figures text={headingOf(data)} />}
          </PageHeading>
          {data === undefined ? null : <AlarmTotals totals={data.totals} />}
          <AlarmTools />
        </div>
        <AlarmFilters totals={data?.totals} />
      </div>
      {view === 'table' ? (
        <Sheet id="list" title={t('alarms.list')}>
          <AlarmList filter={filter} empty={empty}>
            {(alarms) => <AlarmTable alarms={alarms} now={now} />}
          </AlarmList>
        </Sheet>
      ) : (
        <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_minmax(20rem,26rem)]">
          <Sheet id="list" title={t('alarms.list')}>
            <AlarmList filter={alarmListFilter(filter)} empty={empty}>
              {(alarms) => <SelectableAlarms alarms={alarms} now={now} StripSource={StripSource} />}
            </AlarmList>
          </Sheet>
          <Sheet id="work" title={t('alarms.workList')}>
            <p className="border-b border-rule px-4 py-2 text-13 text-ink-2 sm:px-5">{t('alarms.workList.detail')}</p>
            <WorkList filter={filter} now={now} />
          </Sheet>
        </div>
      )}
    </div>
  );
}
