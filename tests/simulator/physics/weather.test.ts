import { describe, expect, it } from 'vitest';
import { lineVolts } from '#simulator/physics/line-voltage.ts';
import { airCelsius, createClimate } from '#simulator/physics/weather.ts';
import { createRandom } from '#simulator/random.ts';

const HOUR = 3_600_000;
const DAY = 24 * HOUR;
const climate = createClimate(createRandom('weather'), {
  meanCelsius: 16,
  seasonCelsius: 6,
  dayCelsius: 5,
  frontCelsius: 2,
});
const july = Date.UTC(2026, 6, 20);
const january = Date.UTC(2026, 0, 20);

function meanOf(start: number, days: number): number {
  const hours = Array.from({ length: days * 24 }, (_, index) =>
    airCelsius(climate, [], start + index * HOUR, start + index * HOUR),
  );
  return hours.reduce((sum, value) => sum + value, 0) / hours.length;
}

describe('airCelsius', () => {
  it('is warmer in summer than in winter, by the season’s swing', () => {
    expect(meanOf(july, 20) - meanOf(january, 20)).toBeCloseTo(12, -1);
  });

  it('has its warmest hour in the afternoon and its coldest before dawn', () => {
    const hours = Array.from({ length: 24 }, (_, hour) => airCelsius(climate, [], july, july + hour * HOUR));

    expect(hours.indexOf(Math.max(...hours))).toBe(15);
    expect(hours.indexOf(Math.min(...hours))).toBe(3);
  });

  it('gets through a heat wave and comes back', () => {
    const spell = { from: july, until: july + 4 * DAY, byCelsius: 12 };
    const more = (at: number) => airCelsius(climate, [spell], at, at) - airCelsius(climate, [], at, at);

    expect(more(july + 2 * DAY)).toBeCloseTo(12, 9);
    expect(more(july + 3 * HOUR)).toBeCloseTo(6, 9);
    expect(more(july + 5 * DAY)).toBe(0);
  });

  it('has other fronts in another area', () => {
    const other = createClimate(createRandom('elsewhere'), climate);

    expect(airCelsius({ ...climate, phases: other.phases }, [], july, july)).not.toBe(
      airCelsius(climate, [], july, july),
    );
  });
});

describe('lineVolts', () => {
  it('is lowest in the early evening and stays within its swing', () => {
    const supply = { standingVolts: 238, swingVolts: 2 };
    const hours = Array.from({ length: 48 }, (_, half) => lineVolts(supply, 1, (half * HOUR) / 2));

    expect(hours.indexOf(Math.min(...hours))).toBe(37);
    expect(Math.max(...hours)).toBeLessThanOrEqual(240);
    expect(lineVolts(supply, 0.5, 0)).toBeCloseTo(lineVolts(supply, 1, 0) / 2, 9);
  });
});
