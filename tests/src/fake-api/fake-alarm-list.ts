import type { Alarm, AlarmPage, AlarmsQuery } from '#shared/contract/http/alarms.ts';
import { alarmTitle } from '#shared/domain/wording/alarm-words.ts';
import { type FakeState, visiblePumps } from './fake-state.ts';

const RANK = { urgent: 0, soon: 1, note: 2 } as const;

const isSetAside = ({ shelvedUntil, suppressed, outOfService }: Alarm) =>
  shelvedUntil !== null || suppressed || outOfService;

const SHOWN: Readonly<Record<AlarmsQuery['show'], (alarm: Alarm) => boolean>> = {
  open: (alarm) => alarm.state !== 'normal' && !isSetAside(alarm),
  unacknowledged: (alarm) => alarm.acknowledgedAt === null && alarm.state !== 'normal' && !isSetAside(alarm),
  shelved: ({ state, shelvedUntil }) => state !== 'normal' && shelvedUntil !== null,
  suppressed: ({ suppressed }) => suppressed,
  'out-of-service': ({ outOfService }) => outOfService,
  standing: ({ state }) => state !== 'normal',
  history: ({ state }) => state === 'normal',
  all: () => true,
};

/** Alarms as the server lists them, all on one page. */
export function listFakeAlarms(state: FakeState, query: AlarmsQuery): AlarmPage {
  const every = visiblePumps(state).flatMap(({ alarm }) => alarm ?? []);
  const text = query.q?.toLowerCase() ?? '';
  const items = every
    .filter(SHOWN[query.show])
    .filter(({ alarmClass }) => query.alarmClass === undefined || alarmClass === query.alarmClass)
    .filter(({ priority }) => query.priority === undefined || priority === query.priority)
    .filter(({ pumpId }) => query.pumpId === undefined || pumpId === query.pumpId)
    .filter((alarm) =>
      `${alarm.padName} ${alarmTitle(alarm.detector, alarm.cause, alarm.evidence)}`.toLowerCase().includes(text),
    )
    .sort((a, b) => RANK[a.priority] - RANK[b.priority] || b.from - a.from);
  return { items: items.slice(0, query.limit), nextCursor: null, totals: countFake(every), serverNow: state.now() };
}

function countFake(every: readonly Alarm[]): AlarmPage['totals'] {
  const open = every.filter(({ state }) => state !== 'normal');
  const count = (keep: (alarm: Alarm) => boolean) => open.filter(keep).length;
  const calls = (alarm: Alarm) => alarm.alarmClass === 'alarm' && !isSetAside(alarm);
  return {
    urgent: count((alarm) => calls(alarm) && alarm.priority === 'urgent'),
    soon: count((alarm) => calls(alarm) && alarm.priority !== 'urgent'),
    note: count((alarm) => alarm.alarmClass === 'note' && !isSetAside(alarm)),
    unacknowledged: count((alarm) => calls(alarm) && alarm.acknowledgedAt === null),
    shelved: count(({ shelvedUntil }) => shelvedUntil !== null),
    suppressed: count(({ suppressed }) => suppressed),
    outOfService: count(({ outOfService }) => outOfService),
  };
}
