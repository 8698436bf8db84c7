import { describe, expect, it } from 'vitest';
import { planKnowledge } from '#shared/domain/fold/plan-knowledge.ts';
import { CONTEXT, createPlayer, goodDay } from '../detectors/pump-player.ts';

type Parts = { readonly hot: { readonly control: unknown }; readonly learnt: { readonly inputs: unknown } };
const partsOf = (saved: unknown): Parts => JSON.parse(JSON.stringify(saved)) as Parts;
const learning = { ...CONTEXT, inputs: CONTEXT.inputs.map((input) => ({ ...input, windows: [] })) };

describe('what a plan rests on', () => {
  it('is the recorded windows and a motor’s clock that is right, before anything is known', () => {
    const { motorClockOffsetMinutes, windows } = planKnowledge(CONTEXT, undefined, undefined);
    expect(motorClockOffsetMinutes).toBe(0);
    // The contact opens twenty minutes before the tripper of the first clock.
    expect(windows.map(({ input, window }) => [input, window.onMinute, window.offMinute])).toEqual([
      [1, 600, 820],
      [2, 960, 1080],
    ]);
  });

  it('is what the fold learnt of clocks nobody recorded, and of the motor’s own', () => {
    const player = createPlayer(learning);
    const recorded = goodDay(CONTEXT);
    player.playUntil(6, 1430, (at) => ({ ...recorded(at), clockAhead: 25 }));
    const { hot, learnt } = partsOf(player.fold.save());
    const { motorClockOffsetMinutes, windows } = planKnowledge(learning, hot.control, learnt.inputs);
    expect(Math.abs(motorClockOffsetMinutes - 25)).toBeLessThan(2);
    expect(windows.map(({ input }) => input)).toEqual([1, 2]);
    for (const [index, on, off] of [
      [0, 600, 820],
      [1, 960, 1080],
    ] as const) {
      expect(Math.abs((windows[index]?.window.onMinute ?? 0) - on)).toBeLessThan(2);
      expect(Math.abs((windows[index]?.window.offMinute ?? 0) - off)).toBeLessThan(2);
      expect(windows[index]?.window.days).toEqual([true, true, true, true, true, true, true]);
    }
  });

  it('is as if nothing were known where what was saved cannot be read back', () => {
    expect(planKnowledge(learning, { at: 'noon' }, 'nonsense')).toEqual({ motorClockOffsetMinutes: 0, windows: [] });
  });
});
