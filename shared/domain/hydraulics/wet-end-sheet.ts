import type { WetEndPoint } from '../control/pump-context.ts';
import { checkNumber, checkNumbers, type NumberFault } from '../refusal/check-number.ts';
import type { Refusal } from '../refusal/refusal.ts';
import { hydraulicWatts } from './hydraulic-power.ts';

/** A measured point at another speed than the reference, to fit what drive and motor lose there. */
export type LowSpeedPoint = { readonly rpm: number; readonly gpm: number; readonly watts: number };

/** What is known of a wet end with its motor: points at one reference speed, watts at the line terminals. */
export type WetEndSheet = {
  readonly referenceRpm: number;
  readonly points: readonly WetEndPoint[];
  readonly standbyWatts: number;
  readonly lowSpeedPoints?: readonly LowSpeedPoint[] | undefined;
};

export type SheetFault =
  | NumberFault
  | 'fewer-than-four-points'
  | 'duplicate-flow'
  | 'head-rises'
  | 'watts-under-standby'
  | 'more-water-power-than-watts'
  | 'speed-above-reference';

/** A head may stand above the one before it by this share of the largest: reading a printed curve is no better. */
const HEAD_RISE_SHARE = 0.01;
const FEWEST_POINTS = 4;

const pointFaults = (point: WetEndPoint, index: number, standbyWatts: number): Refusal<SheetFault>[] => {
  const field = (name: string): string => `points[${index}].${name}`;
  const faults: Refusal<SheetFault>[] = checkNumbers([
    [point.gpm, { field: field('gpm'), unit: 'gpm', least: 0, most: 2000 }],
    [point.feet, { field: field('feet'), unit: 'ft', least: 0, most: 1000 }],
    [point.watts, { field: field('watts'), unit: 'W', above: 0, most: 100_000 }],
  ]);
  if (faults.length > 0) return faults;
  if (point.watts <= standbyWatts)
    faults.push({
      reason: 'watts-under-standby',
      field: field('watts'),
      allowed: `more than the standby watts (${standbyWatts} W): the motor turns at this point`,
    });
  const water = hydraulicWatts(point.gpm, point.feet) ?? 0;
  if (water > point.watts)
    faults.push({
      reason: 'more-water-power-than-watts',
      field: field('watts'),
      allowed: `at least ${Math.ceil(water)} W, the power that the water itself takes at this flow and head`,
    });
  return faults;
};

const orderFaults = (points: readonly WetEndPoint[]): Refusal<SheetFault>[] => {
  const order = points.map((point, index) => ({ ...point, index })).sort((a, b) => a.gpm - b.gpm);
  const tolerance = HEAD_RISE_SHARE * Math.max(...points.map((point) => point.feet));
  return order.flatMap((point, place): Refusal<SheetFault>[] => {
    const before = order[place - 1];
    if (before === undefined) return [];
    if (before.gpm === point.gpm)
      return [{ reason: 'duplicate-flow', field: `points[${point.index}].gpm`, allowed: 'each flow once' }];
    if (point.feet <= before.feet + tolerance) return [];
    const allowed = `at most the head at ${before.gpm} gpm (${before.feet} ft): head falls as flow rises, from shut-off on`;
    return [{ reason: 'head-rises', field: `points[${point.index}].feet`, allowed }];
  });
};

const lowSpeedFaults = (sheet: WetEndSheet): Refusal<SheetFault>[] =>
  (sheet.lowSpeedPoints ?? []).flatMap((point, index) => {
    const field = (name: string): string => `lowSpeedPoints[${index}].${name}`;
    const faults: Refusal<SheetFault>[] = checkNumbers([
      [point.rpm, { field: field('rpm'), unit: 'rpm', above: 0 }],
      [point.gpm, { field: field('gpm'), unit: 'gpm', least: 0, most: 2000 }],
      [point.watts, { field: field('watts'), unit: 'W', above: sheet.standbyWatts, most: 100_000 }],
    ]);
    if (faults.length === 0 && point.rpm >= sheet.referenceRpm) {
      const allowed = `under the reference speed (${sheet.referenceRpm} rpm)`;
      faults.push({ reason: 'speed-above-reference', field: field('rpm'), allowed });
    }
    return faults;
  });

/**
 * Every fault of a wet-end sheet, each with its field and what is allowed there: none means it can be fitted. Speeds
 * in rpm (300 to 4000), flows in gpm, heads in feet, watts at the line terminals.
 *
 * @example checkSheet({ referenceRpm: 3450, points: [], standbyWatts: 8 })[0]?.reason // 'fewer-than-four-points'
 */
export function checkSheet(sheet: WetEndSheet): Refusal<SheetFault>[] {
  const faults: Refusal<SheetFault>[] = [
    ...checkNumber(sheet.referenceRpm, { field: 'referenceRpm', unit: 'rpm', least: 300, most: 4000 }),
    ...checkNumber(sheet.standbyWatts, { field: 'standbyWatts', unit: 'W', least: 0, most: 200 }),
  ];
  if (sheet.points.length < FEWEST_POINTS)
    faults.push({
      reason: 'fewer-than-four-points',
      field: 'points',
      allowed: 'at least four points of flow, head and watts, best from shut-off to the last flow',
    });
  faults.push(...sheet.points.flatMap((point, index) => pointFaults(point, index, sheet.standbyWatts)));
  if (faults.length === 0) faults.push(...orderFaults(sheet.points), ...lowSpeedFaults(sheet));
  return faults;
}
