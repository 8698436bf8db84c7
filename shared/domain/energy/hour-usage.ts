import { checkNumbers, type NumberFault } from '../refusal/check-number.ts';
import { accepted, type Outcome, type Refusal, refused } from '../refusal/refusal.ts';
import type { Run } from '../runs/run.ts';
import { isTurning, shareOfRun } from '../turnover/run-share.ts';
import { type LocalSlice, listLocalSlices, type SliceMinutes } from './local-slices.ts';

/** Energy in one wall-clock slice: what a tariff prices. Time in ms, energy in watt-hours, water in US gallons. */
export type HourUsage = LocalSlice & {
  readonly wattHours: number;
  readonly turningMs: number;
  readonly coveredMs: number;
  readonly gallons: number;
};

export type UsageFault = NumberFault | 'unknown-zone' | 'empty-stretch' | 'ends-before-it-starts';

const checkRun = (run: Run, index: number): Refusal<UsageFault>[] => {
  const faults: Refusal<UsageFault>[] = checkNumbers([
    [run.wattHours, { field: `runs[${index}].wattHours`, unit: 'Wh: a meter never reads negative', least: 0 }],
    [run.from, { field: `runs[${index}].from`, unit: 'ms' }],
    [run.to ?? run.from + 1, { field: `runs[${index}].to`, unit: 'ms' }],
  ]);
  if (faults.length === 0 && run.to !== undefined && run.to <= run.from)
    faults.push({ reason: 'ends-before-it-starts', field: `runs[${index}].to`, allowed: 'an instant after its from' });
  return faults;
};

function checkUsage(runs: readonly Run[], from: number, to: number): Refusal<UsageFault>[] {
  const faults: Refusal<UsageFault>[] = [];
  if (!(from < to) || !Number.isFinite(to - from))
    faults.push({ reason: 'empty-stretch', field: 'to', allowed: 'a finite instant (ms) after from' });
  return [...faults, ...runs.flatMap(checkRun)];
}

function addUp(runs: readonly Run[], slice: LocalSlice): HourUsage {
  let [wattHours, turningMs, coveredMs, gallons] = [0, 0, 0, 0];
  for (const run of runs) {
    const part = shareOfRun(run, slice.from, slice.to);
    if (part === undefined || run.source === 'no-data') continue;
    wattHours += run.wattHours * part.share;
    coveredMs += part.milliseconds;
    if (isTurning(run)) turningMs += part.milliseconds;
    if (run.gallons !== undefined && run.gallons > 0 && Number.isFinite(run.gallons))
      gallons += run.gallons * part.share;
  }
  return { ...slice, wattHours, turningMs, coveredMs, gallons };
}

/**
 * Spreads the energy and water of runs over the wall-clock hours (or 15 or 30 minutes) of a zone between two instants
 * (ms). A run is one settled speed, so it is spread evenly over its time; an open run is taken to last until `to`. The
 * runs come in order and do not overlap. Refuses, all at once: negative or endless energy, an unknown zone, no time.
 *
 * @example listHourUsage(runs, 'America/Phoenix', dayFrom, dayTo) // { ok: true, value: [24 hours] }
 */
export function listHourUsage(
  runs: readonly Run[],
  zone: string,
  from: number,
  to: number,
  minutes: SliceMinutes = 60,
): Outcome<readonly HourUsage[], UsageFault> {
  const faults = checkUsage(runs, from, to);
  if (faults.length > 0) return refused(faults);
  const slices = listLocalSlices(zone, from, to, minutes);
  if (slices.length === 0)
    return refused([{ reason: 'unknown-zone', field: 'zone', allowed: 'an IANA time zone, such as America/Phoenix' }]);
  let first = 0;
  const usage = slices.map((slice) => {
    while ((runs[first]?.to ?? to) <= slice.from && first < runs.length) first += 1;
    let last = first;
    while (last < runs.length && (runs[last]?.from ?? to) < slice.to) last += 1;
    return addUp(runs.slice(first, last), slice);
  });
  return accepted(usage);
}
