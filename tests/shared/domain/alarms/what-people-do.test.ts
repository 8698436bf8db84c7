import { describe, expect, it } from 'vitest';
import { acknowledge, WITHDRAW_WITHIN_MS, withdrawAcknowledgement } from '#shared/domain/alarms/acknowledge.ts';
import { type AlarmRecord, isAnnounced } from '#shared/domain/alarms/alarm-record.ts';
import { answerNothingToDo, withdrawAnswer } from '#shared/domain/alarms/answer.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import { CURED_WITHIN_MS } from '#shared/domain/alarms/apply-to-done.ts';
import { assign, endAssignment, markTold } from '#shared/domain/alarms/assign.ts';
import { escalatesAt, passTime } from '#shared/domain/alarms/escalate.ts';
import { endExplanation, explanationOf, partsOf } from '#shared/domain/alarms/explanation.ts';
import { readRecord } from '#shared/domain/alarms/read-record.ts';
import { withdrawDone, workOff } from '#shared/domain/alarms/work-off.ts';
import type { AlarmSignal, Detector, Evidence } from '#shared/domain/detectors/detector.ts';

const MINUTE = 60_000;
type Raised = Extract<AlarmSignal, { type: 'raised' }>;

const raised = (at: number, overrides: Partial<Raised> = {}): Raised => ({
  type: 'raised',
  detector: 'wrong-speed',
  alarmClass: 'alarm',
  priority: 'soon',
  from: at,
  at,
  cause: 'unknown',
  evidence: {},
  ...overrides,
});
const cleared = (at: number, evidence: Evidence = {}, detector: Detector = 'wrong-speed'): AlarmSignal => ({
  type: 'cleared',
  detector,
  at,
  evidence,
});

function play(...signals: readonly AlarmSignal[]): AlarmRecord {
  let record: AlarmRecord | undefined;
  for (const signal of signals) record = applySignal(record, signal)?.record ?? record;
  if (record === undefined) throw new Error('no alarm was raised');
  return record;
}

const note = (overrides: Partial<Raised> = {}) =>
  play(raised(0, { detector: 'clock-shift', alarmClass: 'note', priority: 'note', ...overrides }));
const done = (record: AlarmRecord) => workOff(record, { by: 'ada', at: 10, found: ' set it ', cause: 'drift' })!.record;

describe('an alarm that something explains', () => {
  it('is suppressed by design and calls nobody, until the explanation ends', () => {
    const hushed = play(raised(0), cleared(10, { consequenceOf: 'stopped' }));
    expect(hushed).toMatchObject({ state: 'unacknowledged', suppressedBy: 'detector:stopped', active: false });
    expect(isAnnounced(hushed)).toBe(false);
    expect(escalatesAt(hushed)).toBeUndefined();
    const standing = (...detectors: Detector[]) => ({ padState: 'open' as const, standing: new Set(detectors) });
    expect(endExplanation(hushed, standing('stopped'), 20)).toBeUndefined();
    const ended = endExplanation(hushed, standing('costly-program'), 20);
    expect(ended?.record).toMatchObject({ state: 'returned', suppressedBy: null });
    expect(ended?.transition?.kind).toBe('suppression-ended');
  });

  it('is suppressed by the pad’s state as well', () => {
    const hushed = play(raised(0), cleared(10, { padState: 'winterized' }));
    expect(partsOf(hushed.suppressedBy)).toEqual({ padState: 'winterized' });
    const pad = (padState: 'winterized' | 'open') => ({ padState, standing: new Set<Detector>() });
    expect(endExplanation(hushed, pad('winterized'), 20)).toBeUndefined();
    expect(endExplanation(hushed, pad('open'), 20)?.record.suppressedBy).toBeNull();
  });

  it('that was acknowledged, or is a note, is history once nothing explains it', () => {
    const pad = { padState: 'open' as const, standing: new Set<Detector>() };
    const seen = acknowledge(play(raised(0)), { by: 'ada', at: 5, note: null }).record;
    const hushed = applySignal(seen, cleared(10, { padState: 'repair' }))!.record;
    expect(endExplanation(hushed, pad, 20)?.record.state).toBe('normal');
    const hushedNote = applySignal(note(), cleared(10, { padState: 'repair' }, 'clock-shift'))!.record;
    expect(hushedNote.state).toBe('unacknowledged');
    expect(endExplanation(hushedNote, pad, 20)?.record.state).toBe('normal');
  });

  it('is the same alarm, counted, when its detector speaks again', () => {
    const again = play(raised(0), cleared(10, { consequenceOf: 'stopped' }), raised(20));
    expect(again).toMatchObject({ count: 2, active: true, suppressedBy: null, state: 'unacknowledged' });
  });

  it('is none of ours when it was suppressed from elsewhere', () => {
    const covered = { ...play(raised(0)), suppressedBy: 'area:north' };
    expect(endExplanation(covered, { padState: 'open', standing: new Set() }, 20)).toBeUndefined();
    expect(explanationOf({ normalSince: 3 })).toBeUndefined();
  });
});

describe('a chattering alarm', () => {
  const latched = play(raised(0), cleared(1), raised(2), cleared(3), raised(4), cleared(5));

  it('is latched, escalates as any other, and is released by an acknowledgement', () => {
    expect(latched.state).toBe('latched');
    expect(passTime(latched, 4 * 60 * MINUTE + 4)?.transition?.kind).toBe('escalated');
    const released = acknowledge(latched, { by: 'ada', at: 10, note: null });
    expect([released.transition?.kind, released.record.state]).toEqual(['latch-released', 'normal']);
  });

  it('is latched again when that is taken back', () => {
    const released = acknowledge(latched, { by: 'ada', at: 10, note: null }).record;
    expect(withdrawAcknowledgement(released, { by: 'ada', at: 20 })?.record.state).toBe('latched');
  });
});

describe('“nothing to do”', () => {
  const answer = (record: AlarmRecord, at = 10) => answerNothingToDo(record, { by: 'ada', at, note: 'backwash' });

  it('acknowledges, and leaves the condition', () => {
    const step = answer(play(raised(0)));
    expect(step?.record).toMatchObject({ state: 'acknowledged', active: true, answer: { note: 'backwash' } });
    expect(answer(step!.record)?.transition).toBeUndefined();
  });

  it('is about one raising: the next asks again', () => {
    const returned = applySignal(answer(play(raised(0)))!.record, cleared(20))!.record;
    expect(returned.state).toBe('normal');
    const early = answer(play(raised(0), cleared(5)));
    expect(early?.record.state).toBe('normal');
    expect(answer(early!.record)).toBeUndefined();
  });

  it('is taken back with the acknowledgement that came with it, but not with an earlier one', () => {
    const act = { by: 'ada', at: 20 };
    expect(withdrawAnswer(answer(play(raised(0)))!.record, act)?.record.state).toBe('unacknowledged');
    const seen = acknowledge(play(raised(0)), { by: 'bo', at: 5, note: null }).record;
    expect(withdrawAnswer(answer(seen)!.record, act)?.record).toMatchObject({ state: 'acknowledged', answer: null });
    expect(withdrawAnswer(answer(seen)!.record, { ...act, by: 'bo' })).toBeUndefined();
    expect(withdrawAnswer(answer(seen)!.record, { ...act, at: 11 + WITHDRAW_WITHIN_MS })).toBeUndefined();
  });
});

describe('a note that is worked off', () => {
  it('is history with what was found', () => {
    expect(done(note())).toMatchObject({ state: 'normal', active: true, done: { found: 'set it', cause: 'drift' } });
    expect(workOff(note(), { by: 'ada', at: 1, found: '  ', cause: null })).toBeUndefined();
    expect(workOff(play(raised(0)), { by: 'ada', at: 1, found: 'x', cause: null })).toBeUndefined();
  });

  it('is cured when its condition ends', () => {
    const cured = applySignal(done(note()), cleared(20, {}, 'clock-shift'));
    expect(cured?.record).toMatchObject({ state: 'normal', active: false, returnedAt: 20 });
    expect(passTime(cured!.record, 20 + CURED_WITHIN_MS)).toBeUndefined();
  });

  it('comes back when its condition still holds a week later', () => {
    expect(passTime(done(note()), 9 + CURED_WITHIN_MS)).toBeUndefined();
    const back = passTime(done(note()), 10 + CURED_WITHIN_MS);
    expect(back?.transition).toMatchObject({ kind: 'still-stands', note: 'set it' });
    expect(back?.record).toMatchObject({ state: 'unacknowledged', done: null, count: 2 });
  });

  it('comes back as soon as it becomes an alarm, and not for less', () => {
    const changed = (alarmClass: 'alarm' | 'note'): AlarmSignal => ({
      ...raised(30, { detector: 'clock-shift', alarmClass, priority: alarmClass === 'note' ? 'note' : 'soon' }),
      type: 'changed',
    });
    expect(applySignal(done(note()), changed('note'))?.transition).toBeUndefined();
    expect(applySignal(done(note()), changed('alarm'))?.record).toMatchObject({ state: 'unacknowledged', done: null });
  });

  it('is the same alarm when its detector, told anew, raises it again', () => {
    const again = applySignal(done(note()), raised(40, { detector: 'clock-shift', alarmClass: 'note' }));
    expect(again?.record).toMatchObject({ count: 2, done: null, state: 'unacknowledged' });
  });

  it('is put back by whoever did it, within five minutes and while it holds', () => {
    expect(withdrawDone(done(note()), { by: 'ada', at: 20 })?.record.state).toBe('unacknowledged');
    expect(withdrawDone(done(note()), { by: 'bo', at: 20 })).toBeUndefined();
    const cured = applySignal(done(note()), cleared(20, {}, 'clock-shift'))!.record;
    expect(withdrawDone(cured, { by: 'ada', at: 30 })).toBeUndefined();
  });
});

describe('giving an alarm away', () => {
  it('waits to be told of once, and goes back to the pad’s technician', () => {
    const given = assign(play(raised(0)), { by: 'ada', at: 10, to: 'joss', name: 'Joss' });
    expect(given?.transition).toMatchObject({ kind: 'assigned', note: 'Joss' });
    expect(assign(given!.record, { by: 'ada', at: 11, to: 'joss', name: 'Joss' })?.transition).toBeUndefined();
    const told = markTold(given!.record);
    expect(told?.assignment?.told).toBe(true);
    expect(markTold(told!)).toBeUndefined();
    expect(endAssignment(told!, { by: 'ada', at: 20 }).record.assignment).toBeNull();
    expect(assign({ ...told!, state: 'normal' }, { by: 'ada', at: 30, to: 'bo', name: 'Bo' })).toBeUndefined();
  });
});

it('reads an alarm that an earlier version stored', () => {
  const { assignment: _, answer: __, done: ___, releasedLatch: ____, ...stored } = play(raised(0));
  expect(readRecord(stored)).toEqual(play(raised(0)));
});
