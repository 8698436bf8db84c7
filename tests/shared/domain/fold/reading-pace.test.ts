import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, goodDay, MINUTE, SECOND } from '../detectors/pump-player.ts';

describe('the pace of readings', () => {
  it('is learnt where a device sends more slowly than was recorded, so that its faults are seen', () => {
    const player = createPlayer({ ...CONTEXT, intervalSeconds: 10 });
    player.playUntil(0, 600, goodDay(), MINUTE);
    player.play(15 * MINUTE, { closedInputs: 1, activeInput: 0, rpm: 1700, reportedSource: 'program' }, MINUTE);

    expect(player.spoken()).toEqual(['wrong-speed']);
    expect(player.fold.save().hot).toMatchObject({ pace: { seconds: 60 } });
  });

  it('is learnt at three times what was recorded, where every second reading is a moment too late', () => {
    const player = createPlayer({ ...CONTEXT, intervalSeconds: 10 });
    for (let pair = 0; pair < 600; pair += 1) {
      player.play(29_980, goodDay(), 29_980);
      player.play(30_040, goodDay(), 30_040);
    }
    player.play(15 * MINUTE, { closedInputs: 1, activeInput: 0, rpm: 1700, reportedSource: 'program' }, 30 * SECOND);

    expect(player.spoken()).toEqual(['wrong-speed']);
    expect(player.fold.save().hot).toMatchObject({ pace: { seconds: 30 } });
  });

  it('is kept over a restart, and forgotten when another interval is commissioned', () => {
    const player = createPlayer({ ...CONTEXT, intervalSeconds: 10 });
    player.playUntil(0, 60, {}, MINUTE);
    player.restart();
    expect(player.fold.save().hot).toMatchObject({ pace: { seconds: 60 } });

    player.restart({ ...CONTEXT, intervalSeconds: 20 });
    expect(player.fold.save().hot).toMatchObject({ pace: { commissioned: 20, seconds: 0 } });
  });

  it('takes a few gaps for gaps', () => {
    const player = createPlayer();
    player.play(5 * MINUTE, {});
    for (let gap = 0; gap < 6; gap += 1) player.play(MINUTE, {}, MINUTE);
    player.play(5 * MINUTE, {});
    expect(player.fold.save().hot).toMatchObject({ pace: { seconds: 0 } });
  });
});
