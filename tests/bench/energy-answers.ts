import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import pg from 'pg';
import { pino } from 'pino';
import { createContainer } from '#server/container.ts';
import { newId } from '#server/db/new-id.ts';
import { createPools } from '#server/db/pools.ts';
import { signAccessToken } from '#server/features/session/access-token.ts';
import { type Bench, quantile } from './bench.ts';
import { BENCH_DEVICE_KEY, makeBenchCompany } from './bench-company.ts';
import type { BenchDatabase } from './bench-database.ts';
import { addBenchManager } from './bench-manager.ts';
import { addEnergyHistory } from './energy-company.ts';

const PUMPS = 10_000;
const TIMES = 60;
const WARM_UP = 10;
const TOKEN_KEY = 'token-key-of-the-bench-0123456789abcdef';

/** The HTTP side over the bench's database, and how long it takes to answer a manager, ms. */
async function openDesk({ databaseUrl, superuserUrl }: BenchDatabase) {
  const pools = createPools(databaseUrl, { onError: () => undefined });
  const server = createServer((request, response) => app(request, response));
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const { app } = createContainer({
    env: {
      publicUrl: url,
      tokenKey: TOKEN_KEY,
      deviceKey: BENCH_DEVICE_KEY,
      isDemo: false,
      checksAnswers: false,
      http: { trustedProxies: 1 },
    },
    pools,
    log: pino({ level: 'silent' }),
    now: Date.now,
    watch: { isBrokerUp: () => true, findFoldLagSeconds: () => 0 },
  });
  const { manager, pumpId } = await findActors(superuserUrl);
  const actor = { ...manager, role: 'manager' as const, customerId: undefined, name: 'Manager', sessionId: newId() };
  const cookie = `millrace-access=${signAccessToken(TOKEN_KEY, actor, Date.now()).token}`;
  const measure = async (path: string): Promise<{ p50: number; p95: number; kilobytes: number }> => {
    const times: number[] = [];
    let bytes = 0;
    for (let turn = 0; turn < WARM_UP + TIMES; turn += 1) {
      const startedAt = performance.now();
      const answer = await fetch(`${url}${path}`, { headers: { Cookie: cookie, 'Sec-Fetch-Site': 'same-origin' } });
      const text = await answer.text();
      if (answer.status !== 200) throw new Error(`${path} answered ${answer.status}: ${text.slice(0, 300)}`);
      bytes = text.length;
      if (turn >= WARM_UP) times.push(performance.now() - startedAt);
    }
    return { p50: quantile(times, 0.5), p95: quantile(times, 0.95), kilobytes: bytes / 1000 };
  };
  const close = async (): Promise<void> => {
    server.closeAllConnections();
    server.close();
    await pools.end();
  };
  return { measure, close, pumpId };
}

async function findActors(superuserUrl: string) {
  const client = new pg.Client({ connectionString: superuserUrl });
  await client.connect();
  const { rows } = await client.query<{ userId: string; companyId: string; pumpId: string }>(
    `select u.id as "userId", u.company_id as "companyId", (select id from pumps order by number limit 1) as "pumpId"
     from users u where u.role = 'manager'`,
  );
  await client.end();
  const [row] = rows;
  if (row === undefined) throw new Error('the bench has no manager');
  return { manager: { userId: row.userId, companyId: row.companyId }, pumpId: row.pumpId };
}

async function prepare(database: BenchDatabase): Promise<void> {
  const owner = new pg.Client({ connectionString: database.superuserUrl });
  await owner.connect();
  await makeBenchCompany(owner, PUMPS);
  await addBenchManager(database);
  await addEnergyHistory(owner);
  await owner.end();
}

const dayOf = (ms: number): string => new Date(ms).toISOString().slice(0, 10);

/** A year of one pump, and a month of the fleet, from the rollups of ten thousand pumps, through the whole HTTP side. */
export const energyAnswers: Bench = {
  name: 'energy',
  about: `a year of a pump and a month of a fleet from the rollups of ${PUMPS} pumps`,
  run: async ({ postgres, say }) => {
    const database = await (await postgres()).createDatabase('bench_energy');
    say('  making a year of days and 60 days of hours');
    await prepare(database);
    const desk = await openDesk(database);
    try {
      const now = Date.now();
      const year = `from=${dayOf(now - 364 * 86_400_000)}&until=${dayOf(now + 86_400_000)}`;
      const energy = await desk.measure(`/api/pumps/${desk.pumpId}/energy?${year}`);
      const chart = await desk.measure(
        `/api/pumps/${desk.pumpId}/readings?from=${now - 364 * 86_400_000}&until=${now}&width=1000`,
      );
      const fleet = await desk.measure('/api/energy');
      const pads = await desk.measure('/api/energy/pads');
      const hours = await desk.measure('/api/energy/hours');
      return [
        { name: 'a year of a pump’s energy, p95', value: energy.p95, unit: 'ms', atMost: 50 },
        { name: 'its middle', value: energy.p50, unit: 'ms' },
        { name: 'its size', value: energy.kilobytes, unit: 'kB' },
        { name: 'a year of a pump as a chart, p95', value: chart.p95, unit: 'ms', atMost: 50 },
        { name: 'its size as a chart', value: chart.kilobytes, unit: 'kB' },
        { name: 'a fleet’s month of kWh and money, p95', value: fleet.p95, unit: 'ms', atMost: 500 },
        { name: 'its worst pads, p95', value: pads.p95, unit: 'ms', atMost: 500 },
        { name: 'its hours, p95', value: hours.p95, unit: 'ms' },
      ];
    } finally {
      await desk.close();
      await database.drop();
    }
  },
};
