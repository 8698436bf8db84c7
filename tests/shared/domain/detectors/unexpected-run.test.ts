import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, goodDay, HOUR, MINUTE, MONDAY } from './pump-player.ts';

const NIGHT = 60;

describe('unexpected-run', () => {
  it('raises after an hour with nothing due, and clears once the shaft stands', () => {
    const player = createPlayer();
    player.playUntil(1, NIGHT, goodDay());
    player.play(70 * MINUTE, { rpm: 2000, reportedSource: 'program' });
    const raised = player.raised('unexpected-run')[0]!;

    expect(raised).toMatchObject({ priority: 'note', alarmClass: 'alarm', cause: 'program-changed' });
    expect(raised.at - raised.from).toBe(HOUR);

    player.play(15 * MINUTE, {});
    expect(player.standing('unexpected-run')).toBeUndefined();
    expect(player.spoken()).toEqual(['unexpected-run']);
  });

  it('names the motor clock when the last start missed its entry by as much', () => {
    const player = createPlayer();
    player.playUntil(0, 300, {});
    player.playUntil(0, 361, {});
    player.playUntil(0, 480, { clockAhead: -120 });
    player.playUntil(0, 1310, { clockAhead: -120 });

    expect(player.standing('unexpected-run')?.cause).toBe('motor-clock');
  });

  it('keeps what it found while nothing was due', () => {
    const player = createPlayer();
    player.playUntil(1, NIGHT, goodDay());
    player.playUntil(1, 360, { rpm: 1380, reportedSource: 'off' });
    player.playUntil(1, 1200, goodDay());
    player.play(30_000, { rpm: 1700, reportedSource: 'program' });
    player.play(30 * MINUTE, { rpm: 1380, reportedSource: 'off' });

    expect(player.standing('unexpected-run')?.cause).toBe('unknown');
  });

  it('takes the end of a freeze run for no run, where the motor names no source', () => {
    const player = createPlayer();
    const quiet = { reportedSource: undefined, activeInput: 0 };
    player.playUntil(1, NIGHT, { ...quiet, rpm: 0 });
    player.play(4 * HOUR + MINUTE, { ...quiet, rpm: CONTEXT.settings.freeze!.rpm });
    player.play(10_000, { ...quiet, rpm: 751 });
    player.play(20 * MINUTE, { ...quiet, rpm: 0 });

    expect(player.raised('unexpected-run')).toEqual([]);
  });

  it('names the program when the day began on time', () => {
    const player = createPlayer();
    player.playUntil(0, 1200, {});
    player.play(70 * MINUTE, { rpm: 1700, reportedSource: 'program' });

    expect(player.standing('unexpected-run')?.cause).toBe('program-changed');
  });

  it('says unknown where the motor says that nothing commands it', () => {
    const player = createPlayer();
    player.playUntil(1, NIGHT, goodDay());
    player.play(70 * MINUTE, { rpm: 1700, reportedSource: 'off' });

    expect(player.standing('unexpected-run')?.cause).toBe('unknown');
  });

  it('hears a pump that runs on a winterized pad', () => {
    const player = createPlayer({ ...CONTEXT, padState: 'winterized' });
    player.playUntil(0, 600, { rpm: 0 });
    player.play(70 * MINUTE, { rpm: 1700, reportedSource: 'program' });

    expect(player.spoken()).toEqual(['unexpected-run']);
  });

  it('stays silent on manual, on timed runs, on freeze protection and on new plaster', () => {
    const player = createPlayer();
    player.playUntil(1, NIGHT, goodDay());
    player.play(3 * HOUR, { rpm: 2000, reportedSource: 'keypad' });
    player.play(45 * MINUTE, { rpm: 3200, reportedSource: 'timed' });
    expect(player.signals).toEqual([]);

    const cold = createPlayer();
    cold.playUntil(0, 300, { rpm: 1150, reportedSource: 'freeze', ambientCelsius: 2 });
    expect(cold.signals).toEqual([]);

    const plaster = createPlayer({ ...CONTEXT, padState: 'new-plaster' });
    plaster.playUntil(2, 0, { rpm: 2400, reportedSource: 'program' });
    expect(plaster.signals).toEqual([]);
  });

  it('waits four hours where the pump never says what commands it', () => {
    const player = createPlayer(CONTEXT, MONDAY);
    player.play(10 * MINUTE, { rpm: 0, reportedSource: undefined });
    player.play(3 * HOUR, { rpm: 2200, reportedSource: undefined });
    expect(player.signals).toEqual([]);

    player.play(70 * MINUTE, { rpm: 2200, reportedSource: undefined });
    expect(player.spoken()).toEqual(['unexpected-run']);
  });
});
