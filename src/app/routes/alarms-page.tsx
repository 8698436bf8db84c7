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
import { AlarmRow } from '#src/features/alarms/alarm-row.tsx';
import { parseAlarmsAddress } from '#src/features/alarms/alarms-address.ts';
import { NoteRow } from '#src/features/alarms/note-row.tsx';
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
  const { filter } = useMemo(() => parseAlarmsAddress(search), [search]);
  const { data } = useQuery(alarmQueries.standing());
  const now = useNow(15_000);
  return (
    <div className="px-4 pb-10 sm:px-7">
      <div className="flex flex-col gap-3.5 pt-5 pb-3">
        <PageHeading title={t('alarms.page')}>
          {data === undefined ? t('alarms.page') : <Figures text={headingOf(data)} />}
        </PageHeading>
        <AlarmFilters />
      </div>
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_minmax(20rem,26rem)]">
        <Sheet id="list" title={t('alarms.list')}>
          <AlarmList
            filter={{ ...filter, alarmClass: 'alarm' }}
            empty={{ title: t('alarms.empty'), detail: t('alarms.empty.detail') }}
          >
            {(alarm) => <AlarmRow key={alarm.id} alarm={alarm} now={now} StripSource={StripSource} />}
          </AlarmList>
        </Sheet>
        <Sheet id="work" title={t('alarms.workList')}>
          <p className="border-b border-rule px-4 py-2 text-13 text-ink-2 sm:px-5">{t('alarms.workList.detail')}</p>
          <AlarmList
            filter={{ ...filter, alarmClass: 'note' }}
            empty={{ title: t('alarms.emptyNotes'), detail: t('alarms.emptyNotes.detail') }}
          >
            {(alarm) => <NoteRow key={alarm.id} alarm={alarm} now={now} />}
          </AlarmList>
        </Sheet>
      </div>
    </div>
  );
}
