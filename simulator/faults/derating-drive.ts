import { addDeed } from '#simulator/pump.ts';
import { type Fault, HOUR_MS } from './fault.ts';
import { isSettled } from './pump-view.ts';

/** The speed a hot drive allows itself, rpm. */
const ALLOWED_RPM = 1900;

export const deratingDrive: Fault = {
  slug: 'derating-drive',
  detector: 'wrong-speed',
  cause: 'derating',
  story: 'The fan stands still: the drive is hot and takes the speed back.',
  hours: [20, 60],
  needs: { stretchMs: HOUR_MS },
  also: ['drive-hot'],
  suits: ({ settings, model, contacts }) =>
    model.says.temperatures &&
    contacts.some(({ clock, number }) => clock !== undefined && (settings.inputs[number - 1] ?? 0) > ALLOWED_RPM + 200),
  begin: (pump, at) => {
    pump.conditions.hotDriveCelsius = pump.spec.model.driveHotCelsius - 20;
    addDeed(pump, at + HOUR_MS, ({ conditions }) => {
      if (conditions.hotDriveCelsius > 0) conditions.limitRpm = ALLOWED_RPM;
    });
  },
  end: (pump) => {
    pump.conditions.hotDriveCelsius = 0;
    pump.conditions.limitRpm = undefined;
  },
  shows: (pump, at) =>
    pump.conditions.limitRpm !== undefined &&
    isSettled(pump, at) &&
    pump.command.source !== 'prime' &&
    pump.command.rpm > ALLOWED_RPM + 100,
};
