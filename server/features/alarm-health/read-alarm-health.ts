import type { Context } from '#server/context.ts';
import type { AlarmHealth, AlarmHealthQuery } from '#shared/contract/http/alarm-health.ts';
import { healthFigures } from '#shared/domain/alarm-health/health-figures.ts';
import { HEALTH_TARGETS } from '#shared/domain/alarm-health/health-targets.data.ts';
import { readLife } from '#shared/domain/alarm-health/read-life.ts';
import { groupBy } from '#shared/domain/grouping/group-by.ts';
import { findCompanyBeginning, listAlarmLives, listAlarmNames, listPeopleNames } from './alarm-health-read-model.ts';
import { healthStretch } from './health-stretch.ts';
import { listNamedAlarms, presentFigures } from './present-alarm-health.ts';

/** How the company's alarms do in a stretch, for the desk and for each technician. Its roles are the contract's. */
export async function readAlarmHealth({ db, actor, now }: Context, query: AlarmHealthQuery): Promise<AlarmHealth> {
  const { companyId } = actor;
  const { zone, beganAt } = await findCompanyBeginning(db, companyId);
  const stretch = healthStretch(query, { zone, beganAt, now });
  const stories = (await listAlarmLives(db, companyId, stretch.from, stretch.until)).map(readLife);
  const desk = healthFigures(stories, stretch);
  const operators = [...groupBy(stories, ({ life }) => life.operatorId)]
    .flatMap(([operatorId, theirs]) => (operatorId === null ? [] : [[operatorId, theirs] as const]))
    .map(([operatorId, theirs]) => ({ operatorId, figures: healthFigures(theirs, stretch) }))
    .sort((a, b) => b.figures.count - a.figures.count);
  const shown = [desk, ...operators.map(({ figures }) => figures)].flatMap(listNamedAlarms);
  const names = await listAlarmNames(db, companyId, [...new Set(shown)]);
  const people = await listPeopleNames(
    db,
    companyId,
    operators.map(({ operatorId }) => operatorId),
  );
  return {
    zone,
    from: stretch.from,
    until: stretch.until,
    leastDays: HEALTH_TARGETS.leastDays,
    desk: presentFigures(desk, names),
    operators: operators.map(({ operatorId, figures }) => ({
      operatorId,
      name: people.get(operatorId) ?? '',
      figures: presentFigures(figures, names),
    })),
    serverNow: now,
  };
}
