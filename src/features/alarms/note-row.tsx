import { Link } from 'react-router-dom';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { paths } from '#src/lib/paths.ts';
import { AcknowledgeButton } from './acknowledge-button.tsx';
import { titleOf, whereOf } from './alarm-names.ts';
import { ALARM_TONE } from './alarm-tone.ts';
import { describeSpan, isWaiting } from './alarm-view.ts';

/** One note of the work list, in two lines. */
export function NoteRow({ alarm, now }: { readonly alarm: Alarm; readonly now: number }) {
  const format = useFormat();
  return (
    <article className="grid grid-cols-[26px_minmax(0,1fr)_auto] items-start gap-x-3 border-t border-rule px-4 py-2.5 first:border-0 sm:px-5">
      <PriorityMark kind={alarm.priority} acknowledged={!isWaiting(alarm)} />
      <div className="min-w-0">
        <h3 className="font-semibold">
          <Link
            to={paths.alarm(alarm.id)}
            className={`underline-offset-2 hover:underline ${ALARM_TONE[alarm.priority].text}`}
          >
            {titleOf(alarm)}
          </Link>
        </h3>
        <p className="text-13 text-ink-2">
          {whereOf(alarm)} · {describeSpan(alarm, format, now)}
        </p>
      </div>
      <AcknowledgeButton alarm={alarm} look="plain" />
    </article>
  );
}
