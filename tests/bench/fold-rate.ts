import { spawn } from 'node:child_process';
import { once } from 'node:events';
import type { Bench } from './bench.ts';

/** Runs one of this folder's measuring scripts, which print JSON last. */
async function measured(file: string, parameters: readonly string[]): Promise<Readonly<Record<string, number>>> {
  const child = spawn(process.execPath, ['--import', 'tsx', `tests/bench/${file}`, ...parameters], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  let text = '';
  child.stdout.setEncoding('utf8').on('data', (chunk: string) => {
    text += chunk;
  });
  await once(child, 'close');
  return JSON.parse(text.trim().split('\n').at(-1) ?? '');
}

/** The fold of a pump alone, every detector in it, in processor time of one core. */
export const foldRate: Bench = {
  name: 'fold-speed',
  about: 'five million readings through control, runs and every detector on one core',
  run: async () => {
    const fold = await measured('fold-speed.ts', ['5']);
    return [
      { name: 'fold alone', value: fold.readingsPerSecond ?? Number.NaN, unit: 'readings/s', atLeast: 300_000 },
      { name: 'hot state of a pump', value: fold.hotBytes ?? Number.NaN, unit: 'bytes' },
      { name: 'learnt state of a pump', value: fold.learntBytes ?? Number.NaN, unit: 'bytes' },
    ];
  },
};
