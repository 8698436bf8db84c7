import { useCallback } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
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
import type { ShownDay } from './use-day.ts';

export type HomeStripProps = {
  readonly pump: PumpRow;
  readonly strip: StripState;
  readonly day: ShownDay;
  readonly visibleFrom: number;
  readonly now: number;
  readonly cursor: CursorStore;
};

/** The homeowner's strip: what ran when, named by what it does for them. */
export function HomeStrip({ pump, strip, day, visibleFrom, now, cursor }: HomeStripProps) {
  const format = useFormat();
  const label = useCallback((run: StripRun) => labelRun(run, pump, format), [pump, format]);
  const describe = (at: number) =>
    `${format.time(at, pump.zone)}. ${instantWords({ pump, strip, at, now, format, voice: 'homeowner' }).why}`;
  const shown = (strip.runs ?? []).filter(({ from, to }) => from < day.until && (to ?? now) > day.from);
  return (
    <Sheet
      id="day"
      title={
        day.isToday
          ? t('home.today', { pad: pump.padName })
          : t('home.day', { day: format.day(day.from, pump.zone), pad: pump.padName })
      }
      aside={
        <span className="flex flex-wrap items-center gap-3">
          <DayNav day={day} visibleFrom={visibleFrom} />
          <span className="figures text-ink-2">{format.day(day.from, pump.zone)}</span>
        </span>
      }
    >
      <div aria-busy={strip.runs === undefined} className="px-4 pt-4 pb-3 sm:px-5">
        <DayStrip
          size="home"
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
          name={t('home.strip')}
          describe={describe}
        />
        <div className="pt-2">
          <InstantLine
            pump={pump}
            strip={strip}
            cursor={cursor}
            now={now}
            voice="homeowner"
            idle={t('home.strip.hint')}
          />
        </div>
        <TableToggle label={t('strip.tableOf', { name: pump.padName })}>
          <RunTable runs={shown} zone={pump.zone} now={now} caption={t('strip.tableOf', { name: pump.padName })} />
        </TableToggle>
      </div>
    </Sheet>
  );
}
