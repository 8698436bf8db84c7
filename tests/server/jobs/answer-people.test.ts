import pino from 'pino';
import { beforeAll, describe, expect, it } from 'vitest';
import { newId } from '#server/db/new-id.ts';
import { asMachine } from '#server/db/transaction.ts';
import { lockAlarms, saveAlarmChanges } from '#server/fold/alarms-repository.ts';
import { announceAssignments } from '#server/jobs/announce-assignments.ts';
import { endExplanations } from '#server/jobs/end-explanations.ts';
import { escalateAlarms } from '#server/jobs/escalate-alarms.ts';
import type { Job } from '#server/jobs/job.ts';
import { withdrawUntrue } from '#server/jobs/withdraw-untrue.ts';
import { claimMails, LEASE_SECONDS, markDelayed } from '#server/mail/outbox-claim-repository.ts';
import { acknowledge } from '#shared/domain/alarms/acknowledge.ts';
import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import { CURED_WITHIN_MS } from '#shared/domain/alarms/apply-to-done.ts';
import { assign } from '#shared/domain/alarms/assign.ts';
import { shelve, takeOutOfService } from '#shared/domain/alarms/set-aside.ts';
import { workOff } from '#shared/domain/alarms/work-off.ts';
import type { AlarmSignal, Detector } from '#shared/domain/detectors/detector.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { openFreshPools } from '#tests/support/test-pools.ts';

// The whole outbox and every alarm are worked on here: nothing of other tests may lie in it.
const { machine } = await openFreshPools();
const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
let company: TestCompany;

beforeAll(async () => {
  company = await makeTestCompany(machine, { pads: 9 });
  const hours = { days: Array.from({ length: 7 }, () => true), fromMinute: 0, toMinute: 1440 };
  await machine.query('update companies set mail_hours = $2 where id = $1', [company.companyId, hours]);
});

const raise = (at: number, more: Partial<Extract<AlarmSignal, { type: 'raised' }>> = {}): AlarmRecord =>
  applySignal(undefined, {
    type: 'raised',
    detector: 'failed-prime',
    alarmClass: 'alarm',
    priority: 'urgent',
    cause: 'air-leak',
    evidence: { tries: 3 },
    from: at,
    at,
    ...more,
  })!.record;

async function add(pump: number, record: AlarmRecord): Promise<string> {
  const { pumpId } = company.pumps[pump]!;
  // One may be open from the test before: two at once cannot be.
  await machine.query(`update alarms set state = 'normal' where pump_id = $1 and detector = $2`, [
    pumpId,
    record.detector,
  ]);
  const { rows } = await machine.query<{ pad_id: string }>('select pad_id from pumps where id = $1', [pumpId]);
  const whose = { alarmId: newId(), companyId: company.companyId, pumpId, padId: rows[0]!.pad_id };
  await saveAlarmChanges(machine, [{ ...whose, isNew: true, record, transitions: [], isBacklog: false }]);
  return whose.alarmId;
}

const run = (job: Job, now: number) =>
  job.run({
    pool: machine,
    publicUrl: 'https://watch.larkmoor.example',
    now: () => now,
    log: pino({ level: 'silent' }),
  });
const mailsOf = async (id: string) =>
  (
    await machine.query<{ to_address: string; subject: string; text: string; html: string }>(
      'select to_address, subject, text, html from outbox_mails where alarm_id = $1',
      [id],
    )
  ).rows;
const stateOf = async (id: string) =>
  (
    await machine.query<{ state: string; suppressed: boolean; kinds: string[] }>(
      `select state, suppressed, array(select kind from alarm_transitions t where t.alarm_id = a.id order by at) as kinds
       from alarms a where id = $1`,
      [id],
    )
  ).rows[0];

describe('an alarm that was given away', () => {
  it('is told of once, to whom it was given, with its likely causes', async () => {
    const now = Date.now();
    await machine.query(`update users set email = 'other@company.example' where id = $1`, [company.homeowner.userId]);
    const seen = acknowledge(raise(now - HOUR), { by: company.manager.userId, at: now, note: null }).record;
    const given = assign(seen, {
      by: company.manager.userId,
      at: now,
      to: company.homeowner.userId,
      name: 'Other',
    })!.record;
    const id = await add(0, given);
    await run(announceAssignments, now + 1000);
    await run(announceAssignments, now + 2000);
    const mails = await mailsOf(id);
    expect(mails.map((mail) => mail.to_address)).toEqual(['other@company.example']);
    expect(mails[0]!.text).toContain('This was given to you.');
    expect(mails[0]!.text).toMatch(/Likely causes\n1\. Air leak on the suction side\n {3}for it: /);
    expect(mails[0]!.html).toContain('<strong>Air leak on the suction side</strong>');
  });
});

describe('mail of what was set aside', () => {
  const waitingMail = async (id: string, dueAt: number, transition = 'raised 1') =>
    machine.query(
      `insert into outbox_mails (id, company_id, alarm_id, transition, recipient_user_id, to_address, subject, text, html,
         message_id, due_at) values ($1::uuid, $2, $3, $6, $4, 'tech@company.example', 's', 't', 'h', '<' || $1 || '@x>', $5)`,
      [newId(), company.companyId, id, company.technician.userId, new Date(dueAt), transition],
    );
  const claimed = async (now: number) => (await claimMails(machine, now)).filter(({ subject }) => subject === 's');
  const keep = (id: string, record: AlarmRecord) =>
    asMachine(machine, async (_db, client) => {
      const [open] = await lockAlarms(client, [id]);
      await saveAlarmChanges(client, [{ ...open!, record, transitions: [], isNew: false, isBacklog: false }]);
    });
  const hold = (record: AlarmRecord, at: number) =>
    shelve(record, { by: company.manager.userId, at, until: at + HOUR, reason: 'part ordered' })!.record;

  it.each([
    ['shelved', 1, (record: AlarmRecord, at: number) => shelve(record, { by: 'x', at, until: at + HOUR, reason: 'r' })],
    ['out of service', 2, (record: AlarmRecord, at: number) => takeOutOfService(record, { by: 'x', at, reason: 'r' })],
  ] as const)('does not leave once it is %s, and is taken back', async (_what, pump, setAside) => {
    const now = Date.now();
    const by = company.manager.userId;
    const record = raise(now);
    const made = setAside(record, now)!.record;
    const id = await add(pump, {
      ...made,
      shelf: made.shelf === null ? null : { ...made.shelf, by },
    });
    await waitingMail(id, now - 1000);
    expect(await claimed(now)).toEqual([]);
    await run(withdrawUntrue, now);
    expect(await mailsOf(id)).toEqual([]);
  });

  it('is taken back though it was tried once, so that it does not leave stale when the hold is over', async () => {
    const now = Date.now();
    const record = raise(now);
    const id = await add(8, record);
    await waitingMail(id, now - 1000);
    const [mail] = await claimed(now);
    await markDelayed(machine, [mail!.id], 'connection refused', now + 2000);
    await keep(id, hold(record, now));
    expect(await claimed(now + 3000)).toEqual([]);
    await run(withdrawUntrue, now + 3000);
    await keep(id, record);
    expect(await claimed(now + 2 * HOUR)).toEqual([]);
    expect(await mailsOf(id)).toEqual([]);
  });

  it('stays while a sender has it in hand: it may have left', async () => {
    const now = Date.now();
    const record = raise(now);
    const id = await add(8, record);
    await waitingMail(id, now - 1000);
    expect(await claimed(now)).toHaveLength(1);
    await keep(id, hold(record, now));
    await run(withdrawUntrue, now + 1000);
    expect(await mailsOf(id)).toHaveLength(1);
    await run(withdrawUntrue, now + 1000 * LEASE_SECONDS);
    expect(await mailsOf(id)).toEqual([]);
  });

  it('leaves at its next try where the alarm still stands', async () => {
    const now = Date.now();
    const id = await add(8, raise(now));
    await waitingMail(id, now - 1000);
    const [mail] = await claimed(now);
    await markDelayed(machine, [mail!.id], 'connection refused', now + 2000);
    await run(withdrawUntrue, now + 1000);
    expect(await claimed(now + 1000)).toEqual([]);
    expect(await claimed(now + 2000)).toMatchObject([{ id: mail!.id, attempts: 2 }]);
  });

  it.each([
    ['the condition is over', 'raised 1', true],
    ['it says that nobody acknowledged what somebody has', 'escalated 1', true],
    ['somebody acknowledged what it tells of', 'raised 1', false],
  ] as const)('when %s, of “%s”: taken back is %s', async (what, transition, isTakenBack) => {
    const now = Date.now();
    const record = raise(now);
    const id = await add(8, record);
    await waitingMail(id, now - 1000, transition);
    const over = what === 'the condition is over';
    await keep(id, {
      ...record,
      ...(over ? { active: false, state: 'returned', returnedAt: now } : { state: 'acknowledged' }),
    });
    await run(withdrawUntrue, now);
    expect(await mailsOf(id)).toHaveLength(isTakenBack ? 0 : 1);
  });

  it('comes when the hold is over and the condition still stands', async () => {
    const now = Date.now();
    const by = company.manager.userId;
    const id = await add(3, shelve(raise(now), { by, at: now, until: now + HOUR, reason: 'part ordered' })!.record);
    await run(escalateAlarms, now + 59 * MINUTE);
    expect(await mailsOf(id)).toEqual([]);
    await run(escalateAlarms, now + HOUR);
    expect((await mailsOf(id)).map(({ text }) => text)).toEqual([expect.stringContaining('the time is over')]);
    expect((await stateOf(id))?.kinds).toEqual(['shelf-ended']);
  });

  it('is never written for what is out of service, however long it waits', async () => {
    const now = Date.now();
    const by = company.manager.userId;
    const id = await add(4, takeOutOfService(raise(now), { by, at: now, reason: 'rebuilt' })!.record);
    await run(escalateAlarms, now + 48 * HOUR);
    expect(await mailsOf(id)).toEqual([]);
  });
});

describe('an alarm that another one explained', () => {
  const hush = (record: AlarmRecord, at: number, evidence: Record<string, string>) =>
    applySignal(record, { type: 'cleared', detector: record.detector, at, evidence })!.record;

  it('stays suppressed while that one stands, and returns after it', async () => {
    const now = Date.now();
    const stopped = await add(5, raise(now, { detector: 'stopped' as Detector }));
    const speed = raise(now, { detector: 'wrong-speed' });
    const id = await add(5, hush(speed, now + 1, { consequenceOf: 'stopped' }));
    await run(endExplanations, now + 2);
    expect(await stateOf(id)).toMatchObject({ suppressed: true, state: 'unacknowledged' });
    await machine.query(`update alarms set state = 'normal', returned_at = now() where id = $1`, [stopped]);
    await run(endExplanations, now + 3);
    expect(await stateOf(id)).toMatchObject({ suppressed: false, state: 'returned', kinds: ['suppression-ended'] });
  });

  it('is ended without waiting for others that somebody has in hand and that are explained still', async () => {
    const now = Date.now();
    await add(0, raise(now, { detector: 'stopped' }));
    const held = await add(0, hush(raise(now, { detector: 'wrong-speed' }), now + 1, { consequenceOf: 'stopped' }));
    const free = await add(6, hush(raise(now, { detector: 'wrong-speed' }), now + 1, { consequenceOf: 'stopped' }));
    const other = await machine.connect();
    await other.query('begin');
    await other.query('select from alarms where id = $1 for update', [held]);
    await run(endExplanations, now + 2);
    await other.query('rollback');
    other.release();
    expect((await stateOf(held))?.suppressed).toBe(true);
    expect((await stateOf(free))?.suppressed).toBe(false);
  });

  it('stays suppressed while the pad’s state mutes it', async () => {
    const now = Date.now();
    const { padIds } = company;
    await machine.query(`update pads set state = 'winterized' where id = $1`, [padIds[5]]);
    const id = await add(6, hush(raise(now, { detector: 'wrong-speed' }), now + 1, { padState: 'winterized' }));
    await run(endExplanations, now + 2);
    expect((await stateOf(id))?.suppressed).toBe(true);
    await machine.query(`update pads set state = 'open' where id = $1`, [padIds[5]]);
    await run(endExplanations, now + 3);
    expect((await stateOf(id))?.suppressed).toBe(false);
  });
});

describe('a note that was worked off', () => {
  it('comes back to the list when its condition still holds a week later', async () => {
    const now = Date.now();
    const note = raise(now, { detector: 'clock-shift', alarmClass: 'note', priority: 'note' });
    const by = company.technician.userId;
    const id = await add(7, workOff(note, { by, at: now, found: 'set it', cause: null })!.record);
    await run(escalateAlarms, now + CURED_WITHIN_MS - MINUTE);
    expect((await stateOf(id))?.state).toBe('normal');
    await run(escalateAlarms, now + CURED_WITHIN_MS + MINUTE);
    expect(await stateOf(id)).toMatchObject({ state: 'unacknowledged', kinds: ['still-stands'] });
  });
});
