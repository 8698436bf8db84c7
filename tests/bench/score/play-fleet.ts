import type { AlarmLine } from '#server/backtest/alarm-lines.ts';
import { createBacktest } from '#server/backtest/backtest.ts';
import { readPadFile } from '#shared/contract/backtest/pad-file.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import { createDemoFleet, type DemoStory } from '#simulator/demo-fleet.ts';
import type { Arrival } from '#simulator/device/in-process-device.ts';
import type { Fleet } from '#simulator/fleet.ts';
import { generateHistory } from '#simulator/history.ts';
import { describePad } from '#simulator/score/pad-file.ts';
import { createScoreFleet, type ScoreOptions } from '#simulator/score/score-fleet.ts';
import { listStandingTruths } from '#simulator/score/standing-truth.ts';
import { createTruthBook, type TruthRow } from '#simulator/truth.ts';

export type Played = {
  readonly alarms: readonly AlarmLine[];
  readonly truth: readonly TruthRow[];
  readonly readings: number;
  readonly pumpMonths: number;
};

/** The largest latency of the simulated links, ms. */
const LATENCY_MS = 800;

function* eventsOf(arrival: Arrival): Generator<PumpEvent> {
  const receivedAt = arrival.at;
  if (arrival.kind === 'readings') {
    const single = arrival.readings.length === 1;
    for (const reading of arrival.readings) yield { kind: 'reading', reading, receivedAt, single };
  } else if (arrival.kind === 'status') yield { kind: 'status', receivedAt, status: arrival.status };
  else if (arrival.kind === 'settings') yield { kind: 'settings', receivedAt, settings: arrival.settings };
  else yield { kind: 'on-site', receivedAt, on: arrival.on };
}

type Play = { readonly fleet: Fleet; readonly to: number; readonly pads: readonly unknown[] };

function play({ fleet, to, pads }: Play): { readonly alarms: readonly AlarmLine[]; readonly readings: number } {
  const file = readPadFile(JSON.parse(JSON.stringify(pads)));
  if (file === undefined || file.faults.length > 0)
    throw new Error(`pads that cannot be read: ${JSON.stringify(file?.faults[0])}`);
  const backtest = createBacktest(file.pads);
  for (const arrival of generateHistory(fleet, { to, latencyMs: LATENCY_MS })) {
    for (const event of eventsOf(arrival)) backtest.take(arrival.serial, event);
  }
  return { alarms: backtest.end(), readings: backtest.count().readings };
}

/** Plays an invented fleet in process through the same fold that runs live. */
export function playFleet(options: ScoreOptions): Played {
  const { fleet, to, pads, truth, standing } = createScoreFleet(options);
  const played = play({ fleet, to, pads });
  return { ...played, truth: [...truth.rows(), ...standing], pumpMonths: (options.pumps * options.days) / 30 };
}

/** Plays the month that the demo begins with. */
export function playDemo(story: DemoStory): Played {
  const truth = createTruthBook();
  const fleet = createDemoFleet(story, truth);
  const pads = fleet.pumps.map(({ spec }) => describePad(spec, story.cadenceMs));
  const played = play({ fleet, to: story.to, pads });
  const standing = fleet.pumps.flatMap(({ spec }) => listStandingTruths(spec, story.from));
  return { ...played, truth: [...truth.rows(), ...standing], pumpMonths: fleet.pumps.length };
}
