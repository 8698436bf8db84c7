import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { acknowledge, WITHDRAW_WITHIN_MS, withdrawAcknowledgement } from '#shared/domain/alarms/acknowledge.ts';
import type { AlarmRecord, AlarmStep } from '#shared/domain/alarms/alarm-record.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import { escalatesAt, passTime } from '#shared/domain/alarms/escalate.ts';
import {
  endShelf,
  endSuppression,
  LONGEST_SHELF_MS,
  returnToService,
  shelve,
  suppress,
  takeOutOfService,
} from '#shared/domain/alarms/set-aside.ts';
import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';

const MINUTE = 60_000;

const raised = (at: number, overrides: Partial<Extract<AlarmSignal, { type: 'raised' }>> = {}): AlarmSignal => ({
  type: 'raised',
  detector: 'failed-prime',
  alarmClass: 'alarm',
  priority: 'urgent',
  from: at - 1000,
  at,
  cause: 'unknown',
  evidence: {},
  ...overrides,
});
const cleared = (at: number): AlarmSignal => ({ type: 'cleared', detector: 'failed-prime', at, evidence: {} });
const seen = (at: number) => ({ by: 'ada', at, note: null });

function play(...signals: readonly AlarmSignal[]): AlarmRecord {
  let record: AlarmRecord | undefined;
  for (const signal of signals) record = applySignal(record, signal)?.record ?? record;
  if (record === undefined) throw new Error('no alarm was raised');
  return record;
}

const kind = (step: AlarmStep | undefined) => step?.transition?.kind;

// States and their order: ANSI/ISA-18.2, from memory; chattering rule quoted in the facts, section 5.
describe('life of an alarm', () => {
  it('waits for an acknowledgement from the moment it is raised', () => {
    expect(play(raised(0))).toMatchObject({ state: 'unacknowledged', active: true, count: 1 });
  });

  it('stays when it is acknowledged: an acknowledgement never clears a condition', () => {
    const step = acknowledge(play(raised(0)), seen(10));

    expect(step.record).toMatchObject({ state: 'acknowledged', active: true, acknowledgedBy: 'ada' });
    expect(kind(acknowledge(step.record, seen(20)))).toBeUndefined();
  });

  it('is history once it has returned and was acknowledged, in either order', () => {
    const first = acknowledge(play(raised(0)), seen(10)).record;
    expect(applySignal(first, cleared(20))?.record.state).toBe('normal');

    const returned = play(raised(0), cleared(20));
    expect(returned.state).toBe('returned');
    expect(acknowledge(returned, seen(30)).record.state).toBe('normal');
  });

  it('counts a second raise before its return is acknowledged', () => {
    expect(play(raised(0), cleared(5 * MINUTE), raised(9 * MINUTE))).toMatchObject({
      state: 'unacknowledged',
      count: 2,
      raisedAt: 0,
    });
  });

  it('is a new alarm when raised after its history was closed', () => {
    const closed = acknowledge(play(raised(0), cleared(5 * MINUTE)), seen(6 * MINUTE)).record;

    expect(applySignal(closed, raised(9 * MINUTE))?.record).toMatchObject({ count: 1, raisedAt: 9 * MINUTE });
  });

  it('latches at the third return within a minute and waits for a person', () => {
    const chattering = play(
      raised(0),
      cleared(10_000),
      raised(15_000),
      cleared(25_000),
      raised(30_000),
      cleared(40_000),
    );

    expect(chattering.state).toBe('latched');
    expect(applySignal(chattering, raised(50_000))?.record).toMatchObject({ state: 'latched', active: true, count: 4 });
    expect(acknowledge(chattering, seen(60_000)).record.state).toBe('normal');
  });

  it('does not latch at three returns over a longer time', () => {
    expect(
      play(raised(0), cleared(10_000), raised(40_000), cleared(50_000), raised(80_000), cleared(90_000)).state,
    ).toBe('returned');
  });

  it('asks again when an acknowledged alarm becomes worse, not when it becomes better', () => {
    const soon = acknowledge(play(raised(0, { priority: 'soon' })), seen(1)).record;
    const worse = applySignal(soon, { ...raised(10), type: 'changed' } as AlarmSignal)?.record;
    expect(worse).toMatchObject({ state: 'unacknowledged', priority: 'urgent' });

    const urgent = acknowledge(play(raised(0)), seen(1)).record;
    expect(
      applySignal(urgent, { ...raised(10, { priority: 'soon' }), type: 'changed' } as AlarmSignal)?.record.state,
    ).toBe('acknowledged');
  });

  it('needs no acknowledgement for the return of a note', () => {
    expect(play(raised(0, { alarmClass: 'note', priority: 'note' }), cleared(10)).state).toBe('normal');
  });

  it('ignores a signal for an alarm that is not open', () => {
    expect(applySignal(undefined, cleared(0))).toBeUndefined();
  });
});

describe('time and an alarm', () => {
  it('escalates an urgent one after 15 minutes and one to be seen soon after 4 hours, once', () => {
    expect(escalatesAt(play(raised(0)))).toBe(15 * MINUTE);
    expect(escalatesAt(play(raised(0, { priority: 'soon' })))).toBe(240 * MINUTE);
    expect(escalatesAt(play(raised(0, { priority: 'note', alarmClass: 'note' })))).toBeUndefined();

    const step = passTime(play(raised(0)), 15 * MINUTE);
    expect(kind(step)).toBe('escalated');
    expect(step && passTime(step.record, 20 * MINUTE)).toBeUndefined();
  });

  it('asks again when an acknowledged alarm is still active long after', () => {
    const record = acknowledge(play(raised(0)), seen(MINUTE)).record;

    expect(passTime(record, 11 * 60 * MINUTE)).toBeUndefined();
    expect(kind(passTime(record, MINUTE + 12 * 60 * MINUTE))).toBe('re-alarmed');
  });
});

describe('setting an alarm aside', () => {
  it('shelves with a reason, for a week at most, and ends by itself', () => {
    const record = play(raised(0));
    const act = { by: 'ada', at: 0, until: 60 * MINUTE };

    expect(shelve(record, { ...act, reason: '  ' })).toBeUndefined();
    expect(shelve(record, { ...act, reason: 'part ordered', until: LONGEST_SHELF_MS + 1 })).toBeUndefined();
    const shelved = shelve(record, { ...act, reason: 'part ordered' });
    expect(shelved && escalatesAt(shelved.record)).toBeUndefined();
    expect(kind(shelved && passTime(shelved.record, 60 * MINUTE))).toBe('shelf-ended');
    expect(shelved && kind(endShelf(shelved.record, { by: 'ada', at: 5 }))).toBe('shelf-ended');
  });

  it('keeps an alarm quiet while suppressed by design or out of service', () => {
    const explained = suppress(play(raised(0)), { at: 1, explainedBy: 'power-cut' }).record;
    expect(escalatesAt(explained)).toBeUndefined();
    expect(escalatesAt(endSuppression(explained, 5 * MINUTE).record)).toBe(20 * MINUTE);
    const away = takeOutOfService(play(raised(0)), { by: 'ada', at: 1, reason: 'motor removed' });
    expect(away && escalatesAt(away.record)).toBeUndefined();
    expect(away && escalatesAt(returnToService(away.record, { by: 'ada', at: 5 * MINUTE }).record)).toBe(20 * MINUTE);
  });

  it('lets a person take back only their own acknowledgement, within five minutes, and gains no time by it', () => {
    const record = acknowledge(play(raised(0)), seen(MINUTE)).record;

    expect(withdrawAcknowledgement(record, { by: 'bo', at: 2 * MINUTE })).toBeUndefined();
    expect(withdrawAcknowledgement(record, { by: 'ada', at: MINUTE + WITHDRAW_WITHIN_MS + 1 })).toBeUndefined();
    const back = withdrawAcknowledgement(record, { by: 'ada', at: 3 * MINUTE });
    expect(back && escalatesAt(back.record)).toBe(15 * MINUTE);
  });
});

it('keeps state and activity in step under any order of events', () => {
  const step = fc.constantFrom('raise', 'clear', 'acknowledge', 'time');
  fc.assert(
    fc.property(fc.array(fc.tuple(step, fc.integer({ min: 1, max: 600 })), { maxLength: 40 }), (steps) => {
      let record: AlarmRecord | undefined;
      let at = 0;
      for (const [what, seconds] of steps) {
        at += seconds * 1000;
        if (what === 'raise') record = applySignal(record, raised(at))?.record;
        else if (what === 'clear') record = applySignal(record, cleared(at))?.record ?? record;
        else if (record !== undefined)
          record = (what === 'time' ? passTime(record, at)?.record : acknowledge(record, seen(at)).record) ?? record;
        if (record === undefined) continue;
        if (record.state === 'normal' || record.state === 'returned') expect(record.active).toBe(false);
        if (record.state === 'acknowledged' || record.state === 'unacknowledged') expect(record.active).toBe(true);
        expect(record.active).toBe(record.returnedAt === null);
      }
    }),
  );
});
