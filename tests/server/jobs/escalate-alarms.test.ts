import pino from 'pino';
import { beforeAll, describe, expect, it } from 'vitest';
import { newId } from '#server/db/new-id.ts';
import { saveAlarmChanges } from '#server/fold/alarms-repository.ts';
import { escalateAlarms } from '#server/jobs/escalate-alarms.ts';
import { acknowledge } from '#shared/domain/alarms/acknowledge.ts';
import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import type { Priority } from '#shared/domain/detectors/detector.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { openFreshPools } from '#tests/support/test-pools.ts';

// The whole outbox and every alarm are worked on here: nothing of other tests may lie in it.
const { machine } = await openFreshPools();
const MINUTE = 60_000;
let company: TestCompany;

beforeAll(async () => {
  company = await makeTestCompany(machine, { pads: 6 });
  const hours = { days: Array.from({ length: 7 }, () => true), fromMinute: 0, toMinute: 1440 };
  await machine.query('update companies set mail_hours = $2 where id = $1', [company.companyId, hours]);
});

function recordOf(raisedAt: number, priority: Priority): AlarmRecord {
  const signal = {
    type: 'raised',
    detector: 'failed-prime',
    alarmClass: 'alarm',
    cause: 'air-leak',
    evidence: { tries: 3 },
  } as const;
  return applySignal(undefined, { ...signal, priority, from: raisedAt, at: raisedAt })!.record;
}

async function addWaiting(pump: number, record: AlarmRecord): Promise<string> {
  const { pumpId } = company.pumps[pump]!;
  const { rows } = await machine.query<{ pad_id: string }>('select pad_id from pumps where id = $1', [pumpId]);
  const whose = { alarmId: newId(), companyId: company.companyId, pumpId, padId: rows[0]!.pad_id };
  await saveAlarmChanges(machine, [{ ...whose, isNew: true, record, transitions: [], isBacklog: false }]);
  return whose.alarmId;
}

const runAt = (now: number) =>
  escalateAlarms.run({
    pool: machine,
    publicUrl: 'https://watch.larkmoor.example',
    now: () => now,
    log: pino({ level: 'silent' }),
  });
const mailsOf = async (id: string) =>
  (await machine.query('select to_address, subject, text from outbox_mails where alarm_id = $1', [id])).rows;
const kindsOf = async (id: string) =>
  (
    await machine.query<{ kind: string }>('select kind from alarm_transitions where alarm_id = $1 order by at', [id])
  ).rows.map(({ kind }) => kind);

describe('an alarm that nobody acknowledges', () => {
  it('escalates to the manager after fifteen minutes when urgent, once', async () => {
    const raisedAt = Date.now();
    const id = await addWaiting(0, recordOf(raisedAt, 'urgent'));
    await runAt(raisedAt + 14 * MINUTE);
    expect(await mailsOf(id)).toEqual([]);
    await runAt(raisedAt + 15 * MINUTE);
    await runAt(raisedAt + 16 * MINUTE);
    const mails = await mailsOf(id);
    expect(mails.map(({ to_address }) => to_address)).toEqual([company.manager.email]);
    expect(mails[0].subject).toMatch(/^Not acknowledged: Did not prime/);
    expect(mails[0].text).toContain('Nobody has acknowledged this alarm for 15 min.');
    expect(await kindsOf(id)).toContain('escalated');
    const { rows } = await machine.query('select escalated_at, version from alarms where id = $1', [id]);
    expect(rows[0].escalated_at.getTime()).toBe(raisedAt + 15 * MINUTE);
  });

  it('waits four hours when it is less pressing', async () => {
    const raisedAt = Date.now();
    const id = await addWaiting(2, recordOf(raisedAt, 'soon'));
    await runAt(raisedAt + 239 * MINUTE);
    expect(await mailsOf(id)).toEqual([]);
    await runAt(raisedAt + 240 * MINUTE);
    expect((await mailsOf(id)).length).toBe(1);
  });

  it('stays where it is once somebody has acknowledged it, until it asks again after half a day', async () => {
    const raisedAt = Date.now();
    const by = company.technician.userId;
    const { record } = acknowledge(recordOf(raisedAt, 'urgent'), { by, at: raisedAt + MINUTE, note: null });
    const id = await addWaiting(3, record);
    await runAt(raisedAt + 60 * MINUTE);
    expect(await mailsOf(id)).toEqual([]);
    await runAt(raisedAt + MINUTE + 12 * 60 * MINUTE);
    expect((await mailsOf(id)).map(({ to_address }) => to_address)).toEqual([company.technician.email]);
    expect(await kindsOf(id)).toContain('re-alarmed');
  });
});
