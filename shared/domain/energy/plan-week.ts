import type { MotorSettings, MotorTraits } from '../control/motor-settings.ts';
import { type PlannedRun, plan } from '../control/plan.ts';
import type { InputWindow } from '../control/window-spans.ts';
import { DAY_MS } from '../time/local-time.ts';

/** A week without a shift of clocks, Monday first: the wall time of any ordinary week. */
export const ORDINARY_WEEK = { zone: 'UTC', from: 4 * DAY_MS, to: 11 * DAY_MS } as const;

/**
 * The runs of an ordinary week (Monday first, in wall time) under a motor's settings and its clocks' windows, primes at
 * every start and closed inputs over the program included. A motor clock that is off is not: it is put right first.
 *
 * @example planWeek(settings, traits, []) // [{ from: 345600000, source: 'program', rpm: 1700, … }]
 */
export const planWeek = (settings: MotorSettings, traits: MotorTraits, windows: readonly InputWindow[]): PlannedRun[] =>
  plan(
    settings,
    traits,
    { zone: ORDINARY_WEEK.zone, motorClockOffsetMinutes: 0 },
    ORDINARY_WEEK.from,
    ORDINARY_WEEK.to,
    windows,
  );
