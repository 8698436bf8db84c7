import { presentFigures } from '#server/features/alarm-health/present-alarm-health.ts';
import type { AlarmHealth, NamedAlarm } from '#shared/contract/http/alarm-health.ts';
import type { AlarmLife } from '#shared/domain/alarm-health/alarm-life.ts';
import { healthFigures } from '#shared/domain/alarm-health/health-figures.ts';
import { readLife } from '#shared/domain/alarm-health/read-life.ts';
import { localDays } from '#shared/domain/time/local-days.ts';
import type { FakePump } from './fake-fleet.ts';
import { fakeId } from './fake-id.ts';

const ZONE = 'America/Los_Angeles';
const DAY_MS = 86_400_000;
const MINUTE_MS = 60_000;
const TECHNICIAN = { operatorId: fakeId('user', 1), name: 'Joss Aldane' };

/** A month of made-up alarms: the first pump of three repeats daily, the second stands since a week. */
function livesOf(now: number, pumps: readonly FakePump[]): AlarmLife[] {
  const life = (index: number, pump: number, at: number, stands = false): AlarmLife => ({
    alarmId: fakeId('alarm', 900 + index),
    pumpId: pumps[pump]?.detail.pumpId ?? null,
    detector: pump === 0 ? 'failed-prime' : 'stopped',
    operatorId: TECHNICIAN.operatorId,
    changes: [
      { kind: 'raised', at, priority: pump === 0 ? 'urgent' : 'soon', by: null, explained: false },
      {
        kind: 'acknowledged',
        at: at + 12 * MINUTE_MS,
        priority: pump === 0 ? 'urgent' : 'soon',
        by: TECHNICIAN.operatorId,
        explained: false,
      },
      ...(stands
        ? []
        : [
            {
              kind: 'returned' as const,
              at: at + 90 * MINUTE_MS,
              priority: 'soon' as const,
              by: null,
              explained: false,
            },
          ]),
    ],
  });
  const daily = Array.from({ length: 30 }, (_, index) => life(index, 0, now - (index + 0.5) * DAY_MS));
  return [...daily, life(30, 1, now - 7 * DAY_MS, true), life(31, 2, now - 3 * DAY_MS)];
}

/** The health of the fake fleet's alarms, by the real functions. */
export function fakeAlarmHealth(now: number, pumps: readonly FakePump[]): AlarmHealth {
  const from = now - 30.5 * DAY_MS;
  const lives = livesOf(now, pumps);
  const figures = healthFigures(lives.map(readLife), { from, until: now, days: localDays(ZONE, from, now) });
  const names = new Map(
    lives.map(({ alarmId, pumpId, detector }): [string, NamedAlarm] => {
      const detail = pumps.find((pump) => pump.detail.pumpId === pumpId)?.detail;
      const named = { padName: detail?.padName ?? null, pumpName: detail?.pumpName ?? null };
      return [alarmId, { alarmId, pumpId, detector, cause: 'unknown', evidence: { tries: 3 }, ...named }];
    }),
  );
  const shown = presentFigures(figures, names);
  return {
    zone: ZONE,
    from,
    until: now,
    leastDays: 30,
    desk: shown,
    operators: [{ ...TECHNICIAN, figures: shown }],
    serverNow: now,
  };
}
