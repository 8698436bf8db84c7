import { BOOSTER_MARGIN_MINUTES, type NeedKind, type PadNeeds, type WindowNeed } from './pad-needs.ts';
import type { SpeedOption } from './speed-option.ts';
import { visitMinutes, WEEK_MINUTES, type WeekMinutes } from './week-minutes.ts';

/** The least and the largest speed (rpm) that each minute of the week asks for, and which need asks. 0: nothing asked. */
export type SpeedLimits = {
  readonly least: WeekMinutes;
  readonly most: WeekMinutes;
  readonly askedBy: readonly (NeedKind | undefined)[];
};

/** The slowest speed that meets a window's need; Infinity where none does. */
export function speedForNeed(need: WindowNeed, speeds: readonly SpeedOption[]): number {
  const { minimumRpm = 0, minimumGpm = 0 } = need;
  return speeds.find(({ rpm, gpm }) => rpm >= minimumRpm && gpm >= minimumGpm)?.rpm ?? Number.POSITIVE_INFINITY;
}

export const marginOf = ({ kind }: WindowNeed): number => (kind === 'booster' ? BOOSTER_MARGIN_MINUTES : 0);

/**
 * Lays the needs of a pad over the minutes of a week. `speeds` are those of the motor, slowest first. Where two needs
 * overlap the faster one rules; where quiet hours do, the slower.
 */
export function layOutLimits(needs: PadNeeds, speeds: readonly SpeedOption[]): SpeedLimits {
  const least = new Float64Array(WEEK_MINUTES);
  const most = new Float64Array(WEEK_MINUTES).fill(Number.POSITIVE_INFINITY);
  const askedBy: (NeedKind | undefined)[] = Array.from({ length: WEEK_MINUTES }, () => undefined);
  for (const need of needs.windows) {
    const rpm = speedForNeed(need, speeds);
    visitMinutes(need, marginOf(need), (minute) => {
      if (rpm <= (least[minute] ?? 0)) return;
      least[minute] = rpm;
      askedBy[minute] = need.kind;
    });
  }
  for (const quiet of needs.quiet)
    visitMinutes(quiet, 0, (minute) => {
      most[minute] = Math.min(most[minute] ?? quiet.maximumRpm, quiet.maximumRpm);
    });
  return { least, most, askedBy };
}
