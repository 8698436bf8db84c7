import { createFleet, type Fleet } from './fleet.ts';
import { listLarkmoorPumps } from './larkmoor.ts';
import { liveOrdinarily } from './ordinary/live-ordinarily.ts';
import { LARKMOOR_MONTH } from './scenarios/larkmoor-month.ts';
import { playHistory } from './scenarios/scenario.ts';
import type { TruthBook } from './truth.ts';

export type DemoStory = {
  readonly seed: string;
  /** Beginning and end of the month before the demo, ms. */
  readonly from: number;
  readonly to: number;
  readonly cadenceMs: number;
  /** How many of the pumps, the first of the list; all without it. */
  readonly pumps?: number;
};

/** The demo company's fleet at the beginning of its month, with everything that will happen in it. */
export function createDemoFleet(story: DemoStory, truth?: TruthBook): Fleet {
  const { seed, from, cadenceMs } = story;
  const fleet = createFleet(listLarkmoorPumps().slice(0, story.pumps), { seed, from, cadenceMs });
  for (const pump of fleet.pumps) liveOrdinarily(pump, seed, from);
  playHistory(fleet, LARKMOOR_MONTH, story.to, truth);
  return fleet;
}
