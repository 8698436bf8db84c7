import { Link } from 'react-router-dom';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { alarmWords } from '#shared/domain/wording/alarm-words.ts';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { AcknowledgeButton } from './acknowledge-button.tsx';
import { titleOf, whereOf } from './alarm-names.ts';
import { ALARM_TONE } from './alarm-tone.ts';
import { describeSpan, describeState, isWaiting } from './alarm-view.ts';
import { EvidenceStrip, type StripSource } from './evidence-strip.tsx';

export type AlarmRowProps = { readonly alarm: Alarm; readonly now: number; readonly StripSource: StripSource };

/** One alarm: what, where, since when, what it means, who has seen it, and the day around it. */
export function AlarmRow({ alarm, now, StripSource }: AlarmRowProps) {
  const format = useFormat();
  const facts = [
    alarm.customerName,
    alarm.area,
    alarm.technicianName === null ? null : t('alarm.technician', { name: alarm.technicianName }),
  ];
  return (
    <article className="grid grid-cols-[26px_minmax(0,1fr)] gap-x-3.5 gap-y-2 border-t border-rule px-4 py-3.5 first:border-0 sm:px-5 xl:grid-cols-[26px_minmax(0,1fr)_minmax(18rem,26rem)]">
      <PriorityMark kind={alarm.priority} acknowledged={!isWaiting(alarm)} />
      <div className="min-w-0">
        <h3 className="text-17 font-semibold">
          <Link
            to={paths.alarm(alarm.id)}
            className={`inline-block min-h-6 underline-offset-2 hover:underline ${ALARM_TONE[alarm.priority].text}`}
          >
            {titleOf(alarm)}
          </Link>
        </h3>
        <p>
          <Link to={paths.pump(alarm.pumpId)} className="font-medium underline-offset-2 hover:underline">
            {whereOf(alarm)}
          </Link>
          <span className="text-ink-2"> · {facts.filter((fact) => fact !== null).join(' · ')}</span>
        </p>
        <p className="text-13 text-ink-2">
          {describeSpan(alarm, format, now)} · {describeState(alarm, format, now)}
        </p>
        <p className="mt-1 max-w-prose text-13">{alarmWords(alarm.detector, alarm.cause, alarm.evidence).meaning}</p>
        <div className="mt-2 empty:hidden">
          <AcknowledgeButton alarm={alarm} />
        </div>
      </div>
      <div className="col-span-2 min-w-0 xl:col-span-1">
        <EvidenceStrip alarm={alarm} now={now} StripSource={StripSource} />
      </div>
    </article>
  );
}
