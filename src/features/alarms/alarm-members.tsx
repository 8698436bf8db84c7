import { Link } from 'react-router-dom';
import type { AlarmDetail, AlarmMember } from '#shared/contract/http/alarms.ts';
import { type Column, DataTable } from '#src/components/ui/data-table.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';

export type AlarmMembersProps = { readonly alarm: AlarmDetail; readonly now: number };

const LINK = 'underline underline-offset-2';

function columnsOf(format: Format, zone: string, now: number): readonly Column<AlarmMember>[] {
  const moment = (at: number) => format.moment(at, zone, now);
  return [
    {
      head: t('group.pump'),
      cell: ({ pumpId, padName, pumpName }) => (
        <Link to={paths.pump(pumpId)} className={LINK}>
          {t('alarm.where', { pad: padName, pump: pumpName })}
        </Link>
      ),
    },
    { head: t('group.area'), cell: ({ area }) => area ?? '–' },
    { head: t('group.joined'), figures: true, cell: ({ joinedAt }) => moment(joinedAt) },
    {
      head: t('group.left'),
      figures: true,
      cell: ({ leftAt }) => (leftAt === null ? t('group.stands') : moment(leftAt)),
    },
    {
      head: t('group.ownAlarm'),
      cell: ({ alarmId }) =>
        alarmId === null ? (
          t('group.ownAlarm.none')
        ) : (
          <Link to={paths.alarm(alarmId)} className={LINK}>
            {t('group.ownAlarm.open')}
          </Link>
        ),
    },
  ];
}

/** The pumps that one alarm speaks for, those that are still concerned first. Nothing for an alarm of one pump. */
export function AlarmMembers({ alarm, now }: AlarmMembersProps) {
  const format = useFormat();
  if (alarm.group === null) return null;
  return (
    <Sheet id="members" title={t('group.members')}>
      <div className="px-4 py-3 text-15 sm:px-5">
        <p className="pb-2 text-ink-2">{t('group.members.detail')}</p>
        <DataTable
          caption={t('group.members')}
          columns={columnsOf(format, alarm.zone, now)}
          rows={alarm.members}
          keyOf={({ pumpId }) => pumpId}
          wide
        />
      </div>
    </Sheet>
  );
}
