import { describe, expect, it } from 'vitest';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { COARSE, clocks, createPlayer, DAY, goodDay, HOUR, MINUTE, MONDAY, type Scene } from './pump-player.ts';

const usual = clocks();
/** The clocks with some inputs never closing. */
const without =
  (mask: number) =>
  (at: number): Scene => ({ closedInputs: usual(at) & ~mask });
const drives = (duty: 'heater' | 'cleaner'): PumpContext => ({
  ...COARSE,
  inputs: COARSE.inputs.map((input) => (input.number === 1 ? { ...input, drives: duty } : input)),
});

describe('missing-input', () => {
  it('raises an hour late on the second due day, from the edge that did not come, and clears when it closes', () => {
    const player = createPlayer(COARSE);
    player.playUntil(3, 0, goodDay());
    player.playUntil(4, 720, without(1));
    const raised = player.raised('missing-input')[0]!;

    expect(raised).toMatchObject({ priority: 'soon', cause: 'one-input', from: MONDAY + 3 * DAY + 600 * MINUTE });
    expect(raised).toHaveProperty('evidence.input', 1);
    expect(raised.at - (MONDAY + 4 * DAY + 660 * MINUTE)).toBeLessThanOrEqual(6 * MINUTE);

    player.playUntil(5, 700, goodDay());
    expect(player.standing('missing-input')).toBeUndefined();
    expect(player.spoken()).toEqual(['missing-input']);
  });

  it.each(['heater', 'cleaner'] as const)('raises on the first due day where it drives the %s', (duty) => {
    const player = createPlayer(drives(duty));
    player.playUntil(2, 0, goodDay());
    player.playUntil(2, 720, without(1));
    expect(player.raised('missing-input')).toHaveLength(1);
  });

  it('names the common supply when every clock stays away', () => {
    const player = createPlayer(COARSE);
    player.playUntil(2, 0, goodDay());
    player.playUntil(4, 0, without(3));
    expect(player.standing('missing-input')?.cause).toBe('all-inputs');
  });

  it('learns the hours of a clock nobody recorded', () => {
    const unrecorded = { ...COARSE, inputs: [] };
    const player = createPlayer(unrecorded);
    player.playUntil(6, 0, (at) => ({ closedInputs: usual(at) }));
    player.playUntil(7, 720, without(1));
    expect(player.raised('missing-input')[0]).toMatchObject({ evidence: { input: 1 } });
  });

  it('stays silent on a dial that is hours behind, early, or an hour behind in spring', () => {
    for (const hours of [-5, 3, 9]) {
      const player = createPlayer(drives('cleaner'));
      player.playUntil(2, 0, goodDay());
      const shifted = (at: number): Scene => ({ closedInputs: usual(at - hours * HOUR) });
      player.playUntil(2, 600, hours > 0 ? (at) => ({ closedInputs: usual(at) & 2 }) : shifted);
      player.playUntil(6, 0, shifted);
      expect(player.raised('missing-input').length).toBeLessThanOrEqual(hours > 0 ? 1 : 0);
    }
    const newYork = { ...drives('cleaner'), zone: 'America/New_York' };
    const winter = Date.UTC(2025, 2, 6, 5);
    const player = createPlayer(newYork, winter);
    player.playUntil(9, 0, (at) => ({ closedInputs: clocks(newYork, winter)(at), reportedSource: undefined }));
    expect(player.raised('missing-input')).toEqual([]);
  });

  it('stays silent on days that are not due, through a silence, and on a winterized pad', () => {
    const weekdays = {
      ...COARSE,
      inputs: COARSE.inputs.map((input) => ({
        ...input,
        windows: input.windows.map((window) => ({ ...window, days: [true, true, true, true, true, false, false] })),
      })),
    };
    const player = createPlayer(weekdays);
    player.playUntil(14, 0, (at) => ({ closedInputs: Math.floor((at - MONDAY) / DAY) % 7 < 5 ? usual(at) : 0 }));
    expect(player.signals).toEqual([]);

    const silent = createPlayer(COARSE);
    silent.playUntil(2, 590, goodDay());
    silent.silence(3 * HOUR);
    silent.playUntil(3, 590, (at) => ({ closedInputs: usual(at) & 2 }));
    silent.silence(3 * HOUR);
    silent.playUntil(4, 0, goodDay());
    expect(silent.raised('missing-input')).toEqual([]);

    const winter = createPlayer({ ...COARSE, padState: 'winterized' });
    winter.playUntil(4, 0, { rpm: 0 });
    expect(winter.signals).toEqual([]);
  });

  it('expects nothing of a toggle, a twist timer or a heater', () => {
    for (const kind of ['toggle', 'twist-timer', 'heater-call', 'solar-controller'] as const) {
      const byHand = { ...COARSE, inputs: [{ number: 1, kind, windows: [] }] };
      const player = createPlayer(byHand);
      player.playUntil(6, 0, (at) => ({ closedInputs: usual(at) & 1 }));
      player.playUntil(9, 0, {});
      expect(player.signals).toEqual([]);
    }
  });
});
