import { press } from '#simulator/pad-deeds.ts';
import type { EquipmentSpec, PumpSpec } from '#simulator/pump-spec.ts';
import { type Fault, MINUTE_MS } from './fault.ts';
import { isClosed } from './pump-view.ts';

export const energizedWithoutFlow: Fault = {
  slug: 'energized-without-flow',
  detector: 'energized-without-flow',
  cause: 'cell',
  causeOn: (spec) => findUnguarded(spec)?.kind ?? 'cell',
  story: 'The pump was stopped at the keypad, and the clock goes on feeding what needs its water.',
  hours: [25, 30],
  needs: { stretchMs: 10 * MINUTE_MS },
  also: ['stopped', 'too-little-water', 'freezing'],
  suits: (spec) => spec.model.stopBeatsInputs && findUnguarded(spec) !== undefined,
  begin: (pump, at) => press(pump, { key: 'stop' }, at),
  end: (pump, at) => press(pump, { key: 'resume' }, at),
  shows: (pump) => pump.command.source === 'stop' && isClosed(pump, findUnguarded(pump.spec)?.input ?? 0),
};

/** Equipment without a flow interlock of its own that a clock feeds together with an input. */
function findUnguarded({ equipment, contacts }: PumpSpec): EquipmentSpec | undefined {
  return equipment.find(
    ({ kind, interlock, input }) =>
      interlock === 'none' &&
      ['heater', 'cell', 'feeder'].includes(kind) &&
      contacts.some(({ number, clock }) => number === input && clock !== undefined),
  );
}
