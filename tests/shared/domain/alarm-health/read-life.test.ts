import { describe, expect, it } from 'vitest';
import { readLife } from '#shared/domain/alarm-health/read-life.ts';
import { HOUR, lifeOf, MINUTE } from './sample-lives.ts';

const timesOf = (life: Parameters<typeof readLife>[0]) => readLife(life).annunciations.map(({ at }) => at);

/*
 * What counts: "count annunciations (transition into unacknowledged-active), not acknowledgements, returns or
 * re-notifications" (facts, section 5, computed from the state set; the standard's table is from memory).
 */
describe('an annunciation', () => {
  it('is one however often its mail is sent again, and whoever sees it', () => {
    const life = lifeOf([
      ['raised', 0],
      ['escalated', 15 * MINUTE],
      ['acknowledged', 20 * MINUTE, { by: 'tess' }],
      ['returned', HOUR],
    ]);
    expect(readLife(life).annunciations).toEqual([
      { at: 0, priority: 'soon', acknowledgedAt: 20 * MINUTE, escalated: true },
    ]);
  });

  it('is another when it comes back, asks again, or becomes more urgent after it was seen', () => {
    const back = lifeOf([
      ['raised', 0],
      ['returned', 1],
      ['raised-again', 2],
    ]);
    expect(timesOf(back)).toEqual([0, 2]);
    const asked = lifeOf([
      ['raised', 0],
      ['acknowledged', 1, { by: 'tess' }],
      ['re-alarmed', 2],
    ]);
    expect(timesOf(asked)).toEqual([0, 2]);
    const worse = lifeOf([
      ['raised', 0],
      ['acknowledged', 1, { by: 'tess' }],
      ['changed', 2, { priority: 'urgent' }],
    ]);
    expect(readLife(worse).annunciations.map(({ priority }) => priority)).toEqual(['soon', 'urgent']);
  });

  it('is none when it becomes less urgent, or more so before anybody saw it', () => {
    const changed = lifeOf([
      ['raised', 0],
      ['changed', 1, { priority: 'urgent' }],
      ['acknowledged', 2, { by: 'tess' }],
      ['changed', 3, { priority: 'soon' }],
    ]);
    expect(timesOf(changed)).toEqual([0]);
  });

  it('is none when somebody takes their own acknowledgement back, which counts as never given', () => {
    const life = lifeOf([
      ['raised', 0],
      ['acknowledged', 1, { by: 'tess' }],
      ['acknowledgement-withdrawn', 2, { by: 'tess' }],
      ['acknowledged', 9, { by: 'tess' }],
    ]);
    expect(readLife(life).annunciations).toMatchObject([{ at: 0, acknowledgedAt: 9 }]);
  });

  it('is none while the alarm is on hold, suppressed or out of service, and one when that ends and it still stands', () => {
    const held = lifeOf([
      ['shelved', 0, { by: 'tess', explained: true }],
      ['raised', 1],
      ['shelf-ended', 5],
    ]);
    expect(timesOf(held)).toEqual([5]);
    const over = lifeOf([
      ['suppressed', 0],
      ['raised', 1],
      ['returned', 2],
      ['suppression-ended', 3],
    ]);
    expect(timesOf(over)).toEqual([]);
  });

  it('is none of a note until the note becomes an alarm', () => {
    const life = lifeOf(
      [
        ['raised', 0, { priority: 'note' }],
        ['changed', 9, { priority: 'soon' }],
      ],
      { detector: 'stuck-input' },
    );
    expect(timesOf(life)).toEqual([9]);
  });

  it('is none while a chattering alarm is held as one', () => {
    const life = lifeOf([
      ['raised', 0],
      ['returned', 1],
      ['raised-again', 2],
      ['latched', 3],
      ['raised-again', 4],
      ['returned', 5],
    ]);
    expect(timesOf(life)).toEqual([0, 2]);
  });
});

describe('standing', () => {
  it('lasts from being raised to returning, acknowledged or not, and pauses on hold', () => {
    const life = lifeOf([
      ['raised', 0],
      ['acknowledged', 1, { by: 'tess' }],
      ['shelved', 5, { by: 'tess', explained: true }],
      ['shelf-ended', 9],
    ]);
    const { standings, asides } = readLife(life);
    expect(standings).toEqual([
      { from: 0, to: 5 },
      { from: 9, to: null },
    ]);
    expect(asides).toEqual([{ kind: 'shelved', from: 5, to: 9, explained: true }]);
  });

  it('knows who set an alarm aside without saying why', () => {
    const life = lifeOf([
      ['raised', 0],
      ['out-of-service', 5, { by: 'tess' }],
      ['suppressed', 6],
    ]);
    expect(readLife(life).asides.map(({ explained }) => explained)).toEqual([false, true]);
  });
});
