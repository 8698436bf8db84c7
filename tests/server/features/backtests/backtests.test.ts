import pino from 'pino';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { type BacktestRunner, createBacktestRunner } from '#server/backtest/stored/backtest-runner.ts';
import type { Pools } from '#server/db/pools.ts';
import { asMachine } from '#server/db/transaction.ts';
import { makePartitionsBetween } from '#server/fold/history/history-repository.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

/*
 * The pumps of a test company run their program, 1700 rpm, from 08:00 to 18:00. Three days ago the first one stood from
 * 12:00 to 12:15 and from 14:00 to 14:40, and nothing said why.
 */
const ZONE = 'America/Los_Angeles';
const DAY = Math.floor(Date.now() / 86_400_000) - 3;
const at = (minute: number, day = DAY) => instantOf(ZONE, day, minute) ?? 0;
const MINUTE = 60_000;

let pools: Pools & { superuserUrl: string };
let server: TestServer;
let company: TestCompany;
const runners: BacktestRunner[] = [];

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine);
  await asMachine(pools.machine, (_db, client) => makePartitionsBetween(client, at(0, DAY - 2), at(0, DAY + 3)));
  const speedAt = (minute: number) => {
    const stands = (minute >= 720 && minute < 735) || (minute >= 840 && minute < 880);
    return minute >= 480 && minute < 1080 && !stands ? 1700 : 0;
  };
  const [pump] = company.pumps;
  const rows = Array.from({ length: 2 * 1440 }, (_, index) => {
    const time = at(0, DAY - 1) + index * MINUTE;
    const minute = index % 1440;
    const rpm = index < 1440 ? (minute >= 480 && minute < 1080 ? 1700 : 0) : speedAt(minute);
    return `(to_timestamp(${time / 1000}), to_timestamp(${time / 1000}), (select number from pumps where id = '${pump!.pumpId}'), ${rpm}, ${rpm === 0 ? 6 : 420}, 0, 0, 1)`;
  });
  await pools.machine.query(
    `insert into readings (at, received_at, pump_number, rpm, watts, closed_inputs, active_input, source) values ${rows.join(', ')}`,
  );
});
afterEach(async () => {
  for (const runner of runners.splice(0)) await runner.stop();
});

const startRunner = () => {
  const runner = createBacktestRunner({ pool: pools.machine, now: Date.now, log: pino({ level: 'silent' }) });
  runners.push(runner);
  runner.start();
  return runner;
};
const ask = (rules: object, change: object = {}, as = company.manager) =>
  server.ask('POST', '/api/backtests', {
    as,
    body: { scope: { kind: 'company' }, rules, from: at(0), to: at(1439), ...change },
  });
const read = async (id: string) => (await server.ask('GET', `/api/backtests/${id}`, { as: company.manager })).body;
const ended = async (id: string) => {
  await expect.poll(async () => (await read(id)).state, { timeout: 20_000 }).toBe('done');
  return read(id);
};

describe('a backtest over what is stored', () => {
  it('says which alarms a shorter delay would add, when each would have come, and folds them as they came', async () => {
    const { status, body } = await ask({ stopped: { figures: { delaySeconds: 600 } } });
    expect([status, body.state, body.pumps]).toEqual([201, 'waiting', company.pumps.length]);
    startRunner();
    const result = await ended(body.id);
    expect(result).toMatchObject({ pumpsDone: company.pumps.length, progress: 1, failedPumps: 0, readings: 2879 });
    const ofStopped = result.detectors.find(({ detector }: { detector: string }) => detector === 'stopped');
    expect(ofStopped).toMatchObject({ before: 1, after: 2, same: 0, changed: 1, gone: 0, new: 1 });
    expect(result.differing).toMatchObject([{ pumpId: company.pumps[0]!.pumpId, zone: ZONE }]);
    const stopped = result.differing[0].alarms.filter(
      ({ before, after }: { before: { detector: string } | null; after: { detector: string } | null }) =>
        (before ?? after)?.detector === 'stopped',
    );
    expect(stopped).toMatchObject([
      { difference: 'new', before: null, after: { from: at(720), raised: at(730) } },
      { difference: 'changed', before: { from: at(840), raised: at(860) }, after: { from: at(840), raised: at(850) } },
    ]);
  });

  it('and those that a rule spares which is switched off, for one pump', async () => {
    const scope = { kind: 'pump', pumpId: company.pumps[0]!.pumpId };
    const { body } = await ask({ stopped: { enabled: false } }, { scope });
    startRunner();
    const result = await ended(body.id);
    expect([result.pumps, result.readings]).toEqual([1, 2879]);
    expect(result.detectors.find(({ detector }: { detector: string }) => detector === 'stopped')).toMatchObject({
      ...{ before: 1, after: 0, gone: 1 },
    });
  });

  it('is one at a time for a company, and is called off while it waits', async () => {
    const { body: first } = await ask({});
    const second = await ask({});
    expect([second.status, second.body.code]).toEqual([409, 'conflict']);
    const { body } = await server.ask('DELETE', `/api/backtests/${first.id}`, { as: company.manager });
    expect([body.state, body.cancelAsked]).toEqual(['cancelled', true]);
    startRunner();
    const { body: third } = await ask({});
    await ended(third.id);
    expect((await read(first.id)).pumpsDone).toBe(0);
  });

  it('is called off while it runs', async () => {
    const { body } = await ask({});
    // A worker took it a moment ago, and hears of the end when it next says how far it is.
    await pools.machine.query(`update backtests set cancel_asked_at = now(), state = 'running' where id = $1`, [
      body.id,
    ]);
    startRunner();
    await expect.poll(async () => (await read(body.id)).state, { timeout: 10_000 }).toBe('cancelled');
  });

  it('goes on where a worker that died left it, and counts no pump twice', async () => {
    const { body } = await ask({ stopped: { figures: { delaySeconds: 600 } } });
    const [pump] = company.pumps;
    const kept = { kind: 'folded', readings: 7, alarms: [], needless: { answered: 0, before: 0, after: 0 } };
    await pools.machine.query(
      'insert into backtest_pumps (company_id, backtest_id, pump_id, outcome) values ($1, $2, $3, $4)',
      [company.companyId, body.id, pump!.pumpId, JSON.stringify(kept)],
    );
    await pools.machine.query(
      `update backtests set state = 'running', pumps_done = 1, readings = 7, worked_at = now() - interval '1 hour' where id = $1`,
      [body.id],
    );
    startRunner();
    startRunner();
    expect(await ended(body.id)).toMatchObject({ pumpsDone: company.pumps.length, readings: 7, counts: { before: 0 } });
  });

  it('tells how many alarms that were answered with nothing to do each version raises', async () => {
    const record = { answer: { by: company.manager.userId, at: at(900), note: null } };
    await pools.machine.query(
      `insert into alarms (id, company_id, pump_id, pad_id, detector, alarm_class, priority, state, cause, evidence, from_at,
         raised_at, returned_at, record)
       select gen_random_uuid(), p.company_id, p.id, p.pad_id, 'stopped', 'alarm', 'soon', 'normal', 'unknown', '{}',
         to_timestamp($2), to_timestamp($3), to_timestamp($4), $5 from pumps p where p.id = $1`,
      [company.pumps[0]!.pumpId, at(840) / 1000, at(860) / 1000, at(890) / 1000, JSON.stringify(record)],
    );
    const { body } = await ask({ stopped: { figures: { delaySeconds: 3000 } } });
    startRunner();
    expect((await ended(body.id)).needless).toEqual({ answered: 1, before: 1, after: 0 });
  });

  it('is refused for what cannot be, in words, and is nobody else’s to see', async () => {
    const wrong = await ask({ stopped: { figures: { delaySeconds: -1 } } }, { from: at(10), to: at(5) });
    expect(wrong.status).toBe(400);
    expect(wrong.body.issues.map(({ path }: { path: string }) => path)).toEqual([
      'rules.stopped.figures.delaySeconds',
      'to',
    ]);
    expect((await ask({}, { from: at(10), to: at(5) })).body.issues).toEqual([
      { path: 'to', message: 'lies after "from"' },
    ]);
    expect((await ask({}, {}, company.technician)).status).toBe(403);
    const theirs = await makeTestCompany(pools.machine);
    const scope = { kind: 'pump', pumpId: theirs.pumps[0]!.pumpId };
    expect((await ask({}, { scope })).status).toBe(404);
    const { body } = await server.ask('GET', '/api/backtests', { as: theirs.manager });
    expect(body.items).toEqual([]);
  });
});
