import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { AlarmDetail } from '#shared/contract/http/alarms.ts';
import { alarmWords } from '#shared/domain/wording/alarm-words.ts';
import { buttonClass } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { AlarmHistory } from '#src/features/alarms/alarm-history.tsx';
import { whereOf } from '#src/features/alarms/alarm-names.ts';
import { alarmQueries } from '#src/features/alarms/alarm-queries.ts';
import { describeNextStop } from '#src/features/alarms/alarm-view.ts';
import { AnswerPanel } from '#src/features/alarms/answer-panel.tsx';
import { Cautions } from '#src/features/alarms/cautions.tsx';
import { EvidenceSheet } from '#src/features/alarms/evidence-sheet.tsx';
import { usualWattsOf } from '#src/features/alarms/evidence-view.ts';
import { LikelySheet } from '#src/features/alarms/likely-sheet.tsx';
import { LookFirst } from '#src/features/alarms/look-first.tsx';
import { MembersSheet } from '#src/features/alarms/members-sheet.tsx';
import { NowCard } from '#src/features/pumps/now-card.tsx';
import { pumpQueries } from '#src/features/pumps/pump-queries.ts';
import { StripSource } from '#src/features/pumps/strip-source.tsx';
import { EvidenceChart } from '#src/features/readings/evidence-chart.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useWatchedPumps } from '#src/hooks/use-watched-pumps.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';

/** What a mail's link opens: one alarm, on a phone held in one hand in the sun. */
export function AlarmPage() {
  const { alarmId = '' } = useParams();
  const { data: alarm, isError, error, refetch } = useQuery(alarmQueries.detail(alarmId));
  if (alarm !== undefined) return <LoadedAlarm alarm={alarm} />;
  return (
    <div className="mx-auto max-w-5xl px-4 py-4">
      <PageHeading title={t('alarm.page')} />
      <div className="mt-4 border border-ink bg-sheet">
        {isError ? (
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        ) : (
          <div aria-busy="true" className="p-4">
            <p role="status" className="sr-only">
              {t('shell.loading')}
            </p>
            <div aria-hidden="true" className="ruled h-56" />
          </div>
        )}
      </div>
    </div>
  );
}

const NO_PUMPS: readonly string[] = [];

function LoadedAlarm({ alarm }: { readonly alarm: AlarmDetail }) {
  const format = useFormat();
  const now = useNow(15_000);
  const words = alarmWords(alarm.detector, alarm.cause, alarm.evidence);
  const { pumpId } = alarm;
  const { data: pump } = useQuery({ ...pumpQueries.detail(pumpId ?? ''), enabled: pumpId !== null });
  useWatchedPumps(pumpId === null ? NO_PUMPS : [pumpId]);
  const about = [
    alarm.pumpName,
    pump === undefined ? null : pump.street.replace(alarm.padName, '').replace(/^, /, ''),
    alarm.customerName,
    alarm.technicianName === null ? null : t('alarm.technician', { name: alarm.technicianName }),
    describeNextStop(alarm, format),
  ].filter((part) => part !== null && part !== '');
  return (
    <div className="mx-auto flex max-w-5xl flex-col gap-3.5 px-4 pb-10">
      <div className="-mx-4 flex min-h-touch items-center justify-between border-b border-rule px-4 text-17">
        <Link to={paths.alarms()} className="flex min-h-touch items-center gap-2 font-semibold">
          <span aria-hidden="true">‹</span>
          {t('alarm.back')}
        </Link>
        <span className="figures text-15 text-ink-2">{format.time(now, alarm.zone)}</span>
      </div>
      <div>
        <PageHeading title={`${words.title}, ${whereOf(alarm)}`}>{alarm.padName}</PageHeading>
        <p className="text-17 text-ink-2">{about.join(' · ')}</p>
      </div>
      <div className="grid items-start gap-3.5 lg:grid-cols-2">
        <div className="flex min-w-0 flex-col gap-3.5">
          <EvidenceSheet
            alarm={alarm}
            words={words}
            now={now}
            StripSource={StripSource}
            chart={
              pumpId === null ? null : (
                <EvidenceChart
                  pumpId={pumpId}
                  from={alarm.from}
                  zone={alarm.zone}
                  now={now}
                  usualWatts={usualWattsOf(alarm.evidence)}
                />
              )
            }
          />
          {alarm.coveredBy === null ? null : (
            <p className="border border-rule-strong bg-sheet px-4 py-3">
              {t('alarm.covered')}{' '}
              <Link to={paths.alarm(alarm.coveredBy)} className="inline-block min-h-6 underline underline-offset-2">
                {t('alarm.coveredLink')}
              </Link>
            </p>
          )}
          <AnswerPanel alarm={alarm} />
          <MembersSheet alarm={alarm} now={now} />
          {pump === undefined ? null : <NowCard pump={pump} />}
        </div>
        <div className="flex min-w-0 flex-col gap-3.5">
          <LookFirst look={words.look} />
          {alarm.likely === null ? null : <LikelySheet likely={alarm.likely} />}
          <Cautions task={words.task} />
        </div>
      </div>
      {pumpId === null ? null : (
        <Link to={paths.pump(pumpId)} className={buttonClass('plain', true)}>
          {t('alarm.openPump')}
        </Link>
      )}
      <div className="grid items-start gap-3.5 lg:grid-cols-2">
        <AlarmHistory alarm={alarm} now={now} />
      </div>
    </div>
  );
}
