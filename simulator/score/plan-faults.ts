import { FAULTS } from '#simulator/faults/catalogue.ts';
import { DAY_MS, type Fault, HOUR_MS } from '#simulator/faults/fault.ts';
import type { Fleet } from '#simulator/fleet.ts';
import type { Pump } from '#simulator/pump.ts';
import { createRandom, type Random } from '#simulator/random.ts';
import { scheduleFault } from '#simulator/schedule-fault.ts';
import type { TruthBook } from '#simulator/truth.ts';

export type PlanOptions = {
  readonly seed: string;
  readonly from: number;
  readonly to: number;
  /** Every fault is tried so often. */
  readonly each: number;
  /** Share of the pumps that stay well. */
  readonly healthyShare: number;
};

/** A detector has this long to learn a pad before anything goes wrong, and this long to settle afterwards. */
const LEARN_MS = 8 * DAY_MS;
const SETTLE_MS = 4 * DAY_MS;

/** Deals faults out over a fleet: one at a time on a pump, with time to learn before and to settle after. */
export function planFaults(fleet: Fleet, options: PlanOptions, truth: TruthBook): void {
  const random = createRandom(`${options.seed}/plan`);
  const sick = fleet.pumps.filter(() => !random.chance(options.healthyShare));
  const freeFrom = new Map<Pump, number>(sick.map((pump) => [pump, options.from + LEARN_MS]));
  for (const fault of shuffle(Array.from({ length: options.each }, () => FAULTS).flat(), random)) {
    const durationMs = random.between(...fault.hours) * HOUR_MS;
    for (const pump of shuffle(sick, random)) {
      const from = findStart(pump, fault, freeFrom.get(pump) ?? 0, random);
      if (!fault.suits(pump.spec) || from === undefined || from + durationMs > options.to - DAY_MS / 2) continue;
      scheduleFault(pump, fault, from, from + durationMs, truth);
      freeFrom.set(pump, from + durationMs + SETTLE_MS);
      break;
    }
  }
}

/** When the fault could begin on this pump; those about daylight saving only in the day before the clocks change. */
function findStart(pump: Pump, fault: Fault, free: number, random: Random): number | undefined {
  const start = free + random.between(0, 2) * DAY_MS;
  if (fault.cause !== 'daylight-saving') return start;
  const change = pump.zone.nextChangeAfter(free);
  return Number.isFinite(change) && change - free < 60 * DAY_MS ? change - random.between(4, 20) * HOUR_MS : undefined;
}

function shuffle<T>(list: readonly T[], random: Random): T[] {
  return list
    .map((item) => ({ item, key: random.next() }))
    .sort((a, b) => a.key - b.key)
    .map(({ item }) => item);
}
