import { writeFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { encodeArrival } from './arrival-line.ts';
import { createDemoFleet } from './demo-fleet.ts';
import { generateHistory } from './history.ts';
import { describePad } from './score/pad-file.ts';
import { listStandingTruths } from './score/standing-truth.ts';
import { writeStoryMark } from './story-mark.ts';
import { createTruthBook, encodeTruth } from './truth.ts';
import { writeLines } from './write-lines.ts';

/*
 * Writes the demo company's history to standard output, one JSON object a line in order of arrival, in the format of
 * a backtest's readings file:
 *   tsx simulator/history-main.ts --to <ms> [--days 30] [--cadence 60] [--seed larkmoor]
 *     [--mark <file>] [--pads <file>] [--truth <file>]
 * The same arguments give the same bytes. `--mark` names the file that tells the live fleet where the story stands,
 * `--pads` that of the backtest's pads file, `--truth` that of the truth, one fault a line (see truth.ts).
 */

const DAY_MS = 86_400_000;

type HistoryArguments = {
  readonly seed: string;
  readonly days: number;
  readonly to: number;
  readonly cadenceSeconds: number;
  readonly mark: string | undefined;
  readonly pads: string | undefined;
  readonly truth: string | undefined;
};

const OPTIONS = {
  seed: { type: 'string', default: 'larkmoor' },
  days: { type: 'string', default: '30' },
  to: { type: 'string' },
  cadence: { type: 'string', default: '60' },
  mark: { type: 'string' },
  pads: { type: 'string' },
  truth: { type: 'string' },
} as const;

/** The arguments, or one sentence about what is wrong with them. */
function readArguments(): HistoryArguments | string {
  const values = parseValues();
  if (typeof values === 'string') return values;
  const days = Number(values.days);
  const to = Number(values.to);
  const cadenceSeconds = Number(values.cadence);
  if (values.to === undefined || !Number.isSafeInteger(to)) return '--to must be an instant in ms since 1970.';
  if (!(days > 0 && days <= 400)) return '--days must be above 0 and at most 400.';
  if (!(cadenceSeconds >= 5 && cadenceSeconds <= 600)) return '--cadence must be 5 to 600 seconds.';
  const { mark, pads, truth } = values;
  return { seed: values.seed, days, to, cadenceSeconds, mark, pads, truth };
}

function parseValues() {
  try {
    return parseArgs({ options: OPTIONS }).values;
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
  const { seed, to } = options;
  const cadenceMs = options.cadenceSeconds * 1000;
  const truth = createTruthBook();
  const from = to - Math.round(options.days * DAY_MS);
  const fleet = createDemoFleet({ seed, from, to, cadenceMs }, truth);
  if (options.pads !== undefined) {
    const pads = fleet.pumps.map(({ spec }) => describePad(spec, cadenceMs));
    writeFileSync(options.pads, `${JSON.stringify(pads, null, 1)}\n`);
  }
  await writeLines(process.stdout, encodeAll(generateHistory(fleet, { to, latencyMs: 0 })));
  if (options.truth !== undefined) {
    const standing = fleet.pumps.flatMap(({ spec }) => listStandingTruths(spec, from));
    writeFileSync(options.truth, encodeTruth([...standing, ...truth.rows()]));
  }
  if (options.mark !== undefined) writeStoryMark(options.mark, { seed, from, to, until: to });
}

function* encodeAll(arrivals: ReturnType<typeof generateHistory>): Generator<string, void> {
  for (const arrival of arrivals) yield encodeArrival(arrival);
}

await main();
