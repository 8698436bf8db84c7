import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Control, createControl } from '#shared/domain/control/create-control.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { anyReadings } from '../runs/invented-readings.ts';
import { inventedPump, reading, wall } from './invented-pump.ts';

const CONTEXT = inventedPump({ settings: { prime: { rpm: 3450, seconds: 60 } }, traits: { timedResumes: true } });
const START = wall(CONTEXT.zone, '2025-07-01 05:30');
const again = (control: Control, context: PumpContext = CONTEXT): Control =>
  createControl(context, JSON.parse(JSON.stringify(control.save())));

describe('control that was saved', () => {
  it('goes on from JSON as if nothing had been', () => {
    fc.assert(
      fc.property(anyReadings(START), fc.nat(200), (readings, cut) => {
        const whole = createControl(CONTEXT);
        let broken = createControl(CONTEXT);
        readings.forEach((next, index) => {
          if (index === cut) {
            broken = again(broken);
            expect(broken.answer()).toEqual(whole.answer());
          }
          expect(broken.push(next)).toEqual(whole.push(next));
        });
        expect(broken.save()).toEqual(whole.save());
      }),
      { numRuns: 200 },
    );
  });

  it('answers under what is commissioned now', () => {
    const control = createControl(CONTEXT);
    control.push(reading(START + 7_200_000, 1700));
    const faster = inventedPump({
      settings: { program: [{ days: Array(7).fill(true), fromMinute: 0, toMinute: 1440, rpm: 2000 }] },
    });
    expect(again(control, faster).answer()?.due).toMatchObject({ source: 'program', rpm: 2000 });
  });

  it('starts afresh from what cannot be read back', () => {
    const good = createControl(CONTEXT);
    good.push(reading(START, 0));
    for (const saved of [
      undefined,
      null,
      'x',
      7,
      [],
      {},
      { ...good.save(), at: 'x' },
      { ...good.save(), startedAt: 'x' },
    ]) {
      expect(createControl(CONTEXT, saved).answer()).toBeUndefined();
    }
    expect(createControl(CONTEXT, { ...good.save(), more: 1 }).save()).toEqual(good.save());
  });
});
