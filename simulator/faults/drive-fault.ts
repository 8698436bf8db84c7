import { restartDrive } from '#simulator/pad-deeds.ts';
import type { Fault } from './fault.ts';

export const driveFault: Fault = {
  slug: 'drive-fault',
  detector: 'drive-fault',
  cause: 'E07',
  story: 'The drive trips on over-current and shows its code.',
  hours: [0.3, 8],
  needs: { stretchMs: 60_000 },
  also: ['stopped', 'energized-without-flow', 'too-little-water', 'freezing'],
  suits: () => true,
  begin: (pump) => {
    pump.firmware.fault = { code: 'E07' };
  },
  end: (pump) => restartDrive(pump),
  shows: (pump) => pump.powered && pump.firmware.fault !== undefined,
};
