import { type Fault, MINUTE_MS } from './fault.ts';
import { isSettled } from './pump-view.ts';

/** How far from any speed it is set to, rpm. */
const CLEAR_RPM = 150;

export const unknownSpeed: Fault = {
  slug: 'unknown-speed',
  detector: 'wrong-speed',
  cause: 'unknown-speed',
  story: 'The drive lost its calibration: it runs at a speed that nothing calls for.',
  hours: [6, 60],
  needs: { stretchMs: 8 * MINUTE_MS },
  also: ['low-load', 'high-load'],
  suits: ({ settings }) => settings.program.length > 0 && Number.isFinite(strangeRpm(settings)),
  begin: (pump) => {
    pump.conditions.overrideRpm = strangeRpm(pump.spec.settings);
  },
  end: (pump) => {
    pump.conditions.overrideRpm = undefined;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime',
};

/** The first of a few speeds that lies clear of everything the motor is set to; NaN when none does. */
function strangeRpm({ inputs, program, prime, freeze }: Parameters<typeof unknownSpeed.suits>[0]['settings']): number {
  const set = [...inputs, ...program.map(({ rpm }) => rpm), prime?.rpm, freeze?.rpm];
  const isClear = (rpm: number) => set.every((other) => typeof other !== 'number' || Math.abs(other - rpm) > CLEAR_RPM);
  return [2030, 1950, 2130, 1500, 2580].find(isClear) ?? Number.NaN;
}
