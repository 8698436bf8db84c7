import { DAY_MS } from '../time/local-time.ts';
import type { Sign, Signs } from './sign.ts';

/** Something that happened before an alarm: an instant in ms, and by whom where a person did it. */
export type Deed = { readonly at: number; readonly by: string };

/** What is known around an alarm. `from` is when its condition began, ms. What is not known is left out. */
export type AlarmSurroundings = {
  readonly from: number;
  readonly lidOpened?: Deed | undefined;
  readonly visit?: Deed | undefined;
  readonly filterCleanedAt?: number | undefined;
  readonly powerCutAt?: number | undefined;
  readonly clocksShiftedAt?: number | undefined;
  /** The readings' and the weather's own signs, as the detectors and the server give them. */
  readonly seen?: Signs | undefined;
};

/** How long before an alarm a deed still speaks, days; common practice. */
export const SPEAKS_FOR_DAYS = {
  'lid-opened': 7,
  'our-visit': 7,
  'filter-cleaned': 10,
  'power-cut': 3,
  'clocks-shifted': 14,
} as const satisfies Partial<Record<Sign, number>>;

/** Days from a deed to the alarm; undefined where it was after it, or is no instant. */
const daysBefore = (at: number | undefined, from: number): number | undefined => {
  const days = at === undefined ? Number.NaN : (from - at) / DAY_MS;
  return Number.isFinite(days) && days >= 0 ? days : undefined;
};

/**
 * The signs around an alarm: what the readings showed, and whether lid, visit, filter, power or daylight saving came
 * shortly before it. A deed nobody knows of stays unknown, rather than absent.
 *
 * @example gatherSigns({ from: 10 * DAY_MS, lidOpened: { at: 8 * DAY_MS, by: 'Ana' } }) // { 'lid-opened': true }
 */
export function gatherSigns(around: AlarmSurroundings): Signs {
  const deeds: readonly (readonly [keyof typeof SPEAKS_FOR_DAYS, number | undefined])[] = [
    ['lid-opened', around.lidOpened?.at],
    ['our-visit', around.visit?.at],
    ['filter-cleaned', around.filterCleanedAt],
    ['power-cut', around.powerCutAt],
    ['clocks-shifted', around.clocksShiftedAt],
  ];
  const known = deeds.flatMap(([sign, at]) => {
    const days = daysBefore(at, around.from);
    return days === undefined ? [] : [[sign, days <= SPEAKS_FOR_DAYS[sign]] as const];
  });
  return { ...around.seen, ...Object.fromEntries(known) };
}

/** Who opened the lid last, where that was within a week before the alarm. */
export function findLidOpener(
  around: AlarmSurroundings,
): { readonly by: string; readonly at: number; readonly daysBefore: number } | undefined {
  const days = daysBefore(around.lidOpened?.at, around.from);
  if (around.lidOpened === undefined || days === undefined || days > SPEAKS_FOR_DAYS['lid-opened']) return undefined;
  return { ...around.lidOpened, daysBefore: days };
}
