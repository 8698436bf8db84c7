import { type Fault, MINUTE_MS } from './fault.ts';
import { isSettled } from './pump-view.ts';

export const strangeActiveInput: Fault = {
  slug: 'strange-active-input',
  detector: 'input-disagreement',
  cause: 'unknown',
  story: 'The motor runs the right speed but says that it obeys an input nobody wired.',
  hours: [10, 60],
  needs: { stretchMs: 5 * MINUTE_MS },
  also: [],
  suits: ({ contacts, settings, model }) =>
    contacts.some((contact) => contact.clock !== undefined) && settings.inputs[model.inputCount - 1] === null,
  begin: (pump) => {
    pump.conditions.saysActive = pump.spec.model.inputCount;
  },
  end: (pump) => {
    pump.conditions.saysActive = undefined;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source === 'input',
};
