import { estimateFlow } from '#shared/domain/hydraulics/estimate-flow.ts';
import { METER_AS_FITTED } from '#shared/domain/hydraulics/meter-error.ts';
import { pumpsOfChance } from '#tests/shared/domain/hydraulics/pumps-of-chance.ts';
import { type Bench, quantile } from './bench.ts';

const READINGS = 5000;

/** How well the virtual flow meter does at high speed, against the simulator's own physics. */
export const flowMeter: Bench = {
  name: 'flow-meter',
  about: `the virtual flow meter at ${READINGS} high-speed readings, as fitted`,
  run: async () => {
    let [inside, answers, asked] = [0, 0, 0];
    const sigmas: number[] = [];
    for (const { curve, random, read } of pumpsOfChance(READINGS)) {
      const rpm = random.between(2450, 3450);
      const { gpm, watts } = read(rpm);
      const answer = estimateFlow(curve, { rpm, watts }, METER_AS_FITTED);
      asked += 1;
      if (answer.kind !== 'estimate') continue;
      answers += 1;
      sigmas.push(answer.sigmaGpm / answer.gpm);
      if (Math.abs(answer.gpm - gpm) <= 2 * answer.sigmaGpm) inside += 1;
    }
    return [
      { name: 'true flow inside two sigma', value: (100 * inside) / answers, unit: '%', atLeast: 90 },
      { name: 'readings with an answer', value: (100 * answers) / asked, unit: '%' },
      { name: 'one sigma, middle', value: 100 * quantile(sigmas, 0.5), unit: '% of the flow' },
    ];
  },
};
