import { Link, useSearchParams } from 'react-router-dom';
import { Select } from '#src/components/ui/select.tsx';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { ALARM_VIEWS, changeAlarmsAddress, parseAlarmsAddress } from './alarms-address.ts';
import { ExportAlarms } from './export-alarms.tsx';

/** The list in another form, as a file, and how alarms do as a whole. */
export function AlarmTools() {
  const [search, setSearch] = useSearchParams();
  const { filter, view } = parseAlarmsAddress(search);
  const { user } = useSession();
  return (
    <div data-print="never" className="flex flex-wrap items-center gap-x-4 gap-y-2 sm:ml-auto">
      {user.role === 'manager' ? (
        <Link to={paths.alarmHealth()} className="inline-flex min-h-8 items-center underline underline-offset-2">
          {t('alarms.health')}
        </Link>
      ) : null}
      <Select
        quiet
        label={t('alarms.view')}
        value={view}
        onChange={(next) =>
          setSearch((current) => changeAlarmsAddress(current, { view: next }), { preventScrollReset: true })
        }
        options={ALARM_VIEWS.map((each) => ({ value: each, label: t(`alarms.view.${each}`) }))}
      />
      <ExportAlarms filter={filter} />
    </div>
  );
}
