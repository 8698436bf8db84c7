import { type ChildProcess, spawn } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { endOrphans, recordChildren } from '#server/bootstrap/orphans.mjs';
import { findProcess, isStillRunning } from '#server/bootstrap/process-table.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

const makeFolder = () => makeTemporaryFolder('orphans');
const spawned: ChildProcess[] = [];

afterEach(() => {
  for (const child of spawned.splice(0)) child.kill('SIGKILL');
});

function spawnSleeper(script = 'exec sleep 60') {
  const child = spawn('sh', ['-c', script], { detached: true, stdio: ['ignore', 'pipe', 'ignore'] });
  spawned.push(child);
  return { child, identity: { name: 'sleeper', ...findProcess(child.pid ?? 0)! } };
}

describe('endOrphans', () => {
  it('ends what was written down', async () => {
    const folder = makeFolder();
    const { identity } = spawnSleeper();
    recordChildren(folder, [identity]);
    expect(await endOrphans(folder)).toEqual(['sleeper']);
    expect(isStillRunning(identity)).toBe(false);
    expect(await endOrphans(folder)).toEqual([]);
  });

  it('ends by force, with all its own, what does not listen', async () => {
    const folder = makeFolder();
    const { child, identity } = spawnSleeper("trap '' TERM; sleep 60 & echo deaf; wait; sleep 60");
    await new Promise((done) => child.stdout?.once('data', done));
    recordChildren(folder, [identity]);
    expect(await endOrphans(folder, { graceMs: 100 })).toEqual(['sleeper']);
    expect(isStillRunning(identity)).toBe(false);
  });

  it('leaves a stranger alone that has the number by now', async () => {
    const folder = makeFolder();
    const { identity } = spawnSleeper();
    recordChildren(folder, [{ ...identity, started: '1' }]);
    expect(await endOrphans(folder)).toEqual([]);
    expect(isStillRunning(identity)).toBe(true);
  });

  it('does not stumble over a record that was cut short', async () => {
    const folder = makeFolder();
    writeFileSync(join(folder, 'children.json'), '[{"name":"no');
    expect(await endOrphans(folder)).toEqual([]);
  });
});
