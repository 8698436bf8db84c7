import { type Fault, HOUR_MS } from './fault.ts';

export const silentLink: Fault = {
  slug: 'silent-link',
  detector: 'silent',
  cause: 'link',
  story: 'The customer’s router is off; the device stores what it measures and sends it all afterwards.',
  hours: [2, 11],
  needs: { stretchMs: 1.25 * HOUR_MS },
  also: [],
  suits: () => true,
  begin: (pump) => {
    pump.linkUp = false;
  },
  end: (pump) => {
    pump.linkUp = true;
  },
  shows: (pump) => !pump.linkUp,
};
