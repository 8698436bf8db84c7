import { type Fault, HOUR_MS } from './fault.ts';

export const unaskedRun: Fault = {
  slug: 'unasked-run',
  detector: 'unexpected-run',
  cause: 'unknown',
  story: 'The drive runs on when nothing calls for it, and says that it is off.',
  hours: [20, 60],
  needs: { stretchMs: 1.5 * HOUR_MS },
  also: ['wrong-speed'],
  suits: ({ settings }) =>
    settings.program.length > 0 &&
    settings.program.every(({ fromMinute, toMinute }) => toMinute > fromMinute && toMinute - fromMinute < 1000),
  begin: (pump) => {
    pump.conditions.unaskedRpm = 1380;
  },
  end: (pump) => {
    pump.conditions.unaskedRpm = undefined;
  },
  shows: (pump) => pump.command.source === 'off' && pump.shaft.targetRpm > 0,
};
