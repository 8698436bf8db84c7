import { press } from '#simulator/pad-deeds.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import { type Fault, MINUTE_MS } from './fault.ts';
import { isClosed } from './pump-view.ts';

export const energizedWithoutFlow: Fault = {
  slug: 'energized-without-flow',
  detector: 'energized-without-flow',
  cause: 'cell',
  story: 'The pump was stopped at the keypad, and the clock goes on feeding what needs its water.',
  hours: [6, 28],
  needs: { stretchMs: 10 * MINUTE_MS },
  also: ['stopped', 'too-little-water', 'freezing'],
  suits: (spec) => spec.model.stopBeatsInputs && findUnguardedInput(spec) !== undefined,
  begin: (pump, at) => press(pump, { key: 'stop' }, at),
  end: (pump, at) => press(pump, { key: 'resume' }, at),
  shows: (pump) => pump.command.source === 'stop' && isClosed(pump, findUnguardedInput(pump.spec) ?? 0),
};

/** An input whose clock also feeds a heater, cell or feeder without a flow interlock of its own. */
export function findUnguardedInput({ equipment, contacts }: PumpSpec): number | undefined {
  return equipment.find(
    ({ kind, interlock, input }) =>
      interlock === 'none' &&
      ['heater', 'cell', 'feeder'].includes(kind) &&
      contacts.some(({ number, clock }) => number === input && clock !== undefined),
  )?.input;
}
