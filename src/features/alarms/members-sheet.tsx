import { Link } from 'react-router-dom';
import type { AlarmDetail } from '#shared/contract/http/alarms.ts';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { whereOf } from './alarm-names.ts';

/** The pumps that one alarm speaks for, each with how long it was part of it. */
export function MembersSheet({ alarm, now }: { readonly alarm: AlarmDetail; readonly now: number }) {
  const format = useFormat();
  const moment = (at: number) => format.moment(at, alarm.zone, now);
  if (alarm.members.length === 0) return null;
  return (
    <Sheet id="members" title={t('alarm.members')}>
      <ul className="max-h-[60vh] overflow-y-auto px-4 sm:px-5">
        {alarm.members.map((member) => (
          <li key={`${member.pumpId} ${member.joinedAt}`} className="border-t border-rule py-2 first:border-0">
            <Link
              to={member.alarmId === null ? paths.pump(member.pumpId) : paths.alarm(member.alarmId)}
              className="inline-block min-h-6 font-medium underline underline-offset-2"
            >
              {whereOf(member)}
            </Link>
            <p className="text-13 text-ink-2">
              {member.leftAt === null
                ? t('alarm.member.since', { time: moment(member.joinedAt) })
                : t('alarm.member.over', { time: moment(member.joinedAt), end: moment(member.leftAt) })}
            </p>
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
