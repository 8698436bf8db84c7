import { randomBytes } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { hashDeviceSecret } from '#server/broker/device-credential.ts';
import type { Pools } from '#server/db/pools.ts';
import { type CommissionedCompany, commissionCompany } from '#server/db/seed/commission-company.ts';
import { asMachine } from '#server/db/transaction.ts';
import { advisePumpNow } from '#server/rollup/advise-pump-now.ts';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import { hearNotices } from '#tests/support/heard-notices.ts';
import { TEST_DEVICE_KEY } from '#tests/support/test-company.ts';
import { openFreshPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

const DAY = 86_400_000;
/** Noon in New York, in the middle of a month: one tariff and one month's needs hold for the two weeks before. */
const NOON = Date.UTC(2026, 11, 16, 17);

let pools: Pools & { readonly superuserUrl: string };
let server: TestServer;
let company: CommissionedCompany;

beforeAll(async () => {
  pools = await openFreshPools();
  server = await startTestServer(pools);
  company = await asMachine(pools.machine, (db) =>
    commissionCompany(db, LARKMOOR, {
      hashPassword: async () => randomBytes(8).toString('hex'),
      hashSecret: (secret) => hashDeviceSecret(TEST_DEVICE_KEY, secret),
    }),
  );
}, 60_000);

const rowsOf = async (text: string, ...values: unknown[]) => (await pools.machine.query(text, values)).rows;
const pumpOn = async (pad: string): Promise<string> => {
  const text = `select p.id from pumps p join pads pad on pad.id = p.pad_id where pad.name = $1 and p.purpose = 'filter'`;
  return (await rowsOf(text, pad))[0].id;
};
const advise = (pumpId: string, now = NOON) =>
  advisePumpNow({ pool: pools.machine, publicUrl: 'https://watch.larkmoor.example', now }, pumpId);
const notesOf = (pumpId: string) =>
  rowsOf(
    `select a.id, state, alarm_class, priority, cause, evidence, (select count(*)::int from alarm_transitions t where t.alarm_id = a.id) as steps
     from alarms a where pump_id = $1 and detector = 'costly-program'`,
    pumpId,
  );

/** Says of so many days before noon that readings told of a share of each. */
async function tellDays(pumpId: string, days: number, share: number): Promise<void> {
  for (let day = 1; day <= days; day += 1)
    await pools.machine.query(
      `insert into runs (pump_id, company_id, from_at, to_at, covered_ms, watt_hours, expected_rpm, mean_rpm, mean_watts,
         closed_inputs, active_input, source, expected_source)
       values ($1, $2, $3, $4, $5, 9000, 2400, 2400, 400, 0, 0, 'program', 'program')`,
      [
        pumpId,
        company.companyId,
        new Date(NOON - day * DAY),
        new Date(NOON - (day - 1) * DAY),
        Math.round(share * DAY),
      ],
    );
}

describe('a program that costs too much', () => {
  it('is a note on the work list as soon as two stored weeks tell of it, with its figures, and mails nobody', async () => {
    const pumpId = await pumpOn('Heron Close 2');
    await tellDays(pumpId, 15, 0.98);
    const notices = await hearNotices(pools.superuserUrl, 'millrace_live');
    await advise(pumpId);

    const [note, ...others] = await notesOf(pumpId);
    expect(others).toEqual([]);
    expect(note).toMatchObject({ state: 'unacknowledged', alarm_class: 'note', priority: 'note', steps: 1 });
    expect(note.cause).toMatch(/^(dear-hours|hours-too-long|speed-too-high)$/);
    const { saving, daysJudged, currency, costPerYearBefore, costPerYearAfter, kwhPerYearBefore } = note.evidence;
    expect([daysJudged, currency]).toEqual([14, 'USD']);
    expect(costPerYearBefore).toMatch(/^\d+\.\d\d$/);
    expect(1 - costPerYearAfter / costPerYearBefore).toBeCloseTo(saving, 2);
    expect(saving * kwhPerYearBefore).toBeGreaterThanOrEqual(1000);
    expect(await rowsOf('select id from outbox_mails where alarm_id = $1', note.id)).toEqual([]);
    await notices.catchUp();
    expect(notices.heard).toContain(pumpId);

    const userId = company.userIds.get('manager@larkmoor.example')!;
    const sight = { companyId: company.companyId, userId, role: 'manager', customerId: undefined } as const;
    const as = { userId, email: 'manager@larkmoor.example', sight };
    const list = await server.ask('GET', '/api/alarms?alarmClass=note', { as });
    expect(list.body.items.map(({ id }: { id: string }) => id)).toEqual([note.id]);
    const { body } = await server.ask('GET', `/api/alarms/${note.id}`, { as });
    expect(body.likely.causes.map(({ cause }: { cause: string }) => cause)).toContain(note.cause);
  });

  it('is said once, whoever asks again', async () => {
    const pumpId = await pumpOn('Heron Close 2');
    const before = await notesOf(pumpId);
    await Promise.all([advise(pumpId), advise(pumpId, NOON + 60_000)]);
    await advise(pumpId, NOON + DAY);
    expect(await notesOf(pumpId)).toEqual(before);
  });

  it('is over once the proposed program is the one it has', async () => {
    const pumpId = await pumpOn('Heron Close 2');
    await pools.machine.query(
      `update pumps set settings_version = 2, settings = jsonb_set(settings, '{program}', a.advice -> 'after' -> 'program')
       from program_advice a where a.pump_id = pumps.id and pumps.id = $1`,
      [pumpId],
    );
    await advise(pumpId, NOON + 2 * DAY);
    expect(await notesOf(pumpId)).toMatchObject([{ state: 'normal', steps: 2 }]);
  });

  it('waits for the days themselves where readings tell too little of those before', async () => {
    const pumpId = await pumpOn('Windmill Yard 1');
    await tellDays(pumpId, 15, 0.3);
    for (let day = 0; day < 11; day += 1) await advise(pumpId, NOON + day * DAY);
    expect(await notesOf(pumpId)).toEqual([]);
    await advise(pumpId, NOON + 11 * DAY);
    expect(await notesOf(pumpId)).toMatchObject([{ state: 'unacknowledged', evidence: { daysJudged: 12 } }]);
  });

  it('leaves the days before out where the settings were commissioned anew, and a saving that is not worth a visit', async () => {
    const changed = await pumpOn('Marram Avenue 15');
    await pools.machine.query('update pumps set settings_version = 2 where id = $1', [changed]);
    const small = await pumpOn('Kelp Street 33');
    for (const pumpId of [changed, small]) {
      await tellDays(pumpId, 15, 0.98);
      await advise(pumpId);
      expect(await notesOf(pumpId)).toEqual([]);
    }
    const memories = await rowsOf(
      'select jsonb_array_length(costly_memory -> $2) as days from program_advice where pump_id = any($1) order by 1',
      [changed, small],
      'days',
    );
    expect(memories).toEqual([{ days: 1 }, { days: 14 }]);
  });
});
