import { createReadStream, createWriteStream, type ReadStream } from 'node:fs';
import { readFile } from 'node:fs/promises';
import type { Writable } from 'node:stream';
import { finished } from 'node:stream/promises';
import { parseArgs } from 'node:util';
import { readPadFile } from '#shared/contract/backtest/pad-file.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { AlarmLine } from './alarm-lines.ts';
import { type Backtest, createBacktest } from './backtest.ts';
import { parseLine } from './parse-line.ts';
import { readLines } from './read-lines.ts';

const USAGE = 'npm run backtest -- --pads pads.json --readings readings.ndjson [--out alarms.ndjson]';

/** Every bad line is counted; so many are named each by its number, more are of another kind of file. */
const NAMED_FAULTS = 10_000;

/** Unusable arguments: one clear line, exit code 2. */
class UnusableArguments extends Error {}

const say = (text: string): void => void process.stderr.write(`${text}\n`);

function readArguments(): { pads: string; readings: string; out: string | undefined } {
  try {
    const { values } = parseArgs({
      options: { pads: { type: 'string' }, readings: { type: 'string' }, out: { type: 'string' } },
    });
    if (values.pads === undefined || values.readings === undefined)
      throw new Error('--pads and --readings are both needed');
    return { pads: values.pads, readings: values.readings, out: values.out };
  } catch (error) {
    throw new UnusableArguments(`${wordsOf(error)}. Usage: ${USAGE}`);
  }
}

const wordsOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

async function readPads(path: string): Promise<readonly PumpContext[]> {
  const text = await readFile(path, 'utf8').catch((error: unknown) => {
    throw new UnusableArguments(`Cannot read the pads: ${wordsOf(error)}`);
  });
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (error) {
    throw new UnusableArguments(`${path} is not JSON: ${wordsOf(error)}`);
  }
  const file = readPadFile(value);
  if (file === undefined) throw new UnusableArguments(`${path} wants an array of pads`);
  for (const fault of file.faults)
    say(`pad ${fault.index + 1}${fault.serial === undefined ? '' : ` (${fault.serial})`} skipped: ${fault.message}`);
  return file.pads;
}

async function openReadings(path: string): Promise<ReadStream> {
  const stream = createReadStream(path, { highWaterMark: 1 << 20 });
  await new Promise<void>((resolve, reject) => {
    stream.once('open', () => resolve());
    stream.once('error', (error) => reject(new UnusableArguments(`Cannot read the readings: ${error.message}`)));
  });
  return stream;
}

async function openOutput(path: string | undefined): Promise<Writable> {
  if (path === undefined) return process.stdout;
  const stream = createWriteStream(path);
  await new Promise<void>((resolve, reject) => {
    stream.once('open', () => resolve());
    stream.once('error', (error) => reject(new UnusableArguments(`Cannot write the alarms: ${error.message}`)));
  });
  return stream;
}

async function write(output: Writable, lines: readonly AlarmLine[]): Promise<void> {
  for (const line of lines) {
    if (!output.write(`${JSON.stringify(line)}\n`)) await new Promise((resolve) => output.once('drain', resolve));
  }
}

function takeLine(backtest: Backtest, text: string, count: { lines: number; faults: number }): void {
  count.lines += 1;
  if (text.trim() === '') return;
  const line = parseLine(text);
  const reason = line.kind === 'event' ? backtest.take(line.serial, line.event) : line.reason;
  if (reason === undefined) return;
  count.faults += 1;
  if (count.faults <= NAMED_FAULTS) say(`line ${count.lines} skipped: ${reason}`);
}

async function run(): Promise<void> {
  const files = readArguments();
  const backtest = createBacktest(await readPads(files.pads));
  const readings = await openReadings(files.readings);
  const output = await openOutput(files.out);
  const count = { lines: 0, faults: 0 };
  for await (const lines of readLines(readings)) {
    for (const text of lines) takeLine(backtest, text, count);
    await write(output, backtest.settled());
  }
  await write(output, backtest.end());
  if (output !== process.stdout) await finished(output.end());
  summarise(count.lines, count.faults, backtest.count());
}

function summarise(lines: number, faults: number, count: ReturnType<Backtest['count']>): void {
  for (const [serial, times] of count.unknownSerials) say(`${times} lines skipped: no pad has serial ${serial}`);
  say(`${lines} lines, ${count.readings} readings folded, ${count.late} late, ${faults} bad lines.`);
}

run().catch((error: unknown) => {
  say(wordsOf(error));
  process.exitCode = error instanceof UnusableArguments ? 2 : 1;
});
