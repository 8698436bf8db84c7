import { type AlarmAct, alarmActEndpoints } from '#shared/contract/http/alarm-acts.ts';
import { alarmHealthEndpoints } from '#shared/contract/http/alarm-health.ts';
import { type Alarm, alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { changeEndpoints } from '#shared/contract/http/changes.ts';
import { energyEndpoints } from '#shared/contract/http/energy.ts';
import { fleetEnergyEndpoints } from '#shared/contract/http/energy-fleet.ts';
import { programEndpoints } from '#shared/contract/http/energy-programs.ts';
import { type PumpDetail, type PumpRow, pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { sessionEndpoints } from '#shared/contract/http/session.ts';
import { changeByAct } from './fake-alarm-acts.ts';
import { fakeAlarmHealth } from './fake-alarm-health.ts';
import { listFakeAlarms } from './fake-alarm-list.ts';
import { fakeFleetEnergy, fakeHours, fakePadEnergy, fakePadMonths, fakePumpEnergy } from './fake-energy.ts';
import { type FakePump, markOf } from './fake-fleet.ts';
import { type FakeHandler, FakeRefusal, handle, type Input } from './fake-handler.ts';
import { fakeId } from './fake-id.ts';
import { fakeAdvice } from './fake-programs.ts';
import { readingsOf } from './fake-readings.ts';
import { broadcast, type FakeState, sessionOf, visiblePumps } from './fake-state.ts';
import { FAKE_TARIFF_HANDLERS } from './fake-tariff-handlers.ts';

const RANK = { urgent: 0, soon: 1, note: 2 } as const;

const rowOf = ({ detail }: FakePump): PumpRow => detail;

const findPump = (state: FakeState, pumpId: string): FakePump => {
  const pump = visiblePumps(state).find(({ detail }) => detail.pumpId === pumpId);
  if (pump === undefined) throw new FakeRefusal('not-found');
  return pump;
};

const findPad = (state: FakeState, padId: string): FakePump[] => {
  const pumps = visiblePumps(state).filter(({ detail }) => detail.padId === padId);
  if (pumps.length === 0) throw new FakeRefusal('not-found');
  return pumps;
};

const findAlarmed = (state: FakeState, alarmId: string) => {
  const pump = state.pumps.find(({ alarm }) => alarm?.id === alarmId);
  if (pump?.alarm === undefined) throw new FakeRefusal('not-found');
  return { pump, alarm: pump.alarm };
};

const signIn = (state: FakeState, email: string, password: string) => {
  const role = email.startsWith('manager')
    ? 'manager'
    : email.startsWith('tech')
      ? 'technician'
      : email.startsWith('home')
        ? 'homeowner'
        : undefined;
  if (role === undefined || password !== 'millrace-demo') throw new FakeRefusal('unauthenticated');
  state.role = role;
  return sessionOf(state, role);
};

const requireSession = (state: FakeState) => {
  if (state.role === undefined) throw new FakeRefusal('unauthenticated');
  return sessionOf(state, state.role);
};

const FILTERS: Readonly<Record<string, (row: PumpRow) => boolean>> = {
  running: ({ now }) => (now?.rpm ?? 0) > 40,
  'on-input': ({ now }) => now?.source === 'input',
  'prime-trouble': ({ alarm }) => alarm?.detector === 'failed-prime',
  'off-expected': ({ alarm }) => alarm?.detector === 'wrong-speed' || alarm?.detector === 'stopped',
  silent: ({ silentSince }) => silentSince !== null,
  alarm: ({ alarm }) => alarm !== null,
};

const SORTS: Readonly<Record<string, (a: PumpRow, b: PumpRow) => number>> = {
  worst: (a, b) => (a.alarm === null ? 3 : RANK[a.alarm.priority]) - (b.alarm === null ? 3 : RANK[b.alarm.priority]),
  name: (a, b) => a.padName.localeCompare(b.padName),
  rpm: (a, b) => (b.now?.rpm ?? -1) - (a.now?.rpm ?? -1),
  watts: (a, b) => (b.now?.watts ?? -1) - (a.now?.watts ?? -1),
  heard: (a, b) => (b.heardAt ?? 0) - (a.heardAt ?? 0),
};

function listPumps(state: FakeState, query: Input<typeof pumpEndpoints.list>['query']) {
  const text = query.q?.toLowerCase() ?? '';
  const kept = visiblePumps(state)
    .map(rowOf)
    .filter((row) => `${row.padName} ${row.customerName} ${row.serial}`.toLowerCase().includes(text))
    .filter((row) => query.area === undefined || row.area === query.area);
  const rows = kept
    .filter((row) => query.filter === undefined || FILTERS[query.filter]?.(row) === true)
    .filter((row) => query.priority === undefined || row.alarm?.priority === query.priority)
    .sort(SORTS[query.sort]);
  const start = Number(query.cursor ?? 0);
  const count = (filter: (row: PumpRow) => boolean) => kept.filter(filter).length;
  return {
    items: rows.slice(start, start + query.limit),
    nextCursor: start + query.limit < rows.length ? String(start + query.limit) : null,
    totals: {
      pumps: kept.length,
      running: count(({ now }) => (now?.rpm ?? 0) > 40),
      idle: count(({ now }) => now !== null && now.rpm < 40 && now.expectedRpm < 40),
      urgent: count(({ alarm }) => alarm?.priority === 'urgent'),
      soon: count(({ alarm }) => alarm?.priority === 'soon'),
      note: count(({ alarm }) => alarm?.priority === 'note'),
      silent: count(({ silentSince }) => silentSince !== null),
    },
    matching: rows.length,
    areas: [...new Set(kept.flatMap(({ area }) => area ?? []))].sort(),
    serverNow: state.now(),
  };
}

const stripOf = (pump: FakePump, from: number, until: number, now: number) => ({
  pumpId: pump.detail.pumpId,
  runs: pump.runs.filter((run) => run.from < until && (run.to ?? now) > from),
  planned: pump.planned.filter((run) => run.to > now && run.from < until).map(({ because: _, ...run }) => run),
});

/** Changes an alarm and tells every open page, as the real server does. */
export function changeAlarm(state: FakeState, alarmId: string, change: Partial<Alarm>): Alarm {
  const { pump, alarm } = findAlarmed(state, alarmId);
  pump.alarm = { ...alarm, ...change, version: alarm.version + 1 };
  pump.detail = { ...pump.detail, alarm: markOf(pump.alarm) };
  state.cursor += 1;
  const { pumpId, now, heardAt, silentSince } = pump.detail;
  broadcast(state, {
    type: 'news',
    cursor: String(state.cursor),
    pumps: [{ pumpId, now, heardAt, silentSince, alarm: pump.detail.alarm }],
    runs: [],
    alarms: [pump.alarm],
  });
  return pump.alarm;
}

const FAKE_TECHNICIANS = [
  { id: fakeId('user', 2), name: 'Joss Aldane', openAlarms: 3 },
  { id: fakeId('user', 3), name: 'Wren Tallow', openAlarms: 0 },
];

const actOn = (state: FakeState, alarmId: string, act: AlarmAct): Alarm => {
  const { alarm } = findAlarmed(state, alarmId);
  const who = { name: requireSession(state).user.name, at: state.now(), technicians: FAKE_TECHNICIANS };
  return changeAlarm(state, alarmId, changeByAct(alarm, act, who));
};

export const FAKE_HANDLERS: readonly FakeHandler[] = [
  ...FAKE_TARIFF_HANDLERS,
  handle(sessionEndpoints.create, (state, { body }) => signIn(state, body.email, body.password)),
  handle(sessionEndpoints.renew, requireSession),
  handle(sessionEndpoints.read, requireSession),
  handle(sessionEndpoints.remove, (state) => {
    state.role = undefined;
    return undefined;
  }),
  handle(sessionEndpoints.updatePreferences, (state, { body }) => {
    state.preferences = { ...state.preferences, ...(body as Partial<typeof state.preferences>) };
    return requireSession(state);
  }),
  handle(pumpEndpoints.list, (state, { query }) => listPumps(state, query)),
  handle(pumpEndpoints.strips, (state, { query }) => ({
    strips: visiblePumps(state)
      .filter(({ detail }) => query.pumps.includes(detail.pumpId))
      .map((pump) => stripOf(pump, query.from, query.until, state.now())),
    serverNow: state.now(),
  })),
  handle(pumpEndpoints.read, (state, { params }): PumpDetail => findPump(state, params.pumpId).detail),
  handle(pumpEndpoints.runs, (state, { params, query }) => {
    const { runs, planned } = stripOf(findPump(state, params.pumpId), query.from, query.until, state.now());
    return { runs, planned };
  }),
  handle(pumpEndpoints.readings, (state, { params, query }) =>
    readingsOf(findPump(state, params.pumpId).runs, query, state.now()),
  ),
  handle(alarmEndpoints.list, (state, { query }) => listFakeAlarms(state, query)),
  handle(alarmEndpoints.read, (state, { params }) => ({
    ...findAlarmed(state, params.alarmId).alarm,
    serverNow: state.now(),
  })),
  handle(alarmEndpoints.acknowledge, (state, { params, body }) =>
    actOn(state, params.alarmId, { kind: 'acknowledge', ...body }),
  ),
  handle(alarmEndpoints.withdrawAcknowledgement, (state, { params }) =>
    actOn(state, params.alarmId, { kind: 'withdraw-acknowledgement' }),
  ),
  handle(alarmActEndpoints.technicians, () => ({ items: FAKE_TECHNICIANS })),
  handle(alarmActEndpoints.actOnMany, (state, { body }) => ({
    done: body.acts.map(({ alarmId, act }) => actOn(state, alarmId, act)),
    refused: [],
  })),
  handle(alarmHealthEndpoints.read, (state) => fakeAlarmHealth(state.now(), state.pumps)),
  handle(energyEndpoints.pump, (state, { params, query }) =>
    fakePumpEnergy(state, findPump(state, params.pumpId), query),
  ),
  handle(energyEndpoints.pad, (state, { params, query }) => fakePadEnergy(state, findPad(state, params.padId), query)),
  handle(energyEndpoints.padHours, (state, { query }) => fakeHours(state, query.month)),
  handle(fleetEnergyEndpoints.month, (state, { query }) => fakeFleetEnergy(state, query.month)),
  handle(fleetEnergyEndpoints.hours, (state, { query }) => fakeHours(state, query.month)),
  handle(fleetEnergyEndpoints.pads, (state, { query }) => {
    const pads = fakePadMonths(state).filter(({ padName }) =>
      padName.toLowerCase().includes(query.q?.toLowerCase() ?? ''),
    );
    const start = Number(query.cursor ?? 0);
    const next = start + query.limit;
    return {
      items: pads.slice(start, next),
      nextCursor: next < pads.length ? String(next) : null,
      month: query.month ?? '2026-12',
      matching: pads.length,
      serverNow: state.now(),
    };
  }),
  handle(programEndpoints.list, (state) => {
    const items = state.energy.money ? state.pumps.slice(0, 3).map((pump) => fakeAdvice(state, pump)) : [];
    return {
      items,
      nextCursor: null,
      matching: items.length,
      advised: items.length,
      waiting: 5,
      serverNow: state.now(),
    };
  }),
  handle(programEndpoints.pump, (state, { params }) => ({
    advice: fakeAdvice(state, findPump(state, params.pumpId)),
    serverNow: state.now(),
  })),
  handle(changeEndpoints.list, (state) => ({
    cursor: String(state.cursor),
    complete: true,
    pumps: visiblePumps(state).map(({ detail: { pumpId, now, heardAt, silentSince, alarm } }) => ({
      pumpId,
      now,
      heardAt,
      silentSince,
      alarm,
    })),
    runs: [],
    alarms: visiblePumps(state).flatMap(({ alarm }) => alarm ?? []),
    serverNow: state.now(),
  })),
];
