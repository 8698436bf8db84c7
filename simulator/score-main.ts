import { createWriteStream, mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { finished } from 'node:stream/promises';
import { parseArgs } from 'node:util';
import { encodeArrival } from './arrival-line.ts';
import { generateHistory } from './history.ts';
import { createScoreFleet, type ScoreOptions } from './score/score-fleet.ts';
import { encodeTruth } from './truth.ts';
import { writeLines } from './write-lines.ts';

/*
 * Writes an invented fleet for scoring detection: pads.json and readings.ndjson in the backtest's formats, and
 * truth.ndjson, one fault a line (see truth.ts), into a folder:
 *   tsx simulator/score-main.ts --out <folder> [--seed score] [--pumps 60] [--days 40] [--each 2] [--cadence 20] [--from <ms>]
 * `--each 0` leaves ordinary life alone. The same arguments give the same bytes.
 */

const OPTIONS = {
  out: { type: 'string' },
  seed: { type: 'string', default: 'score' },
  pumps: { type: 'string', default: '60' },
  days: { type: 'string', default: '40' },
  each: { type: 'string', default: '2' },
  cadence: { type: 'string', default: '20' },
  from: { type: 'string', default: String(Date.UTC(2026, 9, 8)) },
} as const;

type ScoreArguments = ScoreOptions & { readonly out: string };

function readArguments(): ScoreArguments | string {
  try {
    const { values } = parseArgs({ options: OPTIONS });
    const number = (name: 'pumps' | 'days' | 'each' | 'cadence' | 'from', low: number, high: number): number => {
      const value = Number(values[name]);
      if (!(value >= low && value <= high)) throw new Error(`--${name} must be a number from ${low} to ${high}.`);
      return value;
    };
    if (values.out === undefined) return '--out names the folder to write into.';
    return {
      out: values.out,
      seed: values.seed,
      pumps: number('pumps', 1, 5000),
      days: number('days', 1, 400),
      each: number('each', 0, 100),
      cadenceMs: number('cadence', 5, 60) * 1000,
      from: number('from', 0, 4e12),
    };
  } catch (error) {
    return error instanceof Error ? error.message : String(error);
  }
}

async function main(): Promise<void> {
  const options = readArguments();
  if (typeof options === 'string') {
    process.stderr.write(`${options}\n`);
    process.exitCode = 2;
    return;
  }
  const { fleet, to, pads, truth, standing } = createScoreFleet(options);
  mkdirSync(options.out, { recursive: true });
  writeFileSync(join(options.out, 'pads.json'), `${JSON.stringify(pads, null, 1)}\n`);
  const file = createWriteStream(join(options.out, 'readings.ndjson'));
  await writeLines(file, encodeAll(generateHistory(fleet, { to, latencyMs: 0 })));
  file.end();
  await finished(file);
  writeFileSync(join(options.out, 'truth.ndjson'), encodeTruth([...standing, ...truth.rows()]));
}

function* encodeAll(arrivals: ReturnType<typeof generateHistory>): Generator<string, void> {
  for (const arrival of arrivals) yield encodeArrival(arrival);
}

await main();
