import type { Fault } from './fault.ts';

export const supplySag: Fault = {
  slug: 'supply-sag',
  detector: 'supply-voltage',
  cause: 'sag',
  story: 'A neighbour’s big motor starts: for a minute or two the line sags to under four fifths.',
  hours: [0.03, 0.06],
  needs: { stretchMs: 35_000 },
  also: [],
  suits: ({ model }) => model.says.volts,
  begin: (pump) => {
    pump.conditions.supplyShare = 0.78;
  },
  end: (pump) => {
    pump.conditions.supplyShare = 1;
  },
  shows: (pump) => pump.powered,
};
