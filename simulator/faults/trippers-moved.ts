import { planTrippers, type Trippers } from '#simulator/clocks/time-clock.ts';
import type { Pump } from '#simulator/pump.ts';
import type { Fault } from './fault.ts';
import { findClockInput, getClockContact } from './pump-view.ts';

export const trippersMoved: Fault = {
  slug: 'trippers-moved',
  detector: 'clock-shift',
  cause: 'trippers-moved',
  story: 'The gardener moved the trippers, so that the cleaner runs after he is gone.',
  hours: [110, 220],
  needs: { days: 4 },
  also: ['missing-input', 'stuck-input'],
  suits: (spec) => findClockInput(spec) !== undefined,
  begin: (pump) => moveTrippers(pump, Math.round(pump.chance.between(50, 100))),
  end: (pump) => moveTrippers(pump, 0),
  shows: () => true,
};

function moveTrippers(pump: Pump, byMinutes: number): void {
  const { clock, number } = getClockContact(pump);
  const trippers = pump.spec.contacts.find((contact) => contact.number === number)?.clock?.trippers ?? [];
  const moved: Trippers[] = trippers.map((tripper) => ({
    ...tripper,
    onMinute: (tripper.onMinute + byMinutes) % 1440,
    offMinute: (tripper.offMinute + byMinutes) % 1440,
  }));
  if (clock !== undefined) clock.plan = planTrippers(moved);
}
