import { Link } from 'react-router-dom';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { AlarmList } from './alarm-list.tsx';
import { titleOf } from './alarm-names.ts';
import { describeStanding, isWaiting } from './alarm-view.ts';

export type PumpAlarmsProps = {
  readonly pumpId: string;
  /** Whether an alarm's own page may be opened. */
  readonly linked: boolean;
  readonly now: number;
};

/** What is and was wrong at one pump. */
export function PumpAlarms({ pumpId, linked, now }: PumpAlarmsProps) {
  const format = useFormat();
  return (
    <Sheet id="alarms" title={t('pump.alarms')}>
      <AlarmList filter={{ show: 'all', pumpId, sort: 'newest' }} empty={{ title: t('pump.alarms.none'), detail: '' }}>
        {(alarms) =>
          alarms.map((alarm) => (
            <div
              key={alarm.id}
              className="grid grid-cols-[26px_minmax(0,1fr)] gap-x-3 border-t border-rule px-4 py-2.5 first-of-type:border-0 sm:px-5"
            >
              <PriorityMark kind={alarm.priority} acknowledged={!isWaiting(alarm)} />
              <div>
                <p className="font-semibold">
                  {linked ? (
                    <Link to={paths.alarm(alarm.id)} className="underline-offset-2 hover:underline">
                      {titleOf(alarm)}
                    </Link>
                  ) : (
                    titleOf(alarm)
                  )}
                </p>
                <p className="text-13 text-ink-2">{describeStanding(alarm, format, now)}</p>
              </div>
            </div>
          ))
        }
      </AlarmList>
    </Sheet>
  );
}
