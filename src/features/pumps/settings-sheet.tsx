import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { FactList } from '#src/components/ui/fact-list.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { describeDays } from '#src/lib/describe-days.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { listSettings } from './settings-view.ts';

type Entry = PumpDetail['settings']['program'][number];

/** What the motor was commissioned to do by itself. */
export function SettingsSheet({ pump }: { readonly pump: PumpDetail }) {
  const format = useFormat();
  const { program } = pump.settings;
  return (
    <Sheet id="settings" title={t('pump.settings')}>
      <div className="flex flex-col gap-3 px-4 py-3 sm:px-5">
        {program.length === 0 ? (
          <p>{t('pump.settings.noProgram')}</p>
        ) : (
          <DataTable
            caption={t('pump.settings.program')}
            rows={program}
            keyOf={(_, index) => index}
            columns={[
              { head: t('pump.settings.program'), cell: ({ days }: Entry) => describeDays(days, format.locale) },
              {
                head: t('pump.settings.from'),
                figures: true,
                cell: ({ fromMinute }) => format.minuteOfDay(fromMinute),
              },
              { head: t('pump.settings.to'), figures: true, cell: ({ toMinute }) => format.minuteOfDay(toMinute) },
              { head: t('pump.settings.speed'), figures: true, right: true, cell: ({ rpm }) => format.rpm(rpm) },
            ]}
          />
        )}
        <FactList facts={listSettings(pump, format)} />
      </div>
    </Sheet>
  );
}
