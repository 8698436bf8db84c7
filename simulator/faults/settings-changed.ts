import { changeSettings, restoreSettings } from '#simulator/pad-deeds.ts';
import { type Fault, MINUTE_MS } from './fault.ts';

export const settingsChanged: Fault = {
  slug: 'settings-changed',
  detector: 'settings-changed',
  cause: null,
  story: 'The speed of the program was turned down at the keypad.',
  hours: [20, 120],
  needs: { stretchMs: 5 * MINUTE_MS },
  also: ['wrong-speed', 'too-little-water', 'unexpected-run'],
  suits: ({ model, settings }) => model.says.settings && settings.program.some(({ rpm }) => rpm >= 1500),
  begin: (pump) => {
    const program = pump.settings.program.map((entry) => ({ ...entry, rpm: entry.rpm - 250 }));
    changeSettings(pump, { program });
  },
  end: (pump) => restoreSettings(pump),
  shows: (pump) => pump.settings !== pump.spec.settings,
};
