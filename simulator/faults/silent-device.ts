import { type Fault, HOUR_MS } from './fault.ts';

export const silentDevice: Fault = {
  slug: 'silent-device',
  detector: 'silent',
  cause: 'device',
  story: 'The device has hung itself up; it measures nothing until somebody restarts it.',
  hours: [2, 30],
  needs: { stretchMs: 1.25 * HOUR_MS },
  also: [],
  suits: () => true,
  begin: (pump) => {
    pump.conditions.hung = true;
  },
  end: (pump, at) => {
    pump.conditions.hung = false;
    pump.boots += 1;
    pump.poweredSince = at;
  },
  shows: (pump) => pump.conditions.hung,
};
