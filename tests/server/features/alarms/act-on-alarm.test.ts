import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { hearNotices } from '#tests/support/heard-notices.ts';
import { makeTestCompany, type TestCompany, type TestPerson } from '#tests/support/test-company.ts';
import { addAlarm, type TestAlarm } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

const HOUR = 3_600_000;

let pools: Pools & { superuserUrl: string };
let server: TestServer;
let company: TestCompany;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
});

/** An alarm of a fresh company, and what may be asked about it. */
const raise = async (alarm: TestAlarm = {}) => {
  company = await makeTestCompany(pools.machine);
  const id = await addAlarm(pools.machine, company.pumps[0]!.pumpId, {
    from: new Date(server.clock.now - 60_000),
    ...alarm,
  });
  const ask = (method: string, what: string, as: TestPerson, body?: unknown, version = 1) =>
    server.ask(method, `/api/alarms/${id}/${what}`, {
      as,
      body,
      headers: method === 'PUT' ? { 'If-Match': `"${version}"` } : {},
    });
  const read = async (as = company.manager) => (await server.ask('GET', `/api/alarms/${id}`, { as })).body;
  const listed = async (show: string) => {
    const { body } = await server.ask('GET', `/api/alarms?show=${show}`, { as: company.manager });
    return { ids: body.items.map((item: { id: string }) => item.id), totals: body.totals };
  };
  return { id, ask, read, listed };
};

const listActs = async (subjectId: string) => {
  const text = 'select action from audit_entries where subject_id = $1 order by at, id';
  return (await pools.machine.query<{ action: string }>(text, [subjectId])).rows.map(({ action }) => action);
};

describe('holding an alarm', () => {
  it('keeps it, says by whom, why and until when, and takes it off the open list', async () => {
    const { id, ask, read, listed } = await raise();
    const until = server.clock.now + 2 * HOUR;
    const held = await ask('PUT', 'shelf', company.technician, { until, reason: '  part comes at noon ' });
    expect([held.status, held.body.shelvedUntil, held.body.shelvedReason]).toEqual([200, until, 'part comes at noon']);
    expect(held.body.shelvedBy).toMatch(/^Technician/);
    expect(held.body.state).toBe('unacknowledged');
    expect((await listed('open')).ids).toEqual([]);
    expect(await listed('shelved')).toMatchObject({ ids: [id], totals: { shelved: 1, unacknowledged: 0, urgent: 0 } });
    expect((await read()).transitions.at(-1)).toMatchObject({
      kind: 'shelved',
      at: server.clock.now,
      note: 'part comes at noon',
      evidence: { primeWatts: 310 },
    });
    expect(await listActs(id)).toEqual(['alarm.shelved']);
  });

  it('is taken back at once', async () => {
    const { ask, listed, id } = await raise();
    await ask('PUT', 'shelf', company.technician, { until: server.clock.now + HOUR, reason: 'wrong row' });
    const back = await ask('DELETE', 'shelf', company.technician);
    expect([back.status, back.body.shelvedUntil, back.body.state]).toEqual([200, null, 'unacknowledged']);
    expect((await listed('open')).ids).toEqual([id]);
  });

  it.each([
    ['an end that has passed', -HOUR, 'why', 409],
    ['more than a week', 8 * 24 * HOUR, 'why', 409],
    ['no reason', HOUR, '  ', 400],
  ])('is refused for %s', async (_what, later, reason, status) => {
    const { ask } = await raise();
    const until = server.clock.now + later;
    expect((await ask('PUT', 'shelf', company.manager, { until, reason })).status).toBe(status);
  });

  it('asks for the version that was looked at', async () => {
    const { ask, id } = await raise();
    const body = { until: server.clock.now + HOUR, reason: 'why' };
    expect((await ask('PUT', 'shelf', company.manager, body, 7)).status).toBe(412);
    const bare = await server.ask('PUT', `/api/alarms/${id}/shelf`, { as: company.manager, body });
    expect(bare.status).toBe(428);
  });

  it('rings for the open screens', async () => {
    const { heard, catchUp } = await hearNotices(pools.superuserUrl, 'millrace_live');
    const { ask } = await raise();
    await ask('PUT', 'shelf', company.manager, { until: server.clock.now + HOUR, reason: 'why' });
    await catchUp();
    expect(heard).toContain(company.pumps[0]!.pumpId);
  });
});

describe('out of service', () => {
  it('is a manager’s to say and to end', async () => {
    const { ask, listed, id } = await raise();
    expect((await ask('PUT', 'out-of-service', company.technician, { reason: 'rebuilt' })).status).toBe(403);
    const out = await ask('PUT', 'out-of-service', company.manager, { reason: 'pool is rebuilt' });
    expect(out.body.outOfServiceSince).toMatchObject({ at: server.clock.now, reason: 'pool is rebuilt' });
    expect(await listed('out-of-service')).toMatchObject({ ids: [id], totals: { outOfService: 1 } });
    const back = await ask('DELETE', 'out-of-service', company.manager);
    expect([back.body.outOfService, back.body.outOfServiceSince]).toEqual([false, null]);
    expect(await listActs(id)).toEqual(['alarm.out-of-service', 'alarm.returned-to-service']);
  });
});

describe('giving an alarm to a technician', () => {
  it('names them in its place, and back', async () => {
    const { ask, read } = await raise();
    const { userId } = company.technician;
    const given = await ask('PUT', 'assignment', company.manager, { technicianId: userId });
    expect(given.body.assignedTo).toMatchObject({ id: userId });
    expect((await read()).transitions.at(-1)).toMatchObject({ kind: 'assigned', note: given.body.assignedTo.name });
    const back = await ask('DELETE', 'assignment', company.manager);
    expect(back.body.assignedTo).toBeNull();
  });

  it('is refused for anybody who is no technician of the company', async () => {
    const { ask } = await raise();
    const stranger = (await makeTestCompany(pools.machine)).technician;
    for (const { userId } of [stranger, company.homeowner]) {
      const { status, body } = await ask('PUT', 'assignment', company.manager, { technicianId: userId });
      expect([status, body.issues[0].path]).toEqual([400, 'body.technicianId']);
    }
  });

  it('offers the company’s own technicians, with what they have', async () => {
    await raise();
    const { body } = await server.ask('GET', '/api/technicians', { as: company.manager });
    expect(body.items).toEqual([{ id: company.technician.userId, name: expect.any(String), openAlarms: 1 }]);
  });

  it('counts an alarm that speaks for several of their pads', async () => {
    const { id } = await raise();
    const { pumpId } = company.pumps[0]!;
    await pools.machine.query(
      `update alarms set pump_id = null, pad_id = null, group_key = 'area-silence:Northside:0', group_kind = 'area-silence' where id = $1`,
      [id],
    );
    await pools.machine.query(
      'insert into alarm_members (company_id, alarm_id, pump_id, joined_at) values ($1, $2, $3, now())',
      [company.companyId, id, pumpId],
    );
    const { body } = await server.ask('GET', '/api/technicians', { as: company.manager });
    expect(body.items[0].openAlarms).toBe(1);
  });
});

describe('“nothing to do”', () => {
  it('is a recorded answer: seen, by whom, why; the condition stands', async () => {
    const { ask, read, id } = await raise();
    const { body } = await ask('PUT', 'nothing-to-do', company.technician, { note: 'backwash, as planned' });
    expect(body).toMatchObject({
      state: 'acknowledged',
      returnedAt: null,
      answer: { note: 'backwash, as planned', by: expect.stringMatching(/^Technician/) },
    });
    expect(await listActs(id)).toEqual(['alarm.nothing-to-do']);
    const back = await ask('DELETE', 'nothing-to-do', company.technician);
    expect([back.body.state, back.body.answer]).toEqual(['unacknowledged', null]);
    expect((await read()).transitions.map(({ kind }: { kind: string }) => kind)).toEqual([
      'raised',
      'nothing-to-do',
      'nothing-to-do-withdrawn',
    ]);
  });

  it('is another person’s to leave', async () => {
    const { ask } = await raise();
    await ask('PUT', 'nothing-to-do', company.technician, {});
    expect((await ask('DELETE', 'nothing-to-do', company.manager)).status).toBe(409);
  });

  it('is told to a homeowner without name or words', async () => {
    const { ask, read } = await raise();
    await ask('PUT', 'nothing-to-do', company.technician, { note: 'between us' });
    const seen = await read(company.homeowner);
    expect(seen).toMatchObject({ answer: { by: null, note: null }, likely: null });
    expect(JSON.stringify(seen)).not.toContain('between us');
  });
});

describe('working a note off', () => {
  const note = { alarmClass: 'note', priority: 'note', detector: 'clock-shift' } as const;

  it('puts it into history with who and what was found, and the count of that cause', async () => {
    const { ask, listed, read, id } = await raise(note);
    const { body } = await ask('PUT', 'done', company.technician, { found: 'set the clock', cause: 'power-cut' });
    expect(body).toMatchObject({ state: 'normal', done: { found: 'set the clock', cause: 'power-cut' } });
    expect([(await listed('open')).ids, (await listed('history')).ids]).toEqual([[], [id]]);
    const cause = (await read()).likely.causes.find((each: { cause: string }) => each.cause === 'power-cut');
    expect(cause).toMatchObject({ found: 1, calls: 1 });
  });

  it('is taken back while it holds', async () => {
    const { ask, listed, id } = await raise(note);
    await ask('PUT', 'done', company.technician, { found: 'set the clock' });
    const back = await ask('DELETE', 'done', company.technician);
    expect([back.status, back.body.done]).toEqual([200, null]);
    expect((await listed('open')).ids).toEqual([id]);
  });

  it('is not for an alarm: only the end of its condition ends one', async () => {
    const { ask } = await raise();
    const { status, body } = await ask('PUT', 'done', company.manager, { found: 'all is well' });
    expect([status, body.detail]).toEqual([409, expect.stringContaining('ends when its condition does')]);
  });
});

describe('what is done to several at once', () => {
  it('is done to each; what is refused is named and holds up nothing', async () => {
    const { id } = await raise();
    const other = await addAlarm(pools.machine, company.pumps[1]!.pumpId);
    const acts = [
      { alarmId: id, version: 1, act: { kind: 'shelve', until: server.clock.now + HOUR, reason: 'heat wave' } },
      { alarmId: other, version: 9, act: { kind: 'acknowledge' } },
      { alarmId: crypto.randomUUID(), act: { kind: 'acknowledge' } },
    ];
    const { status, body } = await server.ask('POST', '/api/alarms/acts', { as: company.technician, body: { acts } });
    expect(status).toBe(200);
    expect(body.done).toMatchObject([{ id, shelvedReason: 'heat wave' }]);
    expect(new Set(body.refused.map(({ code }: { code: string }) => code))).toEqual(
      new Set(['precondition-failed', 'not-found']),
    );
  });

  it('is done once for one key, and holds to who may do what', async () => {
    const { id, read } = await raise();
    const headers = { 'Idempotency-Key': 'a-key-of-this-test' };
    const body = { acts: [{ alarmId: id, act: { kind: 'acknowledge' } }] };
    for (let time = 0; time < 2; time += 1)
      await server.ask('POST', '/api/alarms/acts', { as: company.technician, body, headers });
    expect((await read()).transitions).toHaveLength(2);
    const given = {
      acts: [{ alarmId: id, act: { kind: 'assign', technicianId: company.technician.userId } }],
    };
    const refused = await server.ask('POST', '/api/alarms/acts', { as: company.technician, body: given });
    expect(refused.body.refused).toMatchObject([{ alarmId: id, code: 'forbidden' }]);
  });
});

describe('a latched alarm', () => {
  it('is released by an acknowledgement, and latched again by its undo', async () => {
    const { ask, read } = await raise({ state: 'latched' });
    expect((await ask('POST', 'acknowledgement', company.technician, {})).body.state).toBe('acknowledged');
    expect((await read()).transitions.at(-1).kind).toBe('latch-released');
    expect((await ask('DELETE', 'acknowledgement', company.technician)).body.state).toBe('latched');
  });
});
