import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { LiveTable } from '#src/lib/live/live-table.ts';
import { readAgain } from '#src/lib/live/read-again.ts';
import { t } from '#src/lib/messages/t.ts';
import { serverNow } from '#src/lib/server-clock.ts';
import { createStore } from '#src/lib/store.ts';
import { writeAlarm } from './alarm-cache.ts';
import { titleOf, whereOf } from './alarm-names.ts';
import { alarmQueries } from './alarm-queries.ts';

/** The last alarm that was raised while one watched, as a sentence; empty before the first. */
export const raisedNow = createStore('');

const FRESH_MS = 60_000;
const announced = new Set<string>();

function announce(alarm: Alarm): void {
  const fresh = alarm.state === 'unacknowledged' && serverNow() - alarm.raisedAt < FRESH_MS;
  if (!fresh || alarm.alarmClass === 'note' || announced.has(alarm.id)) return;
  announced.add(alarm.id);
  raisedNow.set(
    t('alarm.raisedNow', { priority: t(`mark.${alarm.priority}`), title: titleOf(alarm), where: whereOf(alarm) }),
  );
}

/**
 * News of alarms: what is shown changes at once; lists and counts are read again, since an alarm may have come into a
 * list or left it, and an open alarm's page needs its transitions.
 */
export const alarmNews: LiveTable = {
  alarms: (client, alarms) => {
    for (const alarm of alarms) {
      writeAlarm(client, alarm);
      announce(alarm);
    }
    readAgain(client, { queryKey: alarmQueries.all() });
  },
};
