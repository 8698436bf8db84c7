import { parseArgs } from 'node:util';
import { backtestSpeed } from './backtest-speed.ts';
import { type Bench, type Figure, keepsLimit } from './bench.ts';
import { type BenchPostgres, startBenchPostgres } from './bench-database.ts';
import { clientBytes } from './client-bytes.ts';
import { connectedDevices } from './connected-devices.ts';
import { energyAnswers } from './energy-answers.ts';
import { flowMeter } from './flow-meter.ts';
import { foldLag } from './fold-lag.ts';
import { foldRate } from './fold-rate.ts';
import { formatTable } from './format-table.ts';
import { ingestForty, ingestOne } from './ingest-ratio.ts';
import { publishToPixel } from './publish-to-pixel.ts';
import { socketLatency } from './socket-latency.ts';

/** `npm run bench [-- --only name]`: a table to standard error, JSON to standard output, 1 when a limit is missed. */
const BENCHES: readonly Bench[] = [
  clientBytes,
  foldRate,
  backtestSpeed,
  flowMeter,
  energyAnswers,
  ingestOne,
  ingestForty,
  foldLag,
  socketLatency,
  publishToPixel,
  connectedDevices,
];

const { values } = parseArgs({ options: { only: { type: 'string', multiple: true } } });
const wanted = values.only;
const unknown = wanted?.find((name) => !BENCHES.some((bench) => bench.name === name));
if (unknown !== undefined) {
  process.stderr.write(`There is no bench "${unknown}". There are: ${BENCHES.map(({ name }) => name).join(', ')}.\n`);
  process.exit(2);
}

let starting: Promise<BenchPostgres> | undefined;
const tools = {
  postgres: () => {
    starting ??= startBenchPostgres();
    return starting;
  },
  say: (text: string) => process.stderr.write(`${text}\n`),
};

const figures: (Figure & { readonly bench: string })[] = [];
const failures: string[] = [];
try {
  for (const bench of BENCHES) {
    if (wanted !== undefined && !wanted.includes(bench.name)) continue;
    tools.say(`${bench.name}: ${bench.about}`);
    try {
      for (const figure of await bench.run(tools)) figures.push({ bench: bench.name, ...figure });
    } catch (error) {
      failures.push(`${bench.name}: ${error instanceof Error ? error.message : String(error)}`);
    }
  }
} finally {
  await (await starting)?.own.dispose();
}
const missed = figures.filter((figure) => !keepsLimit(figure));
tools.say(`\n${formatTable(figures)}`);
for (const failure of failures) tools.say(`failed: ${failure}`);
process.stdout.write(`${JSON.stringify({ figures, missed: missed.map(({ name }) => name), failures }, null, 2)}\n`);
process.exitCode = missed.length + failures.length > 0 ? 1 : 0;
