import { Link } from 'react-router-dom';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { paths } from '#src/lib/paths.ts';
import { titleOf } from './alarm-names.ts';
import { ALARM_TONE } from './alarm-tone.ts';
import { describeSpan, describeState } from './alarm-view.ts';
import { RowActions } from './row-actions.tsx';

/** One thing worth doing at a pad: what, since when, what became of it. */
export function NoteRow({ alarm, now }: { readonly alarm: Alarm; readonly now: number }) {
  const format = useFormat();
  const lines = [alarm.pumpName, describeSpan(alarm, format, now), describeState(alarm, format, now)];
  return (
    <article className="pt-2.5">
      <h4 className="font-semibold">
        <Link
          to={paths.alarm(alarm.id)}
          className={`inline-block min-h-6 underline-offset-2 hover:underline ${ALARM_TONE[alarm.priority].text}`}
        >
          {titleOf(alarm)}
        </Link>
      </h4>
      <p className="text-13 text-ink-2">{lines.filter((line) => line !== '').join(' · ')}</p>
      {alarm.done?.found == null ? null : (
        <blockquote className="mt-1 border-l-2 border-ink pl-3">{alarm.done.found}</blockquote>
      )}
      <RowActions alarm={alarm} />
    </article>
  );
}
