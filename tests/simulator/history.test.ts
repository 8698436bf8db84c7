import { describe, expect, it } from 'vitest';
import { readReadings } from '#shared/contract/mqtt/readings.ts';
import { readSettings } from '#shared/contract/mqtt/settings.ts';
import { readStatus } from '#shared/contract/mqtt/status.ts';
import { encodeArrival } from '#simulator/arrival-line.ts';
import { createDemoFleet } from '#simulator/demo-fleet.ts';
import { generateHistory } from '#simulator/history.ts';
import { MONDAY } from '#tests/support/simulated-pump.ts';

const DAY = 86_400_000;
const TO = MONDAY;

/** Six days of the demo's month, in which links drop, power fails and clocks are wrong, for the first pumps of it. */
function history(seed: string, pumps: number, latencyMs = 0): string[] {
  const fleet = createDemoFleet({ seed, from: TO - 6 * DAY, to: TO, cadenceMs: 120_000, pumps });
  return [...generateHistory(fleet, { to: TO, latencyMs })].map(encodeArrival);
}

type Line = { readonly s: string; readonly t?: number; readonly at?: number } & Record<string, unknown>;
const parse = (texts: readonly string[]): Line[] =>
  texts
    .join('')
    .trimEnd()
    .split('\n')
    .map((line) => JSON.parse(line));

describe('generateHistory', () => {
  const texts = history('larkmoor', 36);
  const lines = parse(texts);

  it('gives the same bytes for the same seed, and others for another', () => {
    expect(history('a', 3).join('')).toBe(history('a', 3).join(''));
    expect(history('a', 3).join('')).not.toBe(history('b', 3).join(''));
  });

  it('comes in order of arrival', () => {
    const arrivals = lines.map((line) => line.at ?? line.t ?? 0);

    expect(arrivals).toEqual([...arrivals].sort((a, b) => a - b));
    expect(arrivals.at(-1)).toBeLessThanOrEqual(TO);
  });

  it('holds to the wire in every message, with nothing refused or dropped', () => {
    const holds = (line: Line): boolean => {
      if (line.onSite !== undefined) return typeof line.onSite === 'boolean';
      if (line.status !== undefined) return readStatus(line.status).kind === 'status';
      const settings = line.settings === undefined ? undefined : readSettings(line.settings);
      if (settings !== undefined) return settings.kind === 'settings' && settings.faults.length === 0;
      const decoded = readReadings(line);
      return decoded.kind === 'readings' && decoded.readings.length === 1 && decoded.dropped.length === 0;
    };

    expect(lines.filter((line) => !holds(line))).toEqual([]);
  });

  it('has device times that strictly increase on every pump', () => {
    const last = new Map<string, number>();
    const back = lines.filter(({ s, t }) => {
      if (t === undefined) return false;
      const goesBack = t <= (last.get(s) ?? 0);
      last.set(s, t);
      return goesBack;
    });

    expect(back).toEqual([]);
    expect(last.size).toBe(36);
  });

  it('speaks of every kind of message, and of readings that come late', () => {
    expect(lines.some((line) => line.status !== undefined && JSON.stringify(line.status).includes('lost'))).toBe(true);
    expect(lines.some((line) => line.settings !== undefined)).toBe(true);
    expect(lines.some((line) => line.onSite === true)).toBe(true);
    expect(lines.some((line) => line.t !== undefined && line.at !== undefined && line.at - line.t > 600_000)).toBe(
      true,
    );
  });

  it('keeps arrival at or after device time, and order on each device, when the way takes time', () => {
    const last = new Map<string, number>();
    const wrong = parse(history('larkmoor', 4, 900)).filter(({ s, t, at = t }) => {
      if (t === undefined || at === undefined) return false;
      const isWrong = at < t || at < (last.get(s) ?? 0);
      last.set(s, at);
      return isWrong;
    });

    expect(wrong).toEqual([]);
  });
});
