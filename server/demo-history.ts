import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type pg from 'pg';
import { readLines } from './backtest/read-lines.ts';
import { listCommissionedPumps } from './db/commissioned-pumps.ts';
import { RAW_RETENTION_DAYS } from './db/reading-partitions.ts';
import { asMachine } from './db/transaction.ts';
import { foldHistory } from './fold/history/fold-history.ts';
import { rollUpWaiting } from './rollup/roll-up-waiting.ts';

/** Where the simulated fleet reads how far its story has been told. */
const STORY_FILE = 'demo-story.json';
/** Sparse enough for a quick first start, dense enough for every rule. */
const CADENCE_SECONDS = 60;
const DAY_MS = 86_400_000;
const PROJECT = fileURLToPath(new URL('../', import.meta.url));

export type DemoHistoryOptions = {
  readonly machine: pg.Pool;
  readonly dataFolder: string;
  readonly days: number;
  readonly now: number;
  readonly onProgress: (text: string) => void;
};

/**
 * Gives the demo company the past that its simulated fleet tells, unless it has one: all of it or, after a crash,
 * none, so that the next start tells it again. The story comes from a program of its own; the server never imports
 * the simulator.
 */
export async function tellDemoHistory(options: DemoHistoryOptions): Promise<boolean> {
  const isTold = await foldStory(options);
  // Also after a start that was broken off between the two: then there is a history that was never rolled up.
  await rollUpHistory(options);
  return isTold;
}

async function rollUpHistory({ machine, now, onProgress }: DemoHistoryOptions): Promise<void> {
  const options = { pool: machine, now: () => now, rawDays: RAW_RETENTION_DAYS, freshMs: 10_000 * DAY_MS };
  const startedAt = performance.now();
  const { pumps, failed } = await rollUpWaiting(options);
  const [first] = failed;
  if (first !== undefined) throw first.err;
  const seconds = Math.round((performance.now() - startedAt) / 1000);
  if (pumps > 0) onProgress(`Energy and water of ${pumps} pumps rolled up in ${seconds} s`);
}

function foldStory({ machine, dataFolder, days, now, onProgress }: DemoHistoryOptions): Promise<boolean> {
  return asMachine(machine, async (db, client) => {
    const { rows } = await client.query<{ told: boolean }>(
      'select exists (select from pump_states where cursor > 0) as told',
    );
    if (days === 0 || rows[0]?.told === true) return false;
    const startedAt = performance.now();
    onProgress(`Telling ${days} days of the demo’s history`);
    const pumps = await listCommissionedPumps(db);
    const story = startStory(dataFolder, days, now);
    const lines = readLines(story.stdout);
    const from = now - days * DAY_MS;
    const count = await foldHistory({
      client,
      pumps,
      lines,
      from,
      to: now,
      cadenceSeconds: CADENCE_SECONDS,
      onProgress,
    });
    await story.ended;
    const seconds = Math.round((performance.now() - startedAt) / 1000);
    onProgress(`${count.toLocaleString('en-US')} readings of ${days} days folded in ${seconds} s`);
    return true;
  });
}

function startStory(dataFolder: string, days: number, to: number) {
  const options = ['--to', `${to}`, '--days', `${days}`, '--cadence', `${CADENCE_SECONDS}`];
  const script = ['--import', 'tsx', 'simulator/history-main.ts', ...options, '--mark', join(dataFolder, STORY_FILE)];
  const child = spawn(process.execPath, script, { cwd: PROJECT, stdio: ['ignore', 'pipe', 'pipe'] });
  let lastWords = '';
  child.stderr.on('data', (data: Buffer) => {
    lastWords = `${lastWords}${data.toString()}`.slice(-500);
  });
  const ended = once(child, 'close').then(([code]) => {
    if (code !== 0) throw new Error(`The demo’s history could not be told: ${lastWords.trim() || `exit code ${code}`}`);
  });
  // Heard when it is awaited; until then nothing is unhandled.
  ended.catch(() => undefined);
  return { stdout: child.stdout, ended };
}
