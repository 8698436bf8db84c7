import type pg from 'pg';
import type { OpenAlarm } from '#server/fold/alarm-change.ts';
import { type AlarmRow, toOpenAlarm } from '#server/fold/alarms-repository.ts';
import type { PumpStanding } from '#shared/domain/alarms/explanation.ts';
import type { PadState } from '#shared/domain/control/pump-context.ts';
import type { Detector } from '#shared/domain/detectors/detector.ts';

type Database = Pick<pg.ClientBase, 'query'>;

export type ExplainedAlarm = { readonly alarm: OpenAlarm; readonly pump: PumpStanding };

/** Suppressed alarms of single pumps, each with what may explain it now. */
export const listExplainedAlarms = (database: Database): Promise<ExplainedAlarm[]> => selectExplained(database, '', []);

/** Those of some alarms that are suppressed still, locked. */
export const lockExplainedAlarms = (database: Database, alarmIds: readonly string[]): Promise<ExplainedAlarm[]> =>
  selectExplained(database, 'and a.id = any($1::uuid[]) order by a.id for update of a', [alarmIds]);

async function selectExplained(
  database: Database,
  which: string,
  values: readonly unknown[],
): Promise<ExplainedAlarm[]> {
  const { rows } = await database.query<
    AlarmRow & { readonly pad_state: PadState; readonly standing: readonly Detector[] }
  >(
    `select a.id, a.company_id, a.pump_id, a.pad_id, a.record, pad.state as pad_state, array(
       select o.detector from alarms o where o.pump_id = a.pump_id and o.returned_at is null
         and (o.state <> 'normal' or o.done_at is not null)) as standing
     from alarms a join pads pad on pad.id = a.pad_id
     where a.state <> 'normal' and a.suppressed ${which}`,
    [...values],
  );
  return rows.map((row) => ({
    alarm: toOpenAlarm(row),
    pump: { padState: row.pad_state, standing: new Set(row.standing) },
  }));
}

/** Open alarms whose new technician has not been told yet, locked. */
export async function lockUntoldAlarms(database: Database): Promise<OpenAlarm[]> {
  const { rows } = await database.query<AlarmRow>(
    `select id, company_id, pump_id, pad_id, record from alarms
     where state <> 'normal' and assigned_to is not null
       and record -> 'assignment' -> 'told' = 'false' order by id for update`,
  );
  return rows.map(toOpenAlarm);
}
