import { encodeArrival } from '#simulator/arrival-line.ts';
import { createDemoFleet } from '#simulator/demo-fleet.ts';
import { fastForward } from '#simulator/fleet.ts';
import { generateHistory } from '#simulator/history.ts';

/*
 * How fast the demo's month of history is made, as lines of a readings file, and how fast the live fleet comes through
 * the same month unwatched. Counted in processor time. Run: npx tsx tests/bench/history-speed.ts [days]
 */
const DAY_MS = 86_400_000;
const days = Number(process.argv[2] ?? 30);
const to = Date.UTC(2026, 8, 14);
const story = { seed: 'larkmoor', from: to - days * DAY_MS, to, cadenceMs: 60_000 };

function seconds(work: () => void): number {
  const before = process.cpuUsage();
  work();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

let readings = 0;
let bytes = 0;
const history = seconds(() => {
  for (const arrival of generateHistory(createDemoFleet(story), { to, latencyMs: 0 })) {
    if (arrival.kind === 'readings') readings += arrival.readings.length;
    bytes += encodeArrival(arrival).length;
  }
});
const forward = seconds(() => fastForward(createDemoFleet(story), to));

process.stdout.write(
  `${days} days of history: ${readings} readings, ${Math.round(bytes / 1e6)} MB in ${history.toFixed(1)} s, ${Math.round(readings / history)} readings/s\n` +
    `the same unwatched: ${forward.toFixed(1)} s\n`,
);
