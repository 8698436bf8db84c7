import { CONTACT_DEBOUNCE_MS } from '#shared/contract/mqtt/wire-limits.ts';
import { readTimeClock } from './clocks/time-clock.ts';
import type { Contact, Pump } from './pump.ts';

type Closed = { readonly closed: number; readonly until: number };

/** The mask of closed contacts as the device believes it, and when that can next change. */
export function readContacts(pump: Pump, at: number): Closed {
  const { conditions } = pump;
  // The device believes a contact a quarter of a second after it moved.
  const moved = at - CONTACT_DEBOUNCE_MS;
  let closed = 0;
  let until = Number.POSITIVE_INFINITY;
  for (const contact of pump.contacts) {
    const state = readContact(contact, moved);
    const latched = (conditions.latchesClosed & pump.closed & contact.bit) !== 0;
    if (state.closed || latched) closed |= contact.bit;
    until = Math.min(until, state.until + CONTACT_DEBOUNCE_MS);
  }
  closed = (closed | conditions.heldClosed | conditions.stuckClosed) & ~conditions.cutWires;
  if (conditions.leversOff) closed &= ~clockBits(pump);
  return flicker(pump, at, { closed: closed ^ conditions.flicker, until });
}

function clockBits(pump: Pump): number {
  return pump.contacts.reduce((mask, { bit, clock }) => (clock === undefined ? mask : mask | bit), 0);
}

function readContact(contact: Contact, at: number): { readonly closed: boolean; readonly until: number } {
  if (contact.clock !== undefined) return readTimeClock(contact.clock, at);
  return contact.habit?.read(at) ?? { closed: false, until: Number.POSITIVE_INFINITY };
}

/** A contact that will not hold opens and closes in bursts, and only while something would close it. */
function flicker(pump: Pump, at: number, state: Closed): Closed {
  const { chatter } = pump.conditions;
  if (chatter === undefined) return state;
  if (at >= chatter.nextAt) {
    const resting = chatter.burstLeft <= 0;
    chatter.burstLeft = resting ? pump.chance.integer(10, 24) : chatter.burstLeft - 1;
    const wait =
      chatter.burstLeft > 0 ? pump.chance.between(700, 14_000) : chatter.meanRestMs * pump.chance.between(0.5, 1.5);
    chatter.nextAt = at + Math.round(wait);
  }
  const until = Math.min(state.until, chatter.nextAt);
  const opensNow = chatter.burstLeft % 2 === 1;
  return opensNow ? { closed: state.closed & ~chatter.bit, until } : { closed: state.closed, until };
}

/** The mask at the motor's own terminals: leads may be swapped, a terminal may not sense. */
export function sensedByMotor(pump: Pump): number {
  const { swapped, ignores } = pump.conditions;
  return (swapped === undefined ? pump.closed : swapBits(pump.closed, swapped)) & ~ignores;
}

function swapBits(mask: number, [first, second]: readonly [number, number]): number {
  const firstBit = 1 << (first - 1);
  const secondBit = 1 << (second - 1);
  const rest = mask & ~(firstBit | secondBit);
  return rest | ((mask & firstBit) !== 0 ? secondBit : 0) | ((mask & secondBit) !== 0 ? firstBit : 0);
}
