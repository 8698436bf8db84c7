import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createOutgoing, type OutgoingMessage } from '#simulator/device/outgoing.ts';

const reading = (at: number) => ({ at, rpm: 0, closedInputs: 0, activeInput: 0, watts: 6 });

describe('createOutgoing', () => {
  it('loses nothing and keeps the order, whatever the line does', () => {
    const step = fc.constantFrom('add', 'send', 'acknowledge', 'break');
    fc.assert(
      fc.property(fc.array(step, { maxLength: 200 }), (steps) => {
        const outgoing = createOutgoing();
        const stored: number[] = [];
        let inFlight: OutgoingMessage[] = [];
        let added = 0;
        for (const name of [
          ...steps,
          'break',
          ...Array.from({ length: 300 }, (_, index) => (index % 2 === 0 ? 'send' : 'acknowledge')),
        ]) {
          if (name === 'add') outgoing.add(reading(++added));
          if (name === 'break') {
            outgoing.takeBack();
            inFlight = [];
          }
          if (name === 'send') {
            const message = outgoing.next();
            if (message !== undefined) inFlight.push(message);
          }
          const first = name === 'acknowledge' ? inFlight.shift() : undefined;
          if (first === undefined) continue;
          outgoing.acknowledge(first);
          stored.push(...first.readings.map(({ at }) => at));
        }

        expect(stored).toEqual(Array.from({ length: added }, (_, index) => index + 1));
        expect(outgoing.waiting()).toBe(0);
      }),
    );
  });

  it('sends at most 500 readings in a message and eight messages at once', () => {
    const outgoing = createOutgoing();
    for (let at = 1; at <= 4320; at += 1) outgoing.add(reading(at));
    const messages = Array.from({ length: 12 }, () => outgoing.next()).filter((message) => message !== undefined);

    expect(messages.map(({ readings }) => readings.length)).toEqual(Array.from({ length: 8 }, () => 500));
  });

  it('drops the oldest when its store is full', () => {
    const outgoing = createOutgoing();
    for (let at = 1; at <= 5000; at += 1) outgoing.add(reading(at));

    expect(outgoing.next()?.readings[0]?.at).toBe(681);
  });
});
