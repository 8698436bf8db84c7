import { type Fault, MINUTE_MS } from './fault.ts';

export const supplyStanding: Fault = {
  slug: 'supply-standing',
  detector: 'supply-voltage',
  cause: 'standing',
  story: 'A tap at the transformer is wrong: the street stands an eighth too high or too low.',
  hours: [3, 40],
  needs: { stretchMs: 20 * MINUTE_MS },
  also: [],
  suits: ({ model }) => model.says.volts,
  begin: (pump) => {
    pump.conditions.supplyShare = pump.chance.chance(0.5) ? 1.135 : 0.87;
  },
  end: (pump) => {
    pump.conditions.supplyShare = 1;
  },
  shows: (pump) => pump.powered,
};
