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

/** Pumps of chance by physics that the domain does not share: pipes, the meter each came with, what is read at a speed. */
export function* pumpsOfChance(count: number) {
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
