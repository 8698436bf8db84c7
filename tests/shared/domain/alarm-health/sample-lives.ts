import type { AlarmLife, LifeChange } from '#shared/domain/alarm-health/alarm-life.ts';

export const MINUTE = 60_000;
export const HOUR = 60 * MINUTE;
export const DAY = 24 * HOUR;

type Told = readonly [kind: LifeChange['kind'], at: number, more?: Partial<LifeChange>];

let made = 0;

/** An alarm of an invented pump, told as its changes. */
export function lifeOf(changes: readonly Told[], more: Partial<AlarmLife> = {}): AlarmLife {
  made += 1;
  return {
    alarmId: `alarm-${made}`,
    pumpId: `pump-${made}`,
    detector: 'wrong-speed',
    operatorId: 'tess',
    changes: changes.map(([kind, at, change]) => ({
      kind,
      at,
      priority: 'soon',
      by: null,
      explained: false,
      ...change,
    })),
    ...more,
  };
}

/** Alarms raised at these instants, each over and seen a minute later. */
export const livesAt = (instants: readonly number[], more: Partial<AlarmLife> = {}): AlarmLife[] =>
  instants.map((at) =>
    lifeOf(
      [
        ['raised', at],
        ['acknowledged', at + MINUTE, { by: 'tess' }],
        ['returned', at + 2 * MINUTE],
      ],
      more,
    ),
  );
