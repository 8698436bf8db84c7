import { createFleet, type Fleet } from '#simulator/fleet.ts';
import { liveOrdinarily } from '#simulator/ordinary/live-ordinarily.ts';
import { createTruthBook, type TruthBook, type TruthRow } from '#simulator/truth.ts';
import { inventPump } from './invent-pump.ts';
import { describePad } from './pad-file.ts';
import { planFaults } from './plan-faults.ts';
import { listStandingTruths } from './standing-truth.ts';

export type ScoreOptions = {
  readonly seed: string;
  readonly pumps: number;
  readonly from: number;
  readonly days: number;
  readonly cadenceMs: number;
  /** How often every fault is tried; 0 = a healthy fleet with its ordinary life alone. */
  readonly each: number;
};

export type ScoreFleet = {
  readonly fleet: Fleet;
  readonly to: number;
  /** Elements of the pads file. */
  readonly pads: readonly Record<string, unknown>[];
  /** Filled while the fleet is played. */
  readonly truth: TruthBook;
  /** What is wrong from the first day on, by what was commissioned. */
  readonly standing: readonly TruthRow[];
};

/** Part of the pumps on which nothing ever goes wrong, so that false alarms have somewhere to show. */
const HEALTHY_SHARE = 0.35;

/** Invents a fleet over several zones with faults and ordinary life, all from the seed. */
export function createScoreFleet(options: ScoreOptions): ScoreFleet {
  const { seed, from, cadenceMs } = options;
  const specs = Array.from({ length: options.pumps }, (_, index) => inventPump(seed, index));
  const fleet = createFleet(specs, { seed, from, cadenceMs });
  const to = from + options.days * 86_400_000;
  const truth = createTruthBook();
  for (const pump of fleet.pumps) liveOrdinarily(pump, seed, from);
  planFaults(fleet, { seed, from, to, each: options.each, healthyShare: HEALTHY_SHARE }, truth);
  const pads = specs.map((spec) => describePad(spec, cadenceMs));
  return { fleet, to, pads, truth, standing: specs.flatMap((spec) => listStandingTruths(spec, from)) };
}
