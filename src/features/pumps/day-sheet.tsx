import { useCallback } from 'react';
import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { DayStrip } from '#src/components/charts/strip/day-strip.tsx';
import { RunTable } from '#src/components/charts/strip/run-table.tsx';
import { USUAL_TOP_RPM } from '#src/components/charts/strip/strip-metrics.ts';
import type { StripRun, StripState } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { unprimedSince } from '#src/lib/unprimed-since.ts';
import { labelRun } from '#src/lib/why/label-run.ts';
import { DayNav } from './day-nav.tsx';
import { InstantLine } from './instant-line.tsx';
import { instantWords } from './instant-words.ts';
import { nameOfPump } from './pump-heading.ts';
import type { ShownDay } from './use-day.ts';

export type DaySheetProps = {
  readonly pump: PumpDetail;
  readonly strip: StripState;
  readonly day: ShownDay;
  readonly now: number;
  readonly cursor: CursorStore;
};

/** The day of one pump, large: strip, the sentence for the instant under the cursor, the table behind it. */
export function DaySheet({ pump, strip, day, now, cursor }: DaySheetProps) {
  const format = useFormat();
  const label = useCallback((run: StripRun) => labelRun(run, pump, format), [pump, format]);
  const describe = (at: number) => {
    const { figures, why } = instantWords({ pump, strip, at, now, format, voice: 'technician' });
    return [format.time(at, pump.zone), figures, why].filter(Boolean).join('. ');
  };
  const name = nameOfPump(pump);
  const shown = (strip.runs ?? []).filter(({ from, to }) => from < day.until && (to ?? now) > day.from);
  return (
    <Sheet
      id="day"
      title={
        day.isToday
          ? `${t('pump.day.today')}, ${format.day(day.from, pump.zone)}`
          : format.dayWithYear(day.from, pump.zone)
      }
      aside={<DayNav day={day} visibleFrom={pump.visibleFrom} />}
    >
      <div aria-busy={strip.runs === undefined} className="px-4 pt-4 pb-3 sm:px-5">
        <DayStrip
          size="day"
          scaled
          runs={strip.runs ?? []}
          planned={strip.planned}
          window={day}
          zone={pump.zone}
          now={now}
          tone={pump.alarm?.priority ?? 'soon'}
          unprimedSince={unprimedSince(pump.alarm)}
          topRpm={Math.max(USUAL_TOP_RPM, pump.settings.maxRpm)}
          labelOf={label}
          cursor={cursor}
          name={t('pump.stripOf', { name })}
          describe={describe}
        />
        <div className="pt-3">
          <InstantLine pump={pump} strip={strip} cursor={cursor} now={now} voice="technician" />
        </div>
        <TableToggle label={t('strip.tableOf', { name })}>
          <RunTable runs={shown} zone={pump.zone} now={now} caption={t('strip.tableOf', { name })} />
        </TableToggle>
      </div>
    </Sheet>
  );
}
