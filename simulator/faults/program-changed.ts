import { changeSettings, restoreSettings } from '#simulator/pad-deeds.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import { type Fault, HOUR_MS } from './fault.ts';

const EVERY_DAY = [true, true, true, true, true, true, true];

export const programChanged: Fault = {
  slug: 'program-changed',
  detector: 'unexpected-run',
  cause: 'program-changed',
  story: 'Somebody added an entry at the keypad: it runs at night as well.',
  hours: [30, 100],
  needs: { stretchMs: 1.5 * HOUR_MS },
  also: ['settings-changed', 'motor-clock'],
  // A motor that reports its settings gives it away at once; this is for those that do not.
  suits: (spec) => !spec.model.says.settings && findIdleNight(spec) !== undefined,
  begin: (pump) => {
    const night = findIdleNight(pump.spec);
    if (night === undefined) return;
    const entry = { days: EVERY_DAY, fromMinute: night, toMinute: night + 150, rpm: 1500 };
    changeSettings(pump, { program: [...pump.settings.program, entry] });
  },
  end: (pump) => restoreSettings(pump),
  shows: (pump) => pump.command.source === 'program' && pump.command.rpm === 1500,
};

/** The start of two and a half hours around midnight in which the commissioned program has nothing to do. */
function findIdleNight({ settings }: PumpSpec): number | undefined {
  const isIdle = (minute: number) =>
    settings.program.every(({ fromMinute, toMinute }) =>
      toMinute > fromMinute ? minute < fromMinute || minute >= toMinute : minute < fromMinute && minute >= toMinute,
    );
  return [75, 45].find((start) => [0, 50, 100, 150].every((later) => isIdle(start + later)));
}
