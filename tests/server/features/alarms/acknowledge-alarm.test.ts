import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { hearNotices } from '#tests/support/heard-notices.ts';
import { makeTestCompany, type TestCompany, type TestPerson } from '#tests/support/test-company.ts';
import { addAlarm, type TestAlarm } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools & { superuserUrl: string };
let server: TestServer;
let company: TestCompany;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
});

/** An alarm of a fresh company, whose people act on it. */
const raise = async (alarm: TestAlarm = {}) => {
  company = await makeTestCompany(pools.machine);
  const from = new Date(server.clock.now - 60_000);
  const id = await addAlarm(pools.machine, company.pumps[0]!.pumpId, { from, ...alarm });
  const path = `/api/alarms/${id}/acknowledgement`;
  const acknowledge = (as: TestPerson, body: unknown = {}, headers = {}) =>
    server.ask('POST', path, { as, body, headers });
  const withdraw = (as: TestPerson) => server.ask('DELETE', path, { as });
  const read = async (as = company.manager) => (await server.ask('GET', `/api/alarms/${id}`, { as })).body;
  return { id, acknowledge, withdraw, read };
};

const listActs = async (subjectId: string) => {
  const text = 'select action, actor_user_id as "by" from audit_entries where subject_id = $1 order by at, id';
  return (await pools.machine.query(text, [subjectId])).rows;
};

describe('acknowledging an alarm', () => {
  it('says who has seen it, when and why, and leaves the condition as it is', async () => {
    const { id, acknowledge, read } = await raise();
    const { status, body } = await acknowledge(company.technician, { note: '  on my way ' });
    expect(status).toBe(200);
    expect(body).toMatchObject({
      id,
      state: 'acknowledged',
      acknowledgedAt: server.clock.now,
      acknowledgedBy: expect.stringMatching(/^Technician/),
      acknowledgementNote: 'on my way',
      returnedAt: null,
      version: 2,
    });
    const { transitions, mails } = await read();
    expect(transitions.map(({ kind }: { kind: string }) => kind)).toEqual(['raised', 'acknowledged']);
    expect(transitions[1]).toMatchObject({ note: 'on my way', at: server.clock.now });
    expect(mails).toHaveLength(1);
    expect(await listActs(id)).toEqual([{ action: 'alarm.acknowledged', by: company.technician.userId }]);
  });

  it('changes nothing when it is repeated, by whomever', async () => {
    const { id, acknowledge, read } = await raise();
    const first = await acknowledge(company.technician, { note: 'first' });
    const again = await acknowledge(company.manager, { note: 'second' });
    expect(again.body).toEqual(first.body);
    expect((await read()).transitions).toHaveLength(2);
    expect(await listActs(id)).toHaveLength(1);
  });

  it('is done once by two people at the same time', async () => {
    const { acknowledge, read } = await raise();
    const answers = await Promise.all([acknowledge(company.technician), acknowledge(company.manager)]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200]);
    expect((await read()).transitions).toHaveLength(2);
  });

  it('makes history of one that has returned to normal', async () => {
    const { acknowledge } = await raise({ state: 'returned' });
    expect((await acknowledge(company.manager)).body.state).toBe('normal');
    const open = await server.ask('GET', '/api/alarms', { as: company.manager });
    const history = await server.ask('GET', '/api/alarms?show=history', { as: company.manager });
    expect([open.body.items.length, history.body.items.length]).toEqual([0, 1]);
  });

  it('is refused for an older version of it, when the version is said', async () => {
    const { acknowledge } = await raise();
    expect((await acknowledge(company.manager, {}, { 'If-Match': '"9"' })).status).toBe(412);
    expect((await acknowledge(company.manager, {}, { 'If-Match': '"1"' })).status).toBe(200);
  });

  it('rings for the open screens', async () => {
    const { heard, catchUp } = await hearNotices(pools.superuserUrl, 'millrace_live');
    const { acknowledge } = await raise();
    await acknowledge(company.manager);
    await catchUp();
    expect(heard).toContain(company.pumps[0]!.pumpId);
  });

  it('is not for a homeowner, who sees that it was seen but not by whom', async () => {
    const { acknowledge, read } = await raise();
    expect((await acknowledge(company.homeowner)).status).toBe(403);
    await acknowledge(company.technician, { note: 'between us' });
    const seen = await read(company.homeowner);
    expect(seen).toMatchObject({ state: 'acknowledged', acknowledgedBy: null, acknowledgementNote: null, mails: [] });
    expect(JSON.stringify(seen)).not.toContain('between us');
  });
});

describe('taking an acknowledgement back', () => {
  it("is possible for one's own, within five minutes", async () => {
    const { id, acknowledge, withdraw, read } = await raise();
    await acknowledge(company.technician);
    expect((await withdraw(company.manager)).status).toBe(409);
    const { status, body } = await withdraw(company.technician);
    expect([status, body.state, body.acknowledgedBy]).toEqual([200, 'unacknowledged', null]);
    expect((await read()).transitions.at(-1).kind).toBe('acknowledgement-withdrawn');
    expect((await listActs(id)).map(({ action }: { action: string }) => action)).toEqual([
      'alarm.acknowledged',
      'alarm.acknowledgement-withdrawn',
    ]);
  });

  it('is refused after five minutes, and where there is nothing to take back', async () => {
    const { acknowledge, withdraw } = await raise();
    expect((await withdraw(company.manager)).status).toBe(409);
    await acknowledge(company.manager);
    server.clock.now += 300_001;
    expect((await withdraw(company.manager)).status).toBe(409);
    server.clock.now = Date.now();
  });

  it('is refused once the pump has raised it anew', async () => {
    const { acknowledge, withdraw } = await raise({ state: 'returned' });
    await acknowledge(company.manager);
    await addAlarm(pools.machine, company.pumps[0]!.pumpId);
    const { status, body } = await withdraw(company.manager);
    expect([status, body.detail]).toEqual([409, expect.stringContaining('raised anew')]);
  });
});
