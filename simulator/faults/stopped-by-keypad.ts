import { press } from '#simulator/pad-deeds.ts';
import { type Fault, HOUR_MS } from './fault.ts';
import { isDue } from './pump-view.ts';

export const stoppedByKeypad: Fault = {
  slug: 'stopped-by-keypad',
  detector: 'stopped',
  cause: 'keypad-stop',
  story: 'A visitor pressed stop because of the noise, and nobody started it again.',
  hours: [5, 40],
  needs: { stretchMs: 2.5 * HOUR_MS },
  also: ['energized-without-flow', 'too-little-water', 'freezing'],
  suits: ({ model, settings }) => model.stopBeatsInputs && settings.program.length > 0,
  begin: (pump, at) => press(pump, { key: 'stop' }, at),
  end: (pump, at) => press(pump, { key: 'resume' }, at),
  shows: (pump, at) => pump.command.source === 'stop' && isDue(pump, at),
};
