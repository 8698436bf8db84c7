import { describe, expect, it } from 'vitest';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import {
  COARSE,
  clocks,
  createPlayer,
  DAY,
  EVERY_DAY,
  goodDay,
  HOUR,
  MINUTE,
  MONDAY,
  type Scene,
} from './pump-player.ts';

const usual = clocks();
const held =
  (mask: number) =>
  (at: number): Scene => ({ closedInputs: usual(at) | mask });
const TWICE: PumpContext = {
  ...COARSE,
  inputs: [
    {
      number: 1,
      kind: 'clock',
      windows: [
        { days: EVERY_DAY, onMinute: 480, offMinute: 600, opensEarlyMinutes: 0 },
        { days: EVERY_DAY, onMinute: 960, offMinute: 1080, opensEarlyMinutes: 0 },
      ],
    },
  ],
};

describe('stuck-input', () => {
  it('is a note three hours past the time the contact opens, an alarm at 26 hours, and clears when it opens', () => {
    const player = createPlayer(COARSE);
    player.playUntil(2, 605, goodDay());
    player.playUntil(2, 1010, held(1));
    const opens = MONDAY + 2 * DAY + 820 * MINUTE;
    const raised = player.raised('stuck-input')[0]!;
    expect(raised).toMatchObject({ alarmClass: 'note', priority: 'note', from: opens, evidence: { input: 1 } });
    expect(raised.at - opens).toBeGreaterThanOrEqual(3 * HOUR);
    expect(raised.at - opens).toBeLessThan(3 * HOUR + MINUTE);

    player.playUntil(3, 960, held(1));
    expect(player.standing('stuck-input')).toMatchObject({ alarmClass: 'alarm', priority: 'soon' });

    player.play(20 * MINUTE, { closedInputs: 0 });
    expect(player.standing('stuck-input')).toBeUndefined();
    expect(player.spoken()).toEqual(['stuck-input']);
  });

  it('names a lever that was put on by hand and is still on after a party is over', () => {
    const player = createPlayer(COARSE);
    player.playUntil(2, 1140, goodDay());
    player.playUntil(3, 90, held(1));
    expect(player.standing('stuck-input')).toMatchObject({
      cause: 'lever-left-on',
      from: MONDAY + 2 * DAY + 1140 * MINUTE,
    });
  });

  it('names a welded switch that ran past two different trippers', () => {
    const player = createPlayer(TWICE);
    player.playUntil(2, 500, goodDay(TWICE));
    player.playUntil(2, 1200, (at) => ({ closedInputs: clocks(TWICE)(at) | 1 }));
    expect(player.standing('stuck-input')?.cause).toBe('switch-welded');
  });

  it('names a missing tripper where the next one opens the contact', () => {
    const player = createPlayer(TWICE);
    player.playUntil(2, 500, goodDay(TWICE));
    const noFirstOff = (at: number): Scene => {
      const minute = ((at - MONDAY) / MINUTE) % 1440;
      return { closedInputs: minute >= 480 && minute < 1080 ? 1 : 0 };
    };
    player.playUntil(2, 1095, noFirstOff);
    const causes = player.signals
      .filter(({ detector }) => detector === 'stuck-input')
      .map((signal) => 'cause' in signal && signal.cause);
    expect(causes).toEqual(['tripper-missing', false]);

    player.playUntil(3, 800, noFirstOff);
    expect(player.standing('stuck-input')?.cause).toBe('tripper-missing');
  });

  it('stays silent on a party, a spa toggle, and a dial that is four hours behind', () => {
    const party = createPlayer(COARSE);
    party.playUntil(1, 1140, goodDay());
    party.playUntil(1, 1430, held(1));
    party.playUntil(3, 0, goodDay());
    expect(party.signals).toEqual([]);

    const spa = { ...COARSE, inputs: [{ number: 1, kind: 'toggle' as const, windows: [], drives: 'spa' as const }] };
    const night = createPlayer(spa);
    night.play(40 * HOUR, { closedInputs: 1 });
    expect(night.signals).toEqual([]);

    const late = createPlayer(COARSE);
    late.playUntil(2, 0, goodDay());
    late.playUntil(6, 0, (at) => ({ closedInputs: usual(at - 4 * HOUR) }));
    expect(late.raised('stuck-input')).toEqual([]);
  });
});
