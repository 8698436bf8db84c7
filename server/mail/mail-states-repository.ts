import type pg from 'pg';
import type { PadMailState, PersonMailState } from '#shared/domain/alarms/plan-mail.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** What the mail policy remembers of one pad, by the person who was told. */
export type PadMemory = Readonly<Record<string, PadMailState>>;

export type MailMemory = {
  readonly pads: Map<string, PadMemory>;
  readonly persons: Map<string, PersonMailState>;
};

type Kind = 'pad' | 'person';
type Subject = { readonly kind: Kind; readonly id: string; readonly companyId: string };
type Row = { readonly subject_kind: Kind; readonly subject_id: string; readonly state: unknown };

/** Rows are written by `saveMailMemory` alone. */
const parsePad = (state: unknown) => state as PadMemory;
const parsePerson = (state: unknown) => state as PersonMailState;

/** What is remembered of these pads and people, locked until the transaction ends, always in the same order. */
export async function lockMailMemory(database: Database, subjects: readonly Subject[]): Promise<MailMemory> {
  const given = JSON.stringify(subjects.map(({ kind, id, companyId }) => ({ kind, id, company_id: companyId })));
  await database.query(
    `insert into mail_states (company_id, subject_kind, subject_id, state)
     select distinct g.company_id, g.kind, g.id, case g.kind when 'pad' then '{}'::jsonb else '{"sentAt":[]}'::jsonb end
     from json_to_recordset($1::json) as g(kind text, id uuid, company_id uuid) order by 2, 3 on conflict do nothing`,
    [given],
  );
  const { rows } = await database.query<Row>(
    `select s.subject_kind, s.subject_id, s.state from mail_states s
     where (s.subject_kind, s.subject_id) in (select g.kind, g.id from json_to_recordset($1::json) as g(kind text, id uuid))
     order by s.subject_kind, s.subject_id for update`,
    [given],
  );
  const memory: MailMemory = { pads: new Map(), persons: new Map() };
  for (const { subject_kind: kind, subject_id: id, state } of rows) {
    if (kind === 'pad') memory.pads.set(id, parsePad(state));
    else memory.persons.set(id, parsePerson(state));
  }
  return memory;
}

/** Stores what the policy remembers from now on. The rows must be locked. */
export async function saveMailMemory(database: Database, { pads, persons }: MailMemory): Promise<void> {
  const rows = [
    ...[...pads].map(([id, state]) => ({ kind: 'pad', id, state })),
    ...[...persons].map(([id, state]) => ({ kind: 'person', id, state })),
  ];
  await database.query(
    `update mail_states s set state = g.state, updated_at = now()
     from json_to_recordset($1::json) as g(kind text, id uuid, state jsonb)
     where s.subject_kind = g.kind and s.subject_id = g.id`,
    [JSON.stringify(rows)],
  );
}
