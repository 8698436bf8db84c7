import { describe, expect, it } from 'vitest';
import { compareAlarms, countNeedless, type RaisedAlarm } from '#shared/domain/backtest/compare-alarms.ts';

const MINUTE = 60_000;
const alarm = (from: number, change: Partial<RaisedAlarm> = {}): RaisedAlarm => ({
  ...{ detector: 'stopped', alarmClass: 'alarm', priority: 'soon', cause: 'unknown' },
  ...{ from: from * MINUTE, raised: (from + 20) * MINUTE, to: (from + 60) * MINUTE },
  ...change,
});

describe('alarms under two versions of the rules', () => {
  it('are the same where nothing of them differs', () => {
    expect(compareAlarms([alarm(0)], [alarm(0)]).map(({ difference }) => difference)).toEqual(['same']);
  });

  it('are changed where one condition is spoken of later, or longer, or with another priority', () => {
    for (const change of [{ raised: 30 * MINUTE }, { to: null }, { priority: 'urgent' as const }])
      expect(compareAlarms([alarm(0)], [alarm(0, change)])).toEqual([
        { difference: 'changed', before: alarm(0), after: alarm(0, change) },
      ]);
  });

  it('are partners one to one: two short ones in place of a long one are a changed and a new one', () => {
    const long = alarm(0, { to: 300 * MINUTE });
    const compared = compareAlarms([long], [alarm(0, { to: 30 * MINUTE }), alarm(100)]);
    expect(compared.map(({ difference }) => difference)).toEqual(['changed', 'new']);
  });

  it('are gone or new where the other version says nothing, in order of time, and never of another detector', () => {
    const other = alarm(0, { detector: 'silent' });
    expect(
      compareAlarms([alarm(200), alarm(0)], [other, alarm(400)]).map(({ difference, before, after }) => [
        difference,
        (before ?? after)?.from,
      ]),
    ).toEqual([
      ['gone', 0],
      ['new', 0],
      ['gone', 200 * MINUTE],
      ['new', 400 * MINUTE],
    ]);
  });

  it('count those that a person answered with nothing to do', () => {
    expect(countNeedless([alarm(0), alarm(500)], [alarm(10)])).toBe(1);
  });
});
