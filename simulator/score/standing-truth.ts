import { dutyGpm } from '#simulator/physics/duty-point.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import type { TruthRow } from '#simulator/truth.ts';

/** A pump with a little dirt in filter and basket, as on most days. */
const USUAL = { valve: 1, dirt: 1.1, staticFeet: 0 };
/** A program that moves less than the target by this factor is short, whatever the inputs add. */
const CLEARLY_SHORT = 1.3;

/** Gallons a day that the program alone moves on a day on which all of its entries run. */
export function programGallons(spec: Pick<PumpSpec, 'wetEnd' | 'system' | 'settings'>): number {
  return spec.settings.program.reduce((sum, { fromMinute, toMinute, rpm, days }) => {
    const minutes = (toMinute - fromMinute + 1440) % 1440 || 1440;
    const share = days.filter(Boolean).length / 7;
    return sum + minutes * share * dutyGpm(spec.wetEnd, spec.system, USUAL, rpm);
  }, 0);
}

/** What is wrong with a pad from the first day on, by what was commissioned: a program too short for its pool. */
export function listStandingTruths(spec: PumpSpec, from: number): TruthRow[] {
  const { poolGallons, turnoversPerDay } = spec.paper;
  if (poolGallons === undefined || turnoversPerDay === undefined) return [];
  if (programGallons(spec) * CLEARLY_SHORT > poolGallons * turnoversPerDay) return [];
  return [
    {
      s: spec.serial,
      fault: 'short-hours',
      detector: 'too-little-water',
      cause: 'short-hours',
      from,
      to: null,
      required: true,
      also: [],
      begunAt: from,
      endedAt: null,
    },
  ];
}
