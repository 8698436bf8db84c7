import { describe, expect, it } from 'vitest';
import { estimateFlow } from '#shared/domain/hydraulics/estimate-flow.ts';
import { METER_AS_FITTED } from '#shared/domain/hydraulics/meter-error.ts';
import { meterFlow } from '#shared/domain/hydraulics/meter-flow.ts';
import { estimateDaySystem } from '#shared/domain/hydraulics/system-estimate.ts';
import { pumpsOfChance } from './pumps-of-chance.ts';

describe('virtual flow meter against physics it does not share', () => {
  it('holds the true flow within two sigmas nine times out of ten at high speed, and answers more often than not', () => {
    let [inside, answers, asked] = [0, 0, 0];
    for (const { curve, random, read } of pumpsOfChance(2000)) {
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
    for (const { curve, random, read } of pumpsOfChance(1000)) {
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
