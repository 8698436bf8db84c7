import { describe, expect, it } from 'vitest';
import { estimateFlow } from '#shared/domain/hydraulics/estimate-flow.ts';
import { METER_AS_FITTED } from '#shared/domain/hydraulics/meter-error.ts';
import { meterFlow } from '#shared/domain/hydraulics/meter-flow.ts';
import { estimateDaySystem } from '#shared/domain/hydraulics/system-estimate.ts';
import type { WetEndCurve } from '#shared/domain/hydraulics/wet-end-curve.ts';
import { MOTOR_DRIVES, WET_ENDS } from '#simulator/models.data.ts';
import { dutyGpm } from '#simulator/physics/duty-point.ts';
import { createMeter, meterWatts } from '#simulator/physics/meter.ts';
import { lineWatts, type MotorDrive } from '#simulator/physics/motor-drive.ts';
import { headFeet, shaftWatts, type WetEnd } from '#simulator/physics/wet-end.ts';
import { createRandom } from '#simulator/random.ts';
import { fitOrFail } from './sample-wet-ends.ts';

/** The curve as a maker prints it: heads to half a foot, watts to ten, from shut-off to 1.3 of the best flow. */
function printedCurve(wetEnd: WetEnd, drive: MotorDrive): WetEndCurve {
  const points = [0, 0.2, 0.4, 0.6, 0.8, 1, 1.15, 1.3].map((share) => {
    const gpm = share * wetEnd.bestGpm;
    const watts = lineWatts(drive, shaftWatts(wetEnd, gpm, wetEnd.referenceRpm), wetEnd.referenceRpm);
    return {
      gpm,
      feet: Math.round(headFeet(wetEnd, gpm, wetEnd.referenceRpm) * 2) / 2,
      watts: Math.round(watts / 10) * 10,
    };
  });
  return fitOrFail({ referenceRpm: wetEnd.referenceRpm, standbyWatts: drive.standbyWatts, points });
}

type Pair = readonly [WetEnd, MotorDrive];
const PAIRS: readonly [Pair, ...Pair[]] = [
  [WET_ENDS['Aldermere 100'], MOTOR_DRIVES['Fernholt V3-165']],
  [WET_ENDS['Aldermere 150'], MOTOR_DRIVES['Fernholt V4-270']],
  [WET_ENDS['Aldermere 220'], MOTOR_DRIVES['Fernholt V5-350']],
  [WET_ENDS['Aldermere Cascade'], MOTOR_DRIVES['Fernholt V4-270']],
];

/** One pump of chance: its pipes, the meter it came with, and what is read at a speed. */
function* pumps(count: number) {
  const random = createRandom('virtual flow meter');
  for (let index = 0; index < count; index += 1) {
    const [wetEnd, drive] = random.pick(PAIRS);
    const friction = (wetEnd.shutOffFeet / wetEnd.bestGpm ** 1.9) * random.between(0.6, 6);
    const system = { staticFeet: random.between(0, 1.5), pipe: friction * 0.7, filter: friction * 0.3 };
    const meter = createMeter(random);
    const read = (rpm: number) => {
      const gpm = dutyGpm(wetEnd, system, { valve: 1, dirt: 1, staticFeet: 0 }, rpm);
      return {
        gpm,
        watts: meterWatts(meter, lineWatts(drive, shaftWatts(wetEnd, gpm, rpm), rpm), 0.003 * random.normal()),
      };
    };
    yield { curve: printedCurve(wetEnd, drive), random, read };
  }
}

describe('virtual flow meter against physics it does not share', () => {
  it('holds the true flow within two sigmas nine times out of ten at high speed, and answers more often than not', () => {
    let [inside, answers, asked] = [0, 0, 0];
    for (const { curve, random, read } of pumps(2000)) {
      const rpm = random.between(2450, 3450);
      const { gpm, watts } = read(rpm);
      const answer = estimateFlow(curve, { rpm, watts }, METER_AS_FITTED);
      asked += 1;
      if (answer.kind !== 'estimate') continue;
      answers += 1;
      if (Math.abs(answer.gpm - gpm) <= 2 * answer.sigmaGpm) inside += 1;
    }
    expect(answers / asked).toBeGreaterThan(0.5);
    expect(inside / answers).toBeGreaterThan(0.9);
  });

  it('holds it too at low speed, from the k of a fast run of the day', () => {
    let [inside, answers] = [0, 0];
    for (const { curve, random, read } of pumps(1000)) {
      const fast = estimateFlow(curve, { rpm: 3000, watts: read(3000).watts }, METER_AS_FITTED);
      const daySystem = estimateDaySystem([{ speedRatio: 3000 / 3450, milliseconds: 3_600_000, flow: fast }], 0);
      const rpm = random.between(900, 2000);
      const { gpm, watts } = read(rpm);
      const answer = meterFlow({ curve, meter: METER_AS_FITTED, staticFeet: 0, daySystem }, { rpm, watts });
      if (answer.kind !== 'estimate' || answer.from !== 'system') continue;
      answers += 1;
      if (Math.abs(answer.gpm - gpm) <= 2 * answer.sigmaGpm) inside += 1;
    }
    expect(answers).toBeGreaterThan(400);
    expect(inside / answers).toBeGreaterThan(0.9);
  });
});
