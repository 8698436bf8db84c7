import { padCelsius } from '#simulator/decide.ts';
import { driveRise } from '#simulator/physics/drive-heat.ts';
import { type Fault, HOUR_MS } from './fault.ts';

export const driveHot: Fault = {
  slug: 'drive-hot',
  detector: 'drive-hot',
  cause: null,
  story: 'The drive’s fins are full of lint and stand in the sun.',
  hours: [10, 60],
  needs: { stretchMs: HOUR_MS },
  also: [],
  suits: ({ model, settings }) => model.says.temperatures && settings.program.length > 0,
  begin: (pump) => {
    pump.conditions.hotDriveCelsius = pump.spec.model.driveHotCelsius - 8;
  },
  end: (pump) => {
    pump.conditions.hotDriveCelsius = 0;
  },
  shows: (pump, at) => padCelsius(pump, at) + driveRise(pump.heat, at) > pump.spec.model.driveHotCelsius + 1,
};
