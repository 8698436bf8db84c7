import { spawn } from 'node:child_process';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const PAD = {
  serial: 'MR-000123',
  timezone: 'America/Phoenix',
  area: 'North',
  state: 'open',
  settings: {
    inputs: [2850, 2400, null],
    program: [{ days: '1111111', from: '06:00', to: '20:00', rpm: 1700 }],
    prime: { rpm: 3450, s: 300 },
    timed: { rpm: 3200, min: 45 },
    freeze: { c: 4.4, rpm: 1150 },
    max: 3450,
    min: 600,
  },
  model: {
    refRpm: 3450,
    points: [
      { gpm: 0, ft: 84, w: 980 },
      { gpm: 40, ft: 79, w: 1420 },
      { gpm: 80, ft: 62, w: 1790 },
      { gpm: 110, ft: 40, w: 1980 },
    ],
    standbyW: 8,
  },
  system: { k: 0.0095 },
  nominalV: 230,
  intervalS: 10,
};
const SIX_IN_PHOENIX = Date.UTC(2026, 5, 1, 13);

type Line = Record<string, unknown>;

/** A pump that starts at six and never catches water: full speed, a quarter of the primed watts, for an hour. */
function dryStart(serial: string): Line[] {
  const lines: Line[] = [
    {
      s: serial,
      at: SIX_IN_PHOENIX - 70_000,
      status: { state: 'online', conn: crypto.randomUUID(), boot: crypto.randomUUID(), up: 86_400, fw: '1.4.2' },
    },
  ];
  for (let second = -60; second < 3600; second += 10) {
    const priming = second >= 0 && second < 300;
    const rpm = second < 0 ? 0 : priming ? 3450 : 1700;
    const w = second < 0 ? 8 : priming ? 400 : 70;
    lines.push({
      s: serial,
      t: SIX_IN_PHOENIX + second * 1000,
      rpm,
      in: 0,
      act: 0,
      w,
      src: second < 0 ? 'off' : priming ? 'prime' : 'program',
    });
  }
  return lines;
}

describe('the backtest command', () => {
  let folder: string;

  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'backtest-'));
  });
  afterAll(() => rm(folder, { recursive: true }));

  function backtest(args: readonly string[]): Promise<{ code: number | null; out: string; err: string }> {
    return new Promise((resolve) => {
      const child = spawn(process.execPath, ['--import', 'tsx', 'server/backtest/backtest-command.ts', ...args]);
      let out = '';
      let err = '';
      child.stdout.on('data', (data: Buffer) => {
        out += data.toString();
      });
      child.stderr.on('data', (data: Buffer) => {
        err += data.toString();
      });
      child.on('close', (code) => resolve({ code, out, err }));
    });
  }

  async function write(name: string, text: string): Promise<string> {
    const path = join(folder, name);
    await writeFile(path, text);
    return path;
  }

  it('finds a failed prime, and names bad lines and bad pads without stopping for them', async () => {
    const pads = await write(
      'pads.json',
      JSON.stringify([PAD, { ...PAD, serial: 'MR-000124', timezone: 'Mars/Olympus' }]),
    );
    const lines = dryStart('MR-000123').map((line) => JSON.stringify(line));
    lines.splice(
      40,
      0,
      '{"s":"MR-000123","t":1,',
      JSON.stringify({ s: 'MR-000123', t: SIX_IN_PHOENIX + 1, rpm: 1700, in: 0, act: 0, w: -4 }),
    );
    const readings = await write('readings.ndjson', lines.join('\n'));
    const out = join(folder, 'alarms.ndjson');

    const result = await backtest(['--pads', pads, '--readings', readings, '--out', out]);

    const alarms = (await readFile(out, 'utf8'))
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line));
    expect(result.code).toBe(0);
    expect(result.err).toMatch(/pad 2 \(MR-000124\) skipped: timezone/);
    expect(result.err).toMatch(/line 41 skipped/);
    expect(result.err).toMatch(/line 42 skipped: w-negative/);
    expect(alarms).toContainEqual(
      expect.objectContaining({
        s: 'MR-000123',
        detector: 'failed-prime',
        class: 'alarm',
        priority: 'urgent',
        from: SIX_IN_PHOENIX,
        to: null,
      }),
    );
    expect(alarms.map((alarm: { raised: number }) => alarm.raised)).toEqual(
      alarms.map((alarm: { raised: number }) => alarm.raised).toSorted((a: number, b: number) => a - b),
    );
  });

  it('ends with 2 and one clear line for arguments it cannot use', async () => {
    const missing = await backtest(['--pads', 'pads.json']);
    const unreadable = await backtest(['--pads', join(folder, 'nowhere.json'), '--readings', 'x']);

    expect(missing).toMatchObject({ code: 2, out: '' });
    expect(missing.err.trim().split('\n')).toHaveLength(1);
    expect(unreadable).toMatchObject({ code: 2 });
    expect(unreadable.err).toMatch(/Cannot read the pads/);
  });
});
