import type { ReactNode } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import type { AlarmFilter } from './alarm-queries.ts';
import { isNarrowed } from './alarms-address.ts';
import { useAlarmList } from './use-alarm-list.ts';

export type AlarmListProps = {
  readonly filter: AlarmFilter;
  readonly empty: { readonly title: string; readonly detail: string };
  readonly children: (alarms: readonly Alarm[]) => ReactNode;
};

const Ruled = () => (
  <div aria-busy="true" className="px-5 py-4">
    <p role="status" className="sr-only">
      {t('shell.loading')}
    </p>
    <div aria-hidden="true" className="ruled h-44" />
  </div>
);

/** A list of alarms in all its states; what there is is drawn by whoever asks for it. */
export function AlarmList({ filter, empty, children }: AlarmListProps) {
  const { query, alarms } = useAlarmList(filter);
  if (alarms === undefined) {
    return query.isError ? <ErrorNotice error={query.error} onRetry={() => void query.refetch()} /> : <Ruled />;
  }
  if (alarms.length === 0) {
    const narrowed = isNarrowed(filter);
    return (
      <Notice title={narrowed ? t('alarms.noMatch') : empty.title}>
        <p>{narrowed ? t('alarms.noMatch.detail') : empty.detail}</p>
      </Notice>
    );
  }
  return (
    <>
      {children(alarms)}
      {query.hasNextPage ? (
        <p className="border-t border-rule px-5 py-3">
          <Button disabled={query.isFetchingNextPage} onClick={() => void query.fetchNextPage()}>
            {query.isFetchingNextPage ? t('alarms.loadingMore') : t('alarms.more')}
          </Button>
        </p>
      ) : null}
    </>
  );
}
