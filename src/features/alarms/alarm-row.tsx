import { Link } from 'react-router-dom';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { alarmWords } from '#shared/domain/wording/alarm-words.ts';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { titleOf, whereOf } from './alarm-names.ts';
import { ALARM_TONE } from './alarm-tone.ts';
import { describeGroup, describeNextStop, describeStanding, isWaiting } from './alarm-view.ts';
import { EvidenceStrip, type StripSource } from './evidence-strip.tsx';
import { RowActions } from './row-actions.tsx';

export type AlarmRowProps = {
  readonly alarm: Alarm;
  readonly now: number;
  readonly StripSource: StripSource;
  readonly selected: boolean;
  readonly onSelect: (selected: boolean) => void;
};

/** One alarm: what, where, since when, what it means, who has seen it, and the day around it. */
export function AlarmRow({ alarm, now, StripSource, selected, onSelect }: AlarmRowProps) {
  const format = useFormat();
  const facts = [
    alarm.customerName,
    alarm.area,
    alarm.technicianName === null ? null : t('alarm.technician', { name: alarm.technicianName }),
    describeNextStop(alarm, format),
    describeGroup(alarm),
  ].filter((fact) => fact !== null && fact !== '');
  return (
    <article className="grid grid-cols-[26px_minmax(0,1fr)] gap-x-3.5 gap-y-2 border-t border-rule px-4 py-3.5 first:border-0 sm:px-5 xl:grid-cols-[26px_minmax(0,1fr)_minmax(18rem,26rem)]">
      <div className="flex flex-col items-center gap-2">
        <PriorityMark kind={alarm.priority} acknowledged={!isWaiting(alarm)} />
        <input
          type="checkbox"
          data-print="never"
          className="size-6 accent-ink"
          checked={selected}
          onChange={(event) => onSelect(event.target.checked)}
          aria-label={t('alarms.select', { title: titleOf(alarm), where: whereOf(alarm) })}
        />
      </div>
      <div className="min-w-0">
        <h3 className="text-17 font-semibold">
          <Link
            to={paths.alarm(alarm.id)}
            className={`inline-block min-h-6 underline-offset-2 hover:underline ${ALARM_TONE[alarm.priority].text}`}
          >
            {titleOf(alarm)}
          </Link>
        </h3>
        <p className="leading-6">
          {alarm.pumpId === null ? (
            <span className="font-medium">{whereOf(alarm)}</span>
          ) : (
            <Link
              to={paths.pump(alarm.pumpId)}
              className="inline-block min-h-6 font-medium underline-offset-2 hover:underline"
            >
              {whereOf(alarm)}
            </Link>
          )}
          {facts.length === 0 ? null : <span className="text-ink-2"> · {facts.join(' · ')}</span>}
        </p>
        <p className="text-13 text-ink-2">{describeStanding(alarm, format, now)}</p>
        <p className="mt-1 max-w-prose text-13">{alarmWords(alarm.detector, alarm.cause, alarm.evidence).meaning}</p>
        {alarm.done?.found == null ? null : (
          <blockquote className="mt-1 border-l-2 border-ink pl-3">{alarm.done.found}</blockquote>
        )}
        <RowActions alarm={alarm} />
      </div>
      <div className="col-span-2 min-w-0 xl:col-span-1">
        {alarm.pumpId === null ? null : (
          <EvidenceStrip pumpId={alarm.pumpId} alarm={alarm} now={now} StripSource={StripSource} />
        )}
      </div>
    </article>
  );
}
