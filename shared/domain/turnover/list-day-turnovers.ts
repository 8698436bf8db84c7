import type { Run } from '../runs/run.ts';
import { localDays } from '../time/local-days.ts';
import { type PumpedVolume, sumPumpedVolume } from './pumped-volume.ts';
import { turnovers } from './turnover-rate.ts';

/** One local day: its water, its turnovers, and how much of its 23, 24 or 25 hours the readings cover. */
export type DayTurnover = PumpedVolume & {
  readonly epochDay: number;
  readonly from: number;
  readonly to: number;
  /** undefined without a pool volume. */
  readonly turnovers: number | undefined;
  readonly coverageShare: number;
};

/**
 * The turnovers of every local day (IANA zone) that shares time with `from` to `to` (ms), each day in full. Empty for
 * an unknown zone or an empty stretch. The runs must reach over the days asked for.
 *
 * @example listDayTurnovers(runs, 'America/Phoenix', from, to, 20_000)[0]?.turnovers // 1.07
 */
export function listDayTurnovers(
  runs: readonly Run[],
  zone: string,
  from: number,
  to: number,
  poolGallons: number | undefined,
): DayTurnover[] {
  return localDays(zone, from, to).map((day) => {
    const volume = sumPumpedVolume(runs, day.from, day.to);
    return {
      ...day,
      ...volume,
      turnovers: poolGallons === undefined ? undefined : turnovers(volume.gallons, poolGallons),
      coverageShare: volume.coveredMs / (day.to - day.from),
    };
  });
}
