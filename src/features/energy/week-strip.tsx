import { useMemo } from 'react';
import type { ProgramFigures } from '#shared/contract/http/energy-programs.ts';
import type { PlannedRun } from '#shared/contract/http/runs.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import { StripAxis } from '#src/components/charts/strip/strip-axis.tsx';
import { StripCanvas } from '#src/components/charts/strip/strip-canvas.tsx';
import { USUAL_TOP_RPM } from '#src/components/charts/strip/strip-metrics.ts';
import type { StripRun } from '#src/components/charts/strip/strip-run.ts';
import { useElementWidth } from '#src/hooks/use-element-width.ts';
import { useFormat } from '#src/hooks/use-format.ts';

/** The strip's clock for a week that has no date: Monday 5 January 1970 in UTC, so that its days have their names. */
const MONDAY = 4 * DAY_MS;
const WEEK_MS = 7 * DAY_MS;
const DAYS = [0, 1, 2, 3, 4, 5, 6];

const sameShape = (left: PlannedRun | undefined, right: PlannedRun, shift: number) =>
  left !== undefined &&
  left.from + shift === right.from &&
  left.to + shift === right.to &&
  left.rpm === right.rpm &&
  left.source === right.source &&
  left.closedInputs === right.closedInputs;

const inDay = (week: readonly PlannedRun[], day: number) =>
  week.flatMap((run) => {
    const from = Math.max(run.from, day * DAY_MS);
    const to = Math.min(run.to, (day + 1) * DAY_MS);
    return from < to ? [{ ...run, from, to }] : [];
  });

/** Whether every day of a week is as Monday is. */
export function isEveryDay(week: readonly PlannedRun[]): boolean {
  const monday = inDay(week, 0);
  return [1, 2, 3, 4, 5, 6].every((day) => {
    const runs = inDay(week, day);
    return runs.length === monday.length && runs.every((run, index) => sameShape(monday[index], run, day * DAY_MS));
  });
}

const toRun = ({ from, to, source, closedInputs, activeInput, rpm }: PlannedRun): StripRun => ({
  from: from + MONDAY,
  to: to + MONDAY,
  source,
  expectedSource: source,
  closedInputs,
  activeInput,
  expectedRpm: rpm,
  meanRpm: rpm,
  meanWatts: 0,
  flags: [],
});

export type WeekStripProps = {
  readonly week: ProgramFigures['week'];
  /** Whether one day stands for all. */
  readonly asDay: boolean;
  readonly name: string;
};

/** An ordinary week on the same strip as measured days, named by weekdays alone; one day where all are alike. */
export function WeekStrip({ week, asDay, name }: WeekStripProps) {
  const format = useFormat();
  const [track, width] = useElementWidth<HTMLDivElement>();
  const window = useMemo(() => ({ from: MONDAY, until: MONDAY + (asDay ? DAY_MS : WEEK_MS) }), [asDay]);
  const runs = useMemo(() => week.map(toRun), [week]);
  const weekday = new Intl.DateTimeFormat(format.locale, { weekday: 'short', timeZone: 'UTC' });
  return (
    <div ref={track}>
      <div role="img" aria-label={name}>
        <StripCanvas
          size="row"
          runs={runs}
          planned={[]}
          window={window}
          zone="UTC"
          now={window.until}
          tone="soon"
          topRpm={USUAL_TOP_RPM}
          width={width}
        />
      </div>
      {asDay ? (
        <div className="relative h-6">
          <StripAxis window={window} zone="UTC" width={width} />
        </div>
      ) : (
        <div aria-hidden="true" className="figures grid h-6 grid-cols-7 text-13 text-ink-2">
          {DAYS.map((day) => (
            <span key={day} className="pl-1">
              {weekday.format(MONDAY + day * DAY_MS)}
            </span>
          ))}
        </div>
      )}
    </div>
  );
}
