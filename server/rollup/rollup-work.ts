import type pg from 'pg';
import type { Mark } from '#server/db/rollup-marks.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** A pump taken for rolling up, locked until the end of the transaction. Instants in ms. */
export type TakenPump = {
  readonly pumpId: string;
  readonly pumpNumber: number;
  readonly companyId: string;
  readonly padId: string;
  readonly zone: string;
  /** Up to where everything is counted in; null = nothing yet. */
  readonly rolledTo: number | null;
  /** Up to where the fold has understood. */
  readonly highWater: number;
};

/**
 * Pumps with something to roll up, the longest waiting first: marked ones, those never rolled up, and those that were
 * folded on since. A pump that was just rolled up waits for `freshMs`.
 */
export async function listWaitingPumps(database: Database, limit: number, freshMs: number): Promise<string[]> {
  const { rows } = await database.query<{ pump_id: string }>(
    `select s.pump_id from pump_states s left join rollup_cursors c on c.pump_id = s.pump_id
     where s.high_water is not null and (c.pump_id is null
       or (s.high_water > c.rolled_to and c.rolled_at < now() - $2::float8 * interval '1 millisecond')
       or exists (select from rollup_marks m where m.company_id = s.company_id and m.pump_id = s.pump_id))
     order by c.rolled_at nulls first limit $1`,
    [limit, freshMs],
  );
  return rows.map((row) => row.pump_id);
}

/** Takes one pump: its cursor is locked, so that no two ever roll the same pump up at once. */
export async function takePump(database: Database, pumpId: string): Promise<TakenPump | undefined> {
  await database.query(
    `insert into rollup_cursors (pump_id, company_id, rolled_to, rolled_at)
     select id, company_id, '-infinity', '-infinity' from pumps where id = $1 on conflict do nothing`,
    [pumpId],
  );
  const { rows } = await database.query<TakenPump>(
    `select p.id as "pumpId", p.number as "pumpNumber", p.company_id as "companyId", p.pad_id as "padId", pad.zone,
       case when c.rolled_to > '-infinity' then round(date_part('epoch', c.rolled_to) * 1000) end as "rolledTo",
       round(date_part('epoch', s.high_water) * 1000) as "highWater"
     from rollup_cursors c join pumps p on p.id = c.pump_id join pads pad on pad.id = p.pad_id
     join pump_states s on s.pump_id = p.id
     where c.pump_id = $1 and s.high_water is not null for update of c`,
    [pumpId],
  );
  return rows[0];
}

/** What the pump was marked for, taken away: with the work it goes, or comes back with its transaction. */
export async function takeMarks(database: Database, { companyId, pumpId }: TakenPump): Promise<Mark[]> {
  const { rows } = await database.query<Mark>(
    `delete from rollup_marks where company_id = $1 and pump_id = $2
     returning kind, round(date_part('epoch', from_at) * 1000) as "from", round(date_part('epoch', to_at) * 1000) as "to"`,
    [companyId, pumpId],
  );
  return rows;
}

/** Moves a pump's cursor, in the transaction that wrote what it stands for. */
export async function moveCursor(database: Database, pumpId: string, rolledTo: number): Promise<void> {
  await database.query(
    `update rollup_cursors set rolled_to = greatest(rolled_to, to_timestamp($2::float8 / 1000)), rolled_at = now()
     where pump_id = $1`,
    [pumpId, rolledTo],
  );
}
