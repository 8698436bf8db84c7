import { describe, expect, it } from 'vitest';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { afterAct, undoOf } from '#src/features/alarms/after-act.ts';
import { groupByPad } from '#src/features/alarms/group-by-pad.ts';
import { listHoldEnds, mayEndAt, readPadTime } from '#src/features/alarms/hold-ends.ts';
import { listOffered, listOfferedForAll } from '#src/features/alarms/offered-acts.ts';
import { createFakeFleet } from '#tests/src/fake-api/fake-fleet.ts';

/** A Tuesday, 7:30 PM in Los Angeles. */
const NOW = Date.UTC(2026, 11, 2, 3, 30);
const HOUR = 3_600_000;
const ZONE = 'America/Los_Angeles';
const alarms = createFakeFleet(NOW).flatMap(({ alarm }) => alarm ?? []);
const alarm = alarms[0]!;
const note = alarms.find(({ alarmClass }) => alarmClass === 'note')!;
const who = { name: 'Ilse Ravn', now: NOW };

describe('when a hold may end', () => {
  const ends = (nextStopOn: string | null) => listHoldEnds({ zone: ZONE, nextStopOn, now: NOW });

  it('is reckoned in the pad’s time', () => {
    expect(ends(null).get('morning')).toBe(Date.UTC(2026, 11, 2, 16));
    expect(ends('2026-12-03').get('stop')).toBe(Date.UTC(2026, 11, 4, 2));
    expect(readPadTime('2026-12-03T14:30', ZONE)).toBe(Date.UTC(2026, 11, 3, 22, 30));
    expect(readPadTime('soon', ZONE)).toBeUndefined();
  });

  it('is in the future and within a week', () => {
    expect(ends('2026-12-01').has('stop')).toBe(false);
    expect(ends(null).has('stop')).toBe(false);
    expect([...ends('2026-12-08').values()].every((at) => mayEndAt(at, NOW))).toBe(true);
    expect([mayEndAt(NOW, NOW), mayEndAt(NOW + 169 * HOUR, NOW), mayEndAt(undefined, NOW)]).toEqual([
      false,
      false,
      false,
    ]);
  });
});

describe('what is offered', () => {
  it('works now, and is theirs who see it', () => {
    expect(listOffered(alarm, 'technician')).toEqual(['shelve', 'nothing-to-do']);
    expect(listOffered(alarm, 'manager')).toEqual(['shelve', 'nothing-to-do', 'assign', 'take-out-of-service']);
    expect(listOffered(note, 'technician')).toEqual(['work-off', 'shelve']);
    expect(listOffered(alarm, 'homeowner')).toEqual([]);
    expect(listOffered({ ...alarm, state: 'normal' }, 'manager')).toEqual([]);
    expect(listOffered({ ...alarm, shelvedUntil: NOW + HOUR }, 'technician')).toEqual(['unshelve', 'nothing-to-do']);
  });

  it('for several is what fits each of them', () => {
    const held = { ...alarm, shelvedUntil: NOW + HOUR };
    expect(listOfferedForAll([alarm, held], 'technician')).toEqual(['nothing-to-do']);
  });
});

describe('an act', () => {
  it('is shown before the server has answered', () => {
    const held = afterAct(alarm, { kind: 'shelve', until: NOW + HOUR, reason: 'why' }, who);
    expect(held).toMatchObject({ shelvedUntil: NOW + HOUR, shelvedBy: 'Ilse Ravn', shelvedReason: 'why' });
    expect(afterAct({ ...alarm, state: 'returned' }, { kind: 'nothing-to-do' }, who)).toMatchObject({
      state: 'normal',
      answer: { by: 'Ilse Ravn', note: null },
    });
    expect(afterAct(note, { kind: 'work-off', found: 'set it' }, who)).toMatchObject({ state: 'normal' });
  });

  it('has a way back, to what was before', () => {
    expect(undoOf(alarm, { kind: 'shelve', until: NOW + HOUR, reason: 'why' }, NOW)).toEqual({ kind: 'unshelve' });
    const held: Alarm = { ...alarm, shelvedUntil: NOW + HOUR, shelvedReason: 'why' };
    expect(undoOf(held, { kind: 'unshelve' }, NOW)).toEqual({ kind: 'shelve', until: NOW + HOUR, reason: 'why' });
    expect(undoOf(held, { kind: 'unshelve' }, NOW + 2 * HOUR)).toBeUndefined();
    const given: Alarm = { ...alarm, assignedTo: { id: 'a', name: 'A' } };
    const give = { kind: 'assign', technicianId: 'b' } as const;
    expect([undoOf(alarm, give, NOW), undoOf(given, give, NOW)]).toEqual([
      { kind: 'unassign' },
      { kind: 'assign', technicianId: 'a' },
    ]);
  });
});

it('gathers notes by pad, in the order of their coming', () => {
  const other = { ...note, id: 'x', padId: 'other' };
  const group = { ...note, id: 'g', padId: null };
  expect(groupByPad([note, other, { ...note, id: 'y' }, group]).map(({ notes }) => notes.length)).toEqual([2, 1, 1]);
});
