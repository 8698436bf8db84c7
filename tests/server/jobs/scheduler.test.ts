import type pg from 'pg';
import pino from 'pino';
import { afterEach, describe, expect, it } from 'vitest';
import { deriveRoleUrl } from '#server/db/database-roles.ts';
import { cleanUp, REFUSALS_KEPT } from '#server/jobs/clean-up-repository.ts';
import type { Job } from '#server/jobs/job.ts';
import { createLeadership } from '#server/jobs/leadership.ts';
import { createScheduler, type Scheduler } from '#server/jobs/scheduler.ts';
import { makeTestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';
import { openTestPools } from '#tests/support/test-pools.ts';

const { machine } = await openTestPools();
const running: Scheduler[] = [];
afterEach(async () => {
  for (const scheduler of running.splice(0)) await scheduler.stop();
});

async function startTwo(databaseUrl: string, jobs: (name: string) => Job[]) {
  const machineUrl = deriveRoleUrl(databaseUrl, 'millrace_machine');
  return ['first', 'second'].map((name) => {
    const scheduler = createScheduler({
      jobs: jobs(name),
      context: { pool: machine, publicUrl: 'https://watch.example', now: Date.now, log: pino({ level: 'silent' }) },
      leadership: createLeadership(machineUrl),
      tickMs: 10,
    });
    scheduler.start();
    running.push(scheduler);
    return { name, scheduler };
  });
}

describe('jobs', () => {
  it('run in one process of two, and in the other when that one has gone; one that fails stops none', async () => {
    const database = await createFreshDatabase();
    const ran: string[] = [];
    const jobs = (name: string): Job[] => [
      { name: 'fails', everyMs: 5, run: () => Promise.reject(new Error('broken')) },
      { name: 'notes', everyMs: 5, run: async () => void ran.push(name) },
    ];
    const schedulers = await startTwo(database.databaseUrl, jobs);
    await expect.poll(() => ran.length).toBeGreaterThan(20);
    const leader = ran[0]!;
    expect(new Set(ran)).toEqual(new Set([leader]));
    await schedulers.find(({ name }) => name === leader)!.scheduler.stop();
    const other = leader === 'first' ? 'second' : 'first';
    await expect.poll(() => ran.at(-1)).toBe(other);
    for (const scheduler of running.splice(0)) await scheduler.stop();
    await database.drop();
  });

  it('run no more often than they are due', async () => {
    const database = await createFreshDatabase();
    const hours: string[] = [];
    const ticks: string[] = [];
    await startTwo(database.databaseUrl, () => [
      { name: 'hourly', everyMs: 3_600_000, run: async () => void hours.push('hour') },
      { name: 'often', everyMs: 1, run: async () => void ticks.push('tick') },
    ]);
    await expect.poll(() => ticks.length).toBeGreaterThan(10);
    expect(hours).toEqual(['hour']);
    for (const scheduler of running.splice(0)) await scheduler.stop();
    await database.drop();
  });
});

describe('the clean-up', () => {
  const insertRefusals = (pool: pg.Pool, companyId: string, deviceId: string, count: number) =>
    pool.query(
      `insert into refused_messages (company_id, device_id, received_at, reason, detail, sample)
       select $1, $2, now(), 'ahead', n::text, '' from generate_series(1, $3) as n`,
      [companyId, deviceId, count],
    );

  it('keeps the last refusals of each device and deletes what has expired', async () => {
    const company = await makeTestCompany(machine);
    const [many, few] = company.pumps;
    await insertRefusals(machine, company.companyId, many!.deviceId, REFUSALS_KEPT + 50);
    await insertRefusals(machine, company.companyId, few!.deviceId, 3);
    await machine.query(
      `insert into sign_in_attempts (key, points, expire) values ($1, 1, extract(epoch from now()) * 1000 - 1000), ($2, 1, null)`,
      [`old ${company.companyId}`, `kept ${company.companyId}`],
    );
    await cleanUp(machine);
    const { rows } = await machine.query(
      `select device_id, count(*)::int as kept, min(detail::int) as oldest from refused_messages where company_id = $1 group by 1 order by 2`,
      [company.companyId],
    );
    expect(rows).toEqual([
      { device_id: few!.deviceId, kept: 3, oldest: 1 },
      { device_id: many!.deviceId, kept: REFUSALS_KEPT, oldest: 51 },
    ]);
    const attempts = await machine.query('select key from sign_in_attempts where key like $1', [
      `%${company.companyId}`,
    ]);
    expect(attempts.rows).toEqual([{ key: `kept ${company.companyId}` }]);
  });
});
