import { describe, expect, it } from 'vitest';
import { MOTOR_DRIVES } from '#simulator/models.data.ts';
import { createMeter, meterWatts } from '#simulator/physics/meter.ts';
import { lineWatts } from '#simulator/physics/motor-drive.ts';
import { createRandom } from '#simulator/random.ts';

describe.each(Object.entries(MOTOR_DRIVES))('lineWatts of %s', (_, drive) => {
  it('is the standby alone at standstill', () => {
    expect(lineWatts(drive, 0, 0)).toBe(drive.standbyWatts);
  });

  it('has the efficiency of a permanent-magnet motor with its drive at rated load', () => {
    const efficiency = drive.ratedWatts / lineWatts(drive, drive.ratedWatts, drive.ratedRpm);

    expect(efficiency).toBeGreaterThan(0.87);
    expect(efficiency).toBeLessThan(0.94);
  });

  it('loses more of a small load at a low speed than the cube of the speed would say', () => {
    const full = lineWatts(drive, drive.ratedWatts * 0.8, 3450);
    const half = lineWatts(drive, (drive.ratedWatts * 0.8) / 8, 1725);

    expect(half).toBeGreaterThan(full / 8);
  });
});

describe('meterWatts', () => {
  it('errs by at most 5 % and 5 W, the same way every time, and never shows less than nothing', () => {
    for (let index = 0; index < 200; index += 1) {
      const meter = createMeter(createRandom(`meter-${index}`));

      expect(Math.abs(meterWatts(meter, 1000, 0) - 1000)).toBeLessThanOrEqual(55.1);
      expect(meterWatts(meter, 1000, 0)).toBe(meterWatts(meter, 1000, 0));
      expect(meterWatts(meter, 0, 0)).toBeGreaterThanOrEqual(0);
    }
  });
});
