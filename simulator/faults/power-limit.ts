import { type Fault, MINUTE_MS } from './fault.ts';
import { isSettled } from './pump-view.ts';

/** The speed left when the drive holds its power down, rpm. */
const HELD_RPM = 2150;

export const powerLimit: Fault = {
  slug: 'power-limit',
  detector: 'wrong-speed',
  cause: 'power-limit',
  story: 'Something rubs so hard that the drive reaches its power limit and holds the speed down.',
  hours: [20, 60],
  needs: { stretchMs: 20 * MINUTE_MS },
  also: ['high-load'],
  suits: ({ settings, contacts }) =>
    contacts.some(({ clock, number }) => clock !== undefined && (settings.inputs[number - 1] ?? 0) > HELD_RPM + 200),
  begin: (pump) => {
    pump.conditions.rubbing = 0.9;
    pump.conditions.limitRpm = HELD_RPM;
  },
  end: (pump) => {
    pump.conditions.rubbing = 0;
    pump.conditions.limitRpm = undefined;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime' && pump.command.rpm > HELD_RPM + 100,
};
