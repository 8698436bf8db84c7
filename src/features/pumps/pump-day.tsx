import { useCallback, useMemo } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { Voice } from '#shared/domain/control/explain-options.ts';
import { DayStrip } from '#src/components/charts/strip/day-strip.tsx';
import { RunTable } from '#src/components/charts/strip/run-table.tsx';
import { type StripSize, USUAL_TOP_RPM } from '#src/components/charts/strip/strip-metrics.ts';
import type { StripRun, StripState } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { withSilence } from '#src/components/charts/strip/with-silence.ts';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { unprimedSince } from '#src/lib/unprimed-since.ts';
import { labelRun } from '#src/lib/why/label-run.ts';
import { InstantLine } from './instant-line.tsx';
import { instantWords } from './instant-words.ts';
import { nameOfPump } from './pump-heading.ts';
import type { ShownDay } from './use-day.ts';

export type PumpDayProps = {
  readonly pump: PumpRow;
  readonly strip: StripState;
  readonly day: ShownDay;
  readonly now: number;
  readonly cursor: CursorStore;
  readonly size: StripSize;
  /** Whose words: a technician also reads speeds at the left and figures with every instant. */
  readonly voice: Voice;
  /** What stands under the strip while nobody points at it; without it, what is said of now. */
  readonly idle?: string;
};

/** A pump's day: the strip, the sentence for the instant under the cursor, and the table behind it. */
export function PumpDay({ pump, strip: read, day, now, cursor, size, voice, idle }: PumpDayProps) {
  const format = useFormat();
  const strip = useMemo(() => ({ ...read, runs: withSilence(read.runs, pump.silentSince) }), [read, pump.silentSince]);
  const label = useCallback((run: StripRun) => labelRun(run, pump, format), [pump, format]);
  const describe = (at: number) => {
    const { figures, why } = instantWords({ pump, strip, at, now, format, voice });
    const parts = [format.time(at, pump.zone), voice === 'technician' ? figures : undefined, why];
    return parts.filter((part) => part !== undefined).join('. ');
  };
  const name = nameOfPump(pump);
  const table = t('strip.tableOf', { name });
  const shown = strip.runs?.filter(({ from, to }) => from < day.until && (to ?? now) > day.from);
  return (
    <div aria-busy={read.runs === undefined} className="flex flex-col gap-2 px-4 pt-4 pb-3 sm:px-5">
      <DayStrip
        size={size}
        scaled={voice === 'technician'}
        runs={strip.runs}
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
      {strip.failed && strip.runs === undefined ? <p className="text-p1">{t('strip.failed')}</p> : null}
      <InstantLine
        pump={pump}
        strip={strip}
        cursor={cursor}
        now={now}
        voice={voice}
        {...(idle === undefined ? {} : { idle })}
      />
      <TableToggle label={table}>
        <RunTable runs={shown} zone={pump.zone} now={now} caption={table} />
      </TableToggle>
    </div>
  );
}
