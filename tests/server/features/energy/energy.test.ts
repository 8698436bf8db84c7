import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { presentTariff } from '#server/features/tariffs/tariff-shape.ts';
import { rollUpWaiting } from '#server/rollup/roll-up-waiting.ts';
import { listLocalSlices } from '#shared/domain/energy/local-slices.ts';
import { priceEnergy } from '#shared/domain/energy/price-energy.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { createToldPump, type ToldPump } from '#tests/server/rollup/told-pump.ts';
import { inventedPump, wall } from '#tests/shared/domain/control/invented-pump.ts';
import { TIME_OF_USE, TWO_TIER } from '#tests/shared/domain/energy/sample-tariffs.ts';
import { makeTestCompany, type TestCompany, type TestPerson } from '#tests/support/test-company.ts';
import { openFreshPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

const ZONE = 'America/Los_Angeles';
/** The month of the day of 25 hours. */
const FIRST_DAY = '2025-11-01';
const DAYS = 6;
const WATTS = 3000;

let pools: Pools;
let server: TestServer;
let ours: TestCompany;
let filter: string;
let told: ToldPump;

/** A reading a minute at steady watts from one local time to another. */
function steady(from: string, to: string, watts = WATTS): Reading[] {
  const readings: Reading[] = [];
  for (let at = wall(ZONE, from); at <= wall(ZONE, to); at += 60_000)
    readings.push({ at, rpm: 1700, watts, closedInputs: 0, activeInput: 0 });
  return readings;
}

const rollUp = () => rollUpWaiting({ pool: pools.machine, now: () => server.clock.now, rawDays: 100_000, freshMs: 0 });

const get = (path: string, as: TestPerson) => server.ask('GET', path, { as });
const ok = async (path: string, as: TestPerson) => {
  const answer = await get(path, as);
  expect([path, answer.status, answer.body]).toMatchObject([path, 200, {}]);
  return answer.body;
};

beforeAll(async () => {
  pools = await openFreshPools();
  server = await startTestServer(pools);
  await pools.machine.query(`select millrace_make_reading_partitions('2025-10-30', '2025-11-10')`);
  ours = await makeTestCompany(pools.machine);
  filter = ours.pumps[0]!.pumpId;
  const { rows } = await pools.machine.query('select number from pumps where id = $1', [filter]);
  const context = { ...inventedPump({ zone: ZONE, settings: { prime: null } }), intervalSeconds: 60 };
  told = createToldPump(
    pools.machine,
    { pumpId: filter, companyId: ours.companyId, pumpNumber: rows[0].number },
    context,
  );
  await told.tell(steady('2025-11-01 00:00', '2025-11-07 00:00'));
  const { machine } = pools;
  for (const [tariff, from, to] of [[TWO_TIER, '2020-01-01', null]] as const) {
    const id = crypto.randomUUID();
    const plan = crypto.randomUUID();
    const company = ours.companyId;
    await machine.query('insert into tariffs (id, company_id, name, tariff) values ($1, $2, $3, $4)', [
      id,
      company,
      tariff.name,
      JSON.stringify(tariff),
    ]);
    await machine.query('insert into tariff_plans (id, company_id) values ($1, $2)', [plan, company]);
    await machine.query(
      'insert into tariff_terms (plan_id, company_id, tariff_id, from_day, to_day) values ($1, $2, $3, $4, $5)',
      [plan, company, id, from, to],
    );
  }
  expect((await rollUp()).failed).toEqual([]);
});

const WINDOW = `?from=${FIRST_DAY}&until=2025-11-07`;
const HOURS = DAYS * 24 + 1;
const KWH = (HOURS * WATTS) / 1000;

describe('a pump’s energy', () => {
  it('is that of its days, one of them with 25 hours, and costs what the month costs by the domain’s own sum', async () => {
    const body = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager);
    expect(body.totals.kwh).toBeCloseTo(KWH, 3);
    expect(body.spans.map((span: { kwh: number }) => Math.round(span.kwh))).toEqual([72, 75, 72, 72, 72, 72]);
    const usage = listLocalSlices(ZONE, wall(ZONE, '2025-11-01 00:00'), wall(ZONE, '2025-11-07 00:00'), 60).map(
      (slice) => ({ ...slice, wattHours: WATTS }),
    );
    const priced = priceEnergy(TWO_TIER, usage);
    const dollars = (priced.ok ? priced.value.micros : Number.NaN) / 1e6;
    // 300 kWh at 0.10 and the rest at 0.25, by hand.
    expect(dollars).toBeCloseTo(30 + (KWH - 300) * 0.25, 6);
    expect(Number(body.totals.cost)).toBeCloseTo(dollars, 2);
    expect(body).toMatchObject({ money: 'shown', currency: 'USD', savedMissing: 'no-baseline', saved: null });
  });

  it('has days that add up to the total to the cent', async () => {
    const body = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager);
    const cents = body.spans.map((span: { cost: string }) => Math.round(Number(span.cost) * 100));
    expect(cents.reduce((sum: number, one: number) => sum + one, 0)).toBe(Math.round(Number(body.totals.cost) * 100));
    const periods = body.periods.map((period: { cost: string }) => Math.round(Number(period.cost) * 100));
    expect(periods.reduce((sum: number, one: number) => sum + one, 0)).toBe(Math.round(Number(body.totals.cost) * 100));
  });

  it('is the same by month', async () => {
    const byDay = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager);
    const byMonth = await ok(`/api/pumps/${filter}/energy${WINDOW}&by=month`, ours.manager);
    expect(byMonth.totals).toEqual(byDay.totals);
    expect(byMonth.spans).toHaveLength(1);
    expect(byMonth.spans[0]).toMatchObject({ label: '2025-11', cost: byDay.totals.cost });
  });

  it('is without money for a technician, and with their own money for a homeowner', async () => {
    const technician = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.technician);
    expect(technician).toMatchObject({ money: 'withheld', currency: null });
    expect(JSON.stringify(technician)).not.toMatch(/"cost":"/);
    expect(technician.totals.kwh).toBeCloseTo(KWH, 3);
    const homeowner = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.homeowner);
    expect(homeowner.totals.cost).toBe((await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager)).totals.cost);
    expect((await get(`/api/pumps/${filter}/energy${WINDOW}`, ours.neighbour)).status).toBe(404);
  });

  it('shows a homeowner nothing from before the day they moved in', async () => {
    await pools.machine.query('update pad_ownerships set starts_at = $2 where pad_id = $1', [
      ours.padIds[0],
      new Date(wall(ZONE, '2025-11-04 00:00')),
    ]);
    const body = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.homeowner);
    expect(body.spans.map((span: { label: string }) => span.label)).toEqual(['2025-11-04', '2025-11-05', '2025-11-06']);
    const { days } = await ok(`/api/pumps/${filter}/energy/hours?month=2025-11`, ours.homeowner);
    expect(days[0].day).toBe('2025-11-04');
    await pools.machine.query('update pad_ownerships set starts_at = $2 where pad_id = $1', [
      ours.padIds[0],
      new Date('2024-05-01'),
    ]);
  });

  it('names hours, the doubled one as one cell', async () => {
    const { days, prices } = await ok(`/api/pumps/${filter}/energy/hours?month=2025-11`, ours.manager);
    expect(days[1]).toMatchObject({ day: '2025-11-02' });
    expect(days[1].wattHours[0]).toBeCloseTo(WATTS, 0);
    expect(days[1].wattHours[1]).toBeCloseTo(2 * WATTS, 0);
    expect(prices).toMatchObject({ currency: 'USD', weekday: Array(24).fill('0.1') });
    expect((await ok(`/api/pumps/${filter}/energy/hours?month=2025-11`, ours.technician)).prices).toBeNull();
  });

  it('refuses a window that is none, by name', async () => {
    for (const query of [
      '?from=2025-11-02',
      '?from=2025-11-02&until=2025-11-01',
      '?from=2020-01-01&until=2025-11-01',
    ]) {
      const { status, body } = await get(`/api/pumps/${filter}/energy${query}`, ours.manager);
      expect([query, status, body.issues?.[0]?.path]).toEqual([query, 400, 'query.until']);
    }
  });
});

describe('a day’s price', () => {
  const COLUMNS = 'day::text, priced_by, kwh_by_period, energy_micros_by_period, demand_micros';
  const stored = async () =>
    (await pools.machine.query(`select ${COLUMNS} from pump_days where pump_id = $1 order by day`, [filter])).rows;
  const change = (what: string) =>
    pools.machine.query(`update pump_days set ${what} where pump_id = $1 and day = $2`, [filter, FIRST_DAY]);
  const firstCost = async () => (await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager)).spans[0].cost;

  it('is kept when the day is rolled up', async () => {
    const days = await stored();
    // 72 kWh at 0.10.
    expect(days[0]).toMatchObject({ day: FIRST_DAY, demand_micros: 0 });
    expect(days[0].energy_micros_by_period[0]).toBeCloseTo(7_200_000, 0);
    expect(days[0].kwh_by_period[0]).toBeCloseTo(72, 3);
    expect(new Set(days.map((day: { priced_by: string | null }) => day.priced_by)).size).toBe(1);
  });

  it('is shown as it is kept, and worked out anew where it was priced by something else', async () => {
    const before = await stored();
    await change(`energy_micros_by_period = '{5000000}'`);
    expect(await firstCost()).toBe('5.00');
    await change(`priced_by = 'another tariff'`);
    expect(await firstCost()).toBe('7.20');
    await pools.machine.query(
      `insert into rollup_marks (id, company_id, pump_id, kind, from_at, to_at) values ($1, $2, $3, 'prices', 'epoch', now())`,
      [crypto.randomUUID(), ours.companyId, filter],
    );
    await rollUp();
    expect(await stored()).toEqual(before);
  });
});

describe('a chart of days', () => {
  it('has a point a local day, that of 25 hours too, and no gap between them', async () => {
    const [from, until] = [wall(ZONE, '2025-11-01 00:00'), wall(ZONE, '2025-11-07 00:00')];
    const series = await ok(`/api/pumps/${filter}/readings?from=${from}&until=${until}&width=10`, ours.manager);
    expect(series.bucketMs).toBe(86_400_000);
    expect(series.t).toEqual([1, 2, 3, 4, 5, 6].map((day) => wall(ZONE, `2025-11-0${day} 00:00`)));
    expect(series.watts).toEqual(Array(6).fill(WATTS));
    expect(series.rpm).toEqual(Array(6).fill(1700));
  });
});

describe('what was saved', () => {
  it('is against the stated baseline, with its method and uncertainty', async () => {
    const path = `/api/pumps/${filter}/baseline`;
    const baseline = { kind: 'clamped', watts: 4000, sigmaWatts: 200, basis: { kind: 'same-hours' }, note: '' };
    const headers = { 'If-Match': '"0"' };
    const stated = await server.ask('PUT', path, { as: ours.technician, body: { baseline }, headers });
    expect([stated.status, stated.body]).toMatchObject([200, { watts: 4000, version: 1 }]);
    expect((await server.ask('PUT', path, { as: ours.manager, body: { baseline }, headers })).status).toBe(412);
    const { saved } = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager);
    expect(saved.savedKwh).toBeCloseTo(HOURS * 1, 2);
    expect(saved).toMatchObject({ method: 'A', stipulated: ['baseline-hours'] });
    expect(saved.sigmaKwh).toBeCloseTo(Math.hypot(0.05 * HOURS * 4, 0.05 * HOURS * 3), 1);
    expect(saved.coverage).toBeCloseTo(1, 5);
    expect((await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.technician)).saved.saved).toBeNull();
  });

  it('stands in the fleet’s month once the worker has priced it', async () => {
    expect((await ok('/api/energy?month=2025-11', ours.manager)).pending).toBe(1);
    await rollUp();
    const fleet = await ok('/api/energy?month=2025-11', ours.manager);
    const pump = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager);
    expect(fleet).toMatchObject({ pending: 0, priced: 1, cost: pump.totals.cost, currency: 'USD' });
    expect(fleet.kwh).toBeCloseTo(KWH, 3);
    expect(fleet.saved.saved).toBe(pump.saved.saved);
    expect(fleet.days.map((day: { kwh: number }) => Math.round(day.kwh))).toEqual([72, 75, 72, 72, 72, 72, 0]);
    expect(fleet.periods[0]).toMatchObject({ name: 'Period 1', cost: pump.totals.cost });
  });

  it('is kept with the days: the hours are not read for it, and it is what the request worked out itself', async () => {
    const path = `/api/pumps/${filter}/energy${WINDOW}`;
    const fromHours = async () => {
      await pools.machine.query('update pump_days set compared_by = null where pump_id = $1', [filter]);
      return (await ok(path, ours.manager)).saved;
    };
    const stored = (await ok(path, ours.manager)).saved;
    expect(await fromHours()).toEqual({ ...stored, sigmaKwh: expect.closeTo(stored.sigmaKwh, 6) });
    await pools.machine.query(
      `insert into rollup_marks (id, company_id, pump_id, kind, from_at, to_at)
       values (gen_random_uuid(), $1, $2, 'prices', 'epoch', now())`,
      [ours.companyId, filter],
    );
    await rollUp();
    const hours = await pools.machine.query('update pump_day_hours set on_ms = array[]::int[] where pump_id = $1', [
      filter,
    ]);
    expect(hours.rowCount).toBeGreaterThan(0);
    expect((await ok(path, ours.manager)).saved).toEqual(stored);
  });
});

describe('a pad and the company', () => {
  it('agree with the pump to the cent', async () => {
    const pump = await ok(`/api/pumps/${filter}/energy${WINDOW}`, ours.manager);
    const pad = await ok(`/api/pads/${ours.padIds[0]}/energy${WINDOW}`, ours.manager);
    const { items, matching } = await ok('/api/energy/pads?month=2025-11', ours.manager);
    expect(pad.totals.cost).toBe(pump.totals.cost);
    expect(pad.pumps).toHaveLength(2);
    expect(items[0]).toMatchObject({ padId: ours.padIds[0], cost: pump.totals.cost, currency: 'USD' });
    expect(matching).toBe(1);
    const hours = await ok('/api/energy/hours?month=2025-11', ours.manager);
    expect(hours.days[1].wattHours[1]).toBeCloseTo(2 * WATTS, 0);
  });

  it.each(['cost', 'kwh', 'per-volume', 'rise', 'saved', 'coverage', 'name'])('sort pads by %s', async (sort) => {
    const { items } = await ok(`/api/energy/pads?month=2025-11&sort=${sort}&limit=1`, ours.manager);
    expect(items).toHaveLength(1);
  });

  it('keep the fleet’s money to managers', async () => {
    for (const path of ['/api/energy', '/api/energy/pads', '/api/energy/hours', '/api/tariffs'])
      for (const person of [ours.technician, ours.homeowner]) expect((await get(path, person)).status).toBe(403);
  });
});

describe('late readings', () => {
  it('correct the days they touch', async () => {
    await told.tell(steady('2025-11-07 02:00', '2025-11-07 06:00'));
    await rollUp();
    const before = await ok(`/api/pumps/${filter}/energy?from=2025-11-07&until=2025-11-08`, ours.manager);
    expect(before.totals.kwh).toBeCloseTo((4 * WATTS) / 1000, 2);
    expect(before.gapCount).toBe(1);
    await told.tell(steady('2025-11-07 00:01', '2025-11-07 01:59'));
    await rollUp();
    const after = await ok(`/api/pumps/${filter}/energy?from=2025-11-07&until=2025-11-08`, ours.manager);
    expect(after.totals.kwh).toBeCloseTo((6 * WATTS) / 1000, 2);
    expect(after.gapCount).toBe(0);
  });
});

describe('another tariff', () => {
  it('prices everything anew from its day on', async () => {
    const created = await server.ask('POST', '/api/tariffs', { as: ours.manager, body: presentTariff(TIME_OF_USE) });
    expect([created.status, created.body]).toMatchObject([201, { isCompanys: false, pads: 0 }]);
    const terms = await ok('/api/tariff-terms', ours.manager);
    const [first] = terms.terms;
    const next = [
      { ...first, to: '2025-11-03' },
      { tariffId: created.body.id, from: '2025-11-03', to: null },
    ];
    const headers = { 'If-Match': `"${terms.version}"` };
    const said = await server.ask('PUT', '/api/tariff-terms', { as: ours.manager, body: { terms: next }, headers });
    expect([said.status, said.body.terms]).toEqual([200, next]);
    await rollUp();
    const pump = await ok(`/api/pumps/${filter}/energy?from=2025-11-01&until=2025-11-08`, ours.manager);
    // Monday 2025-11-03: 19 h at 0.12 and 5 h (16 to 21 h) at 0.30, 3 kWh each.
    expect(pump.spans[2].cost).toBe(((19 * 0.12 + 5 * 0.3) * 3).toFixed(2));
    expect(pump.tariffs.map((one: { name: string }) => one.name)).toEqual(['Two tiers', 'Time of use']);
    const fleet = await ok('/api/energy?month=2025-11', ours.manager);
    expect(fleet.cost).toBe(pump.totals.cost);
  });
});
