import { describe, expect, it } from 'vitest';
import { listSpeedOptions, speedOptionAt } from '#shared/domain/advisor/speed-option.ts';
import { wattsAt } from '#shared/domain/hydraulics/wet-end-curve.ts';
import { fitOrFail, POOL_SHEET } from '#tests/shared/domain/hydraulics/sample-wet-ends.ts';

const curve = fitOrFail(POOL_SHEET);
const system = { staticFeet: 0, k: 0.0125 };

describe('speed options', () => {
  it('are every step between the least and the highest speed, and both of these', () => {
    const speeds = listSpeedOptions(curve, system, 620, 760).map(({ rpm }) => rpm);

    expect(speeds).toEqual([620, 650, 700, 750, 760]);
  });

  it('move more and draw more the faster they are', () => {
    const options = listSpeedOptions(curve, system, 600, 3450);

    expect(options).toHaveLength(58);
    for (const [index, option] of options.entries()) {
      const before = options[index - 1];
      if (before === undefined) continue;
      expect(option.gpm).toBeGreaterThan(before.gpm);
      expect(option.watts).toBeGreaterThan(before.watts);
    }
  });

  it('count the drive’s unknown loss, none at the reference speed', () => {
    const [slow, fast] = [speedOptionAt(curve, system, 1700), speedOptionAt(curve, system, 3450)];

    expect(slow?.watts).toBeGreaterThan((wattsAt(curve, 1700, slow?.gpm ?? 0) ?? 0) + 30);
    expect(fast?.watts).toBeCloseTo(wattsAt(curve, 3450, fast?.gpm ?? 0) ?? 0, 6);
  });

  it('are taken at the curve’s end where the system asks for less, and move nothing against too much static head', () => {
    expect(speedOptionAt(curve, { staticFeet: 0, k: 1e-5 }, 3450)?.gpm).toBe(curve.endGpm);
    expect(speedOptionAt(curve, { staticFeet: 60, k: 0.01 }, 1000)?.gpm).toBe(0);
    expect(listSpeedOptions(curve, { staticFeet: 60, k: 0.01 }, 600, 3450)[0]?.rpm).toBeGreaterThan(2900);
  });

  it.each([
    [0, 3450, 50],
    [3450, 600, 50],
    [600, 3450, 0],
    [600, Number.POSITIVE_INFINITY, 50],
    [Number.NaN, 3450, 50],
  ])('are none from %s to %s rpm by %s', (least, most, step) => {
    expect(listSpeedOptions(curve, system, least, most, step)).toEqual([]);
  });
});
