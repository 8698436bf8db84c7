import type { LiveTable } from '#src/lib/live/live-table.ts';
import { writeAlarm } from './alarm-cache.ts';
import { alarmQueries } from './alarm-queries.ts';

/**
 * News of alarms: what is shown changes at once; lists and counts are read again, since an alarm may have come into a
 * list or left it, and an open alarm's page needs its transitions.
 */
export const alarmNews: LiveTable = {
  alarms: (client, alarms) => {
    for (const alarm of alarms) writeAlarm(client, alarm);
    void client.invalidateQueries({ queryKey: alarmQueries.all() });
  },
};
