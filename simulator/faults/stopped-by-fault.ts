import { restartDrive } from '#simulator/pad-deeds.ts';
import { type Fault, HOUR_MS } from './fault.ts';
import { isDue } from './pump-view.ts';

export const stoppedByFault: Fault = {
  slug: 'stopped-by-fault',
  detector: 'stopped',
  cause: 'fault',
  story: 'The drive tripped and says only that it has a fault, no code.',
  hours: [1, 12],
  needs: { stretchMs: 0.75 * HOUR_MS },
  also: ['drive-fault', 'energized-without-flow', 'too-little-water', 'freezing'],
  suits: ({ settings }) => settings.program.length > 0,
  begin: (pump) => {
    pump.firmware.fault = { code: undefined };
  },
  end: (pump) => restartDrive(pump),
  shows: (pump, at) => pump.command.source === 'fault' && isDue(pump, at),
};
