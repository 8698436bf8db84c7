import type { Dial } from './dial.ts';
import { planWeek, readWeekPlan, type WeekPlan } from './week-plan.ts';

export type ClockType = 'synchronous' | 'spring-carry-over' | 'battery-carry-over' | 'electronic';

/** On and off trippers, and how much before the off tripper the switch opens. */
export type Trippers = {
  readonly days: readonly boolean[];
  readonly onMinute: number;
  readonly offMinute: number;
  readonly opensEarlyMinutes: number;
};

/** A pool time clock with a low-voltage switch. */
export type TimeClock = {
  readonly type: ClockType;
  /** Whether a cut at the motor's circuit stops it too. */
  readonly circuit: 'motor' | 'own';
  readonly dial: Dial;
  plan: WeekPlan;
};

const HOUR_MS = 3_600_000;
/** Common practice: a wound spring bridges most of a day, a battery about a week. */
const CARRY_OVER_MS: Record<ClockType, number> = {
  synchronous: 0,
  'spring-carry-over': 16 * HOUR_MS,
  'battery-carry-over': 170 * HOUR_MS,
  electronic: 170 * HOUR_MS,
};

/** Builds a clock that reads right at `at` for an offset from UTC. */
export function createTimeClock(
  type: ClockType,
  circuit: 'motor' | 'own',
  trippers: readonly Trippers[],
  offsetMs: number,
  at: number,
): TimeClock {
  const dial: Dial = {
    offsetMs,
    setAt: at,
    driftMsPerDay: 0,
    knowsDaylightSaving: type === 'electronic',
    carryOverMs: CARRY_OVER_MS[type],
    standsAtMs: undefined,
  };
  return { type, circuit, dial, plan: planTrippers(trippers) };
}

/** The contact closes at the on tripper and opens early by the switch's own minutes. */
export function planTrippers(trippers: readonly Trippers[]): WeekPlan {
  return planWeek(
    trippers.map(({ days, onMinute, offMinute, opensEarlyMinutes }) => ({
      days,
      fromMinute: onMinute,
      toMinute: (offMinute - opensEarlyMinutes + 1440) % 1440,
    })),
  );
}

/** Whether the contact is closed, and when it next moves. */
export function readTimeClock(clock: TimeClock, at: number): { readonly closed: boolean; readonly until: number } {
  const { on, until } = readWeekPlan(clock.plan, clock.dial, at);
  return { closed: on.length > 0, until };
}
