import { describe, expect, it } from 'vitest';
import { aimDriveHeat, driveRise } from '#simulator/physics/drive-heat.ts';
import { createDirt, passWater } from '#simulator/physics/filter.ts';
import { aimShaft, createShaft, shaftRpm } from '#simulator/physics/shaft.ts';

describe('a shaft', () => {
  it('ramps up and down at its own rates and holds its speed', () => {
    const shaft = createShaft(0);
    aimShaft(shaft, 3000, 300, 600, 0);
    expect([shaftRpm(shaft, 0), shaftRpm(shaft, 5000), shaftRpm(shaft, 10_000), shaftRpm(shaft, 60_000)]).toEqual([
      0, 1500, 3000, 3000,
    ]);

    aimShaft(shaft, 1200, 300, 600, 60_000);
    expect([shaftRpm(shaft, 61_000), shaftRpm(shaft, 63_000)]).toEqual([2400, 1200]);
    expect(shaft.settlesAt).toBe(63_000);
  });

  it('turns round in the middle of a ramp', () => {
    const shaft = createShaft(0);
    aimShaft(shaft, 3000, 300, 600, 0);
    aimShaft(shaft, 0, 300, 600, 5000);

    expect(shaftRpm(shaft, 6000)).toBe(900);
    expect(shaftRpm(shaft, 8000)).toBe(0);
  });
});

describe('a drive', () => {
  it('warms with its load over a quarter of an hour or so, and cools again', () => {
    const heat = { riseCelsius: 4, since: 0, targetCelsius: 4 };
    aimDriveHeat(heat, 1, 0, 0);
    expect(driveRise(heat, 60_000)).toBeLessThan(8);
    expect(driveRise(heat, 7_200_000)).toBeCloseTo(34, 0);

    aimDriveHeat(heat, 0, 50, 7_200_000);
    expect(driveRise(heat, 14_400_000)).toBeCloseTo(4, 0);
  });
});

describe('a filter', () => {
  it('gets dirty with the water that passes and not with time', () => {
    const dirt = createDirt(0);
    const rates = { filterPerKilogallon: 0.0005, basketPerKilogallon: 0.001 };
    passWater(dirt, rates, 50, 3_600_000);
    passWater(dirt, rates, 0, 90_000_000);

    expect(dirt.gallons).toBeCloseTo(3000, 6);
    expect(dirt.filter).toBeCloseTo(1.0015, 9);
  });
});
