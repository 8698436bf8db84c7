import { QueryClient } from '@tanstack/react-query';
import { describe, expect, it } from 'vitest';
import { writeAlarm } from '#src/features/alarms/alarm-cache.ts';
import { titleOf, whereOf } from '#src/features/alarms/alarm-names.ts';
import { alarmQueries } from '#src/features/alarms/alarm-queries.ts';
import {
  acknowledgedBy,
  describeSpan,
  describeStanding,
  describeState,
  evidenceWindow,
  isWaiting,
  mayUndo,
} from '#src/features/alarms/alarm-view.ts';
import { changeAlarmsAddress, isNarrowed, parseAlarmsAddress } from '#src/features/alarms/alarms-address.ts';
import { listEvidence, usualWattsOf } from '#src/features/alarms/evidence-view.ts';
import { createFormat } from '#src/lib/format/create-format.ts';
import { createFakeFleet } from '#tests/src/fake-api/fake-fleet.ts';
import { FAKE_EVENING as NOW } from '#tests/src/fake-api/fake-state.ts';

const HOUR = 3_600_000;
const format = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const alarm = createFakeFleet(NOW)[0]!.alarm!;

describe('an alarm in words', () => {
  it('says what, where and since when, in the pad’s time', () => {
    expect(titleOf(alarm)).toBe('Did not prime, 3 tries');
    expect(whereOf(alarm)).toBe('Tern Court 4, Filter pump');
    expect(describeSpan(alarm, format, NOW)).toBe('since 8:18\u00a0AM, 11 h 12');
    expect(describeSpan({ ...alarm, returnedAt: NOW - HOUR, count: 3 }, format, NOW)).toBe(
      '8:18\u00a0AM to 6:30\u00a0PM · 3 times',
    );
  });

  it('says who has seen it and what stands over it', () => {
    expect(describeState(alarm, format, NOW)).toBe('nobody has acknowledged it');
    const seen = acknowledgedBy(alarm, 'Ilse Ravn', NOW - HOUR);
    expect(describeState(seen, format, NOW)).toBe('acknowledged by Ilse Ravn, 6:30\u00a0PM');
    expect(describeState({ ...seen, shelvedUntil: NOW + HOUR, shelvedBy: 'Joss Aldane' }, format, NOW)).toBe(
      'on hold until 8:30\u00a0PM, by Joss Aldane · acknowledged by Ilse Ravn, 6:30\u00a0PM',
    );
    expect(describeState({ ...alarm, state: 'returned', returnedAt: NOW - HOUR }, format, NOW)).toBe(
      'back to normal since 6:30\u00a0PM, not acknowledged',
    );
  });

  it('asks again, and says who saw it before, once it has stood too long', () => {
    const seen = acknowledgedBy(alarm, 'Ilse Ravn', NOW - HOUR);
    const asked = { ...seen, state: 'unacknowledged' as const };
    expect(describeState(asked, format, NOW)).toBe(
      'asks again: Ilse Ravn acknowledged it 6:30\u00a0PM, and it still stands',
    );
    expect(isWaiting(asked)).toBe(true);
  });

  it('says nothing where there is nothing to say, and names nobody to a homeowner', () => {
    const note = { ...alarm, alarmClass: 'note' as const, state: 'unacknowledged' as const };
    expect(describeStanding(note, format, NOW)).toBe(describeSpan(note, format, NOW));
    const seen = { ...acknowledgedBy(alarm, 'Ilse Ravn', NOW - HOUR), acknowledgedBy: null };
    expect(describeState(seen, format, NOW)).toBe('acknowledged 6:30\u00a0PM');
  });

  it('waits for somebody in three of its states', () => {
    const waiting = (['unacknowledged', 'acknowledged', 'returned', 'latched', 'normal'] as const).map((state) =>
      isWaiting({ ...alarm, state }),
    );
    expect(waiting).toEqual([true, false, true, true, false]);
  });
});

describe('an acknowledgement', () => {
  it('of an alarm that is back to normal makes it history', () => {
    expect(acknowledgedBy({ ...alarm, state: 'returned' }, 'Ilse Ravn', NOW).state).toBe('normal');
    expect(acknowledgedBy(alarm, 'Ilse Ravn', NOW).state).toBe('acknowledged');
  });

  it('may be taken back by whoever gave it, for five minutes', () => {
    const seen = acknowledgedBy(alarm, 'Ilse Ravn', NOW);
    expect(mayUndo(seen, 'Ilse Ravn', NOW + 299_000)).toBe(true);
    expect(mayUndo(seen, 'Ilse Ravn', NOW + 300_000)).toBe(false);
    expect(mayUndo(seen, 'Joss Aldane', NOW)).toBe(false);
  });
});

describe('the evidence', () => {
  it('is shown with its units, in the reader’s', () => {
    const facts = Object.fromEntries(
      listEvidence(
        {
          tries: 3,
          watts: 412,
          primedWatts: 1450,
          stoodMinutes: 100,
          ambientCelsius: -1,
          loadShare: 0.28,
          closedInputs: 5,
          knownFrom: 'learnt',
        },
        format,
      ),
    );
    expect(facts).toEqual({
      Tries: '3',
      Watts: '412 W',
      'Watts when primed': '1,450 W',
      'Stood still before': '1 h 40',
      'Air at the pad': '30 °F',
      'Load, of what is usual': '28 %',
      'Closed inputs': '1, 3',
    });
  });

  it('names what has no words yet rather than hide it', () => {
    expect(listEvidence({ windDirection: 'north' }, format)).toEqual([['Wind direction', 'north']]);
  });

  it('knows the watts that would be usual', () => {
    expect(usualWattsOf({ primedWatts: 1450 })).toBe(1450);
    expect(usualWattsOf({ primedWatts: null })).toBeUndefined();
  });

  it('lies in a day around the beginning, as near to now as it goes', () => {
    const fresh = evidenceWindow({ from: NOW - 2 * HOUR }, NOW);
    expect(fresh.until).toBeGreaterThan(NOW);
    const old = evidenceWindow({ from: NOW - 90 * HOUR }, NOW);
    expect(old.from).toBeLessThan(NOW - 90 * HOUR);
    expect(old.until).toBeGreaterThan(NOW - 90 * HOUR);
    expect(old.until - old.from).toBe(24 * HOUR);
  });
});

describe('news of an alarm', () => {
  it('is written into every list and into its page, but never over a newer version', () => {
    const client = new QueryClient();
    const list = alarmQueries.list({}).queryKey;
    const page = {
      items: [alarm],
      nextCursor: null,
      totals: { urgent: 1, soon: 0, note: 0, unacknowledged: 1, shelved: 0, suppressed: 0, outOfService: 0 },
      serverNow: NOW,
    };
    client.setQueryData(list, { pages: [page], pageParams: [undefined] });
    client.setQueryData(alarmQueries.detail(alarm.id).queryKey, { ...alarm, version: 5 });
    writeAlarm(client, { ...acknowledgedBy(alarm, 'Ilse Ravn', NOW), version: 4 });
    expect(client.getQueryData(list)?.pages[0]?.items[0]?.state).toBe('acknowledged');
    expect(client.getQueryData(alarmQueries.detail(alarm.id).queryKey)?.state).toBe('unacknowledged');
    writeAlarm(client, { ...acknowledgedBy(alarm, 'Ilse Ravn', NOW), version: 6 });
    expect(client.getQueryData(alarmQueries.detail(alarm.id).queryKey)).toMatchObject({
      state: 'acknowledged',
      transitions: alarm.transitions,
    });
  });
});

describe('the page’s address', () => {
  it('holds what the list is narrowed to', () => {
    const { filter } = parseAlarmsAddress(
      new URLSearchParams('show=history&priority=urgent&q=weir&detector=stopped&sort=upwards'),
    );
    expect(filter).toMatchObject({
      show: 'history',
      priority: 'urgent',
      q: 'weir',
      detector: 'stopped',
      sort: undefined,
    });
    expect(isNarrowed(filter)).toBe(true);
    expect(isNarrowed(parseAlarmsAddress(new URLSearchParams('show=history')).filter)).toBe(false);
  });

  it('says nothing of what is usual', () => {
    expect(
      changeAlarmsAddress(new URLSearchParams('show=history&q=weir'), { show: 'open', sort: 'worst' }).toString(),
    ).toBe('q=weir');
  });
});
