import type { AlarmHealthFigures, NamedAlarm } from '#shared/contract/http/alarm-health.ts';
import type { HealthFigures } from '#shared/domain/alarm-health/health-figures.ts';
import { judgeHealth } from '#shared/domain/alarm-health/judge-health.ts';

/** Lists are for people: so many of each are named, and all are counted. */
const NAMED = 20;

type Named = { readonly alarmId: string };

/** The alarms an answer names. */
export const listNamedAlarms = ({ topTen, chattering, fleeting, stale }: HealthFigures): string[] =>
  [topTen, chattering, fleeting, stale.now].flatMap((list: readonly Named[]) =>
    list.slice(0, NAMED).map(({ alarmId }) => alarmId),
  );

/** Figures as they cross the wire, with names for what they point at. */
export function presentFigures(figures: HealthFigures, names: ReadonlyMap<string, NamedAlarm>): AlarmHealthFigures {
  const named = <Each extends Named>(list: readonly Each[]): (Each & NamedAlarm)[] =>
    list.slice(0, NAMED).flatMap((each) => {
      const name = names.get(each.alarmId);
      return name === undefined ? [] : [{ ...each, ...name }];
    });
  const { periods, topTen, chattering, fleeting, stale, byDay, acknowledging, ...rest } = figures;
  const { periods: count, floodPeriods: inFlood, floods, ...peaks } = periods;
  return {
    ...rest,
    byDay: [...byDay],
    periods: { ...peaks, count, inFlood, floods: floods.slice(0, NAMED) },
    topTen: named(topTen),
    chattering: named(chattering),
    fleeting: named(fleeting),
    stale: { ...stale, now: named(stale.now), nowCount: stale.now.length },
    acknowledging: [...acknowledging],
    judgements: judgeHealth(figures),
  };
}
