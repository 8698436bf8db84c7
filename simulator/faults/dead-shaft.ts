import { restartDrive } from '#simulator/pad-deeds.ts';
import { type Fault, HOUR_MS } from './fault.ts';

export const deadShaft: Fault = {
  slug: 'dead-shaft',
  detector: 'stopped',
  cause: 'unknown',
  story: 'The motor believes that it runs, and the shaft stands still.',
  hours: [1, 12],
  needs: { stretchMs: 0.75 * HOUR_MS },
  also: ['failed-prime', 'energized-without-flow', 'too-little-water', 'freezing', 'wrong-speed'],
  suits: ({ settings }) => settings.program.length > 0,
  begin: (pump) => {
    pump.conditions.deadShaft = true;
  },
  end: (pump) => {
    pump.conditions.deadShaft = false;
    restartDrive(pump);
  },
  shows: (pump) => pump.command.rpm > 0 && pump.shaft.targetRpm === 0,
};
