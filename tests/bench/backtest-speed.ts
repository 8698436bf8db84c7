import { type ChildProcess, execFileSync, spawn } from 'node:child_process';
import { once } from 'node:events';
import { createWriteStream, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { backtestLines, backtestPads } from './backtest-load.ts';
import type { Bench } from './bench.ts';

const READINGS = 5_000_000;
const PADS = 50;
/** Ticks of processor time a second in /proc, on every Linux that Node runs on. */
const TICKS = 100;
const LOOK_EVERY_MS = 200;
const MEGABYTE = 1 << 20;

type Look = { readonly fed: number; readonly seconds: number; readonly bytes: number };

/** The processor time and memory of a running child; undefined once it has ended. */
function lookAt({ pid }: ChildProcess, fed: number): Look | undefined {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    const pages = Number(readFileSync(`/proc/${pid}/statm`, 'utf8').split(' ')[1]);
    return { fed, seconds: (Number(fields[11]) + Number(fields[12])) / TICKS, bytes: pages * 4096 };
  } catch {
    return undefined;
  }
}

/** Writes everything into the pipe that the command reads as its file; a command that ends early ends this too. */
async function feed(pipe: string, ended: Promise<unknown>, onFed: (lines: number) => void): Promise<void> {
  const stream = createWriteStream(pipe);
  const broken = Promise.race([ended, once(stream, 'error')]);
  let open = true;
  void broken.then(() => {
    open = false;
  });
  for (const { text, count } of backtestLines(PADS, READINGS)) {
    if (!open) return;
    onFed(count);
    if (!stream.write(text)) await Promise.race([once(stream, 'drain'), broken]);
  }
  stream.end();
}

/** Feeds the command as a user runs it and looks at it meanwhile. */
async function runBacktest(folder: string): Promise<readonly Look[]> {
  const [pads, pipe] = [join(folder, 'pads.json'), join(folder, 'readings')];
  writeFileSync(pads, JSON.stringify(backtestPads(PADS)));
  execFileSync('mkfifo', [pipe]);
  const command = ['--import', 'tsx', 'server/backtest/backtest-command.ts', '--pads', pads, '--readings', pipe];
  const child = spawn(process.execPath, [...command, '--out', '/dev/null'], { stdio: ['ignore', 'ignore', 'pipe'] });
  let said = '';
  child.stderr.setEncoding('utf8').on('data', (text: string) => {
    said += text;
  });
  let fed = 0;
  const looks: Look[] = [];
  const timer = setInterval(() => {
    const look = lookAt(child, fed);
    if (look !== undefined && look.bytes > 0) looks.push(look);
  }, LOOK_EVERY_MS);
  const ended = once(child, 'exit');
  await feed(pipe, ended, (count) => {
    fed += count;
  });
  const [code] = await ended;
  clearInterval(timer);
  if (code !== 0) throw new Error(`the backtest ended with ${code}: ${said}`);
  return looks;
}

const highest = (looks: readonly Look[]): number => Math.max(...looks.map(({ bytes }) => bytes));

/**
 * The whole way of a backtest, reading, decoding, folding and writing, in processor time so that other work on the
 * machine does not count; and whether its memory grows with the file.
 */
export const backtestSpeed: Bench = {
  name: 'backtest',
  about: 'five million readings through the backtest command',
  run: async () => {
    const folder = mkdtempSync(join(tmpdir(), 'millrace-backtest-'));
    const looks = await runBacktest(folder).finally(() => rmSync(folder, { recursive: true, force: true }));
    const seconds = looks.at(-1)?.seconds ?? Number.NaN;
    const early = looks.filter(({ fed }) => fed > 0.2 * READINGS && fed <= 0.5 * READINGS);
    const late = looks.filter(({ fed }) => fed > 0.7 * READINGS);
    return [
      { name: 'backtest end to end', value: READINGS / seconds, unit: 'readings/s', atLeast: 120_000 },
      { name: 'backtest memory', value: highest(looks) / MEGABYTE, unit: 'MB' },
      { name: 'backtest memory growth', value: (highest(late) - highest(early)) / MEGABYTE, unit: 'MB', atMost: 40 },
    ];
  },
};
