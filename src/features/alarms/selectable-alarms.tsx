import type { Alarm } from '#shared/contract/http/alarms.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { AlarmRow } from './alarm-row.tsx';
import { BulkBar } from './bulk-bar.tsx';
import type { StripSource } from './evidence-strip.tsx';
import { useSelection } from './use-selection.ts';

export type SelectableAlarmsProps = {
  readonly alarms: readonly Alarm[];
  readonly now: number;
  readonly StripSource: StripSource;
};

/** Alarms row by row, one or several of which may be selected and dealt with together. */
export function SelectableAlarms({ alarms, now, StripSource }: SelectableAlarmsProps) {
  const { selected, isSelected, select, selectAll, clear } = useSelection(alarms);
  const all = selected.length === alarms.length;
  return (
    <>
      <BulkBar selected={selected} onClear={clear} />
      {alarms.length < 2 ? null : (
        <label
          data-print="never"
          className="flex min-h-9 w-fit items-center gap-3.5 px-4 pt-1 text-13 text-ink-2 sm:px-5"
        >
          <span className="flex w-[26px] justify-center">
            <input
              type="checkbox"
              className="size-6 accent-ink"
              checked={all}
              onChange={(event) => selectAll(event.target.checked)}
            />
          </span>
          {t('alarms.selectAll')}
        </label>
      )}
      {alarms.map((alarm) => (
        <AlarmRow
          key={alarm.id}
          alarm={alarm}
          now={now}
          StripSource={StripSource}
          selected={isSelected(alarm)}
          onSelect={(on) => select(alarm, on)}
        />
      ))}
    </>
  );
}
