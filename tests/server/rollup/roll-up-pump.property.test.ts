import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import { dayText } from '#server/db/day-text.ts';
import type { Pools } from '#server/db/pools.ts';
import { rollUpWaiting } from '#server/rollup/roll-up-waiting.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { type DayRollup, rollUpDay } from '#shared/domain/rollup/roll-up-day.ts';
import { localDays } from '#shared/domain/time/local-days.ts';
import { inventedPump, wall } from '#tests/shared/domain/control/invented-pump.ts';
import { anyReadings } from '#tests/shared/domain/runs/invented-readings.ts';
import { makeTestCompany } from '#tests/support/test-company.ts';
import { openFreshPools } from '#tests/support/test-pools.ts';
import { createToldPump } from './told-pump.ts';

const ZONE = 'America/Los_Angeles';
const CONTEXT = inventedPump({ zone: ZONE, settings: { prime: { rpm: 3450, seconds: 60 } } });
/** An ordinary night, and the nights into days of 23 and of 25 hours. */
const STARTS = ['2025-07-01 21:00', '2025-03-08 20:00', '2025-11-01 20:00'];
const DAYS = ['2025-07-01', '2025-03-08', '2025-11-01'];

let pools: Pools;
beforeAll(async () => {
  pools = await openFreshPools();
  for (const day of DAYS)
    await pools.machine.query(`select millrace_make_reading_partitions($1::date - 1, $1::date + 6)`, [day]);
});

/** The first pump of a company of its own. */
async function makePump() {
  const company = await makeTestCompany(pools.machine);
  const { pumpId } = company.pumps[0]!;
  const { rows } = await pools.machine.query('select number from pumps where id = $1', [pumpId]);
  return { pumpId, companyId: company.companyId, pumpNumber: rows[0].number as number };
}

const rollUpAll = async () => {
  const { failed } = await rollUpWaiting({ pool: pools.machine, now: Date.now, rawDays: 100_000, freshMs: 0 });
  expect(failed).toEqual([]);
};

const listDays = async (pumpId: string) =>
  (
    await pools.machine.query(
      `select d.*, d.day::text as day, h.watt_hours as hour_watt_hours, h.gallons as hour_gallons, h.on_ms as hour_on_ms,
         h.quarter_watt_hours, f.watt_hours as five_watt_hours, f.rpm_max as five_rpm_max
       from pump_days d join pump_day_hours h using (pump_id, day) left join pump_day_fives f using (pump_id, day)
       where d.pump_id = $1 order by d.day`,
      [pumpId],
    )
  ).rows;

const near = (stored: readonly (number | null)[], computed: readonly number[], digits: number) => {
  expect(stored).toHaveLength(computed.length);
  for (const [index, value] of stored.entries()) expect(value ?? 0).toBeCloseTo(computed[index] ?? Number.NaN, digits);
};

// biome-ignore lint/suspicious/noExplicitAny: rows of a test's own query
function expectSame(stored: any, { day, whole, hours, fives }: DayRollup, isOver: boolean) {
  expect(stored.day).toBe(dayText(day.epochDay));
  expect(stored.watt_hours).toBeCloseTo(whole.wattMs / 3_600_000, 4);
  expect(stored.gallons).toBeCloseTo(whole.gallons, 2);
  expect(stored.gallons_sigma).toBeCloseTo(whole.gallonsSigma, 2);
  expect(stored).toMatchObject({
    readings: whole.readings,
    on_ms: Math.round(whole.onMs),
    covered_ms: Math.round(whole.coveredMs),
    unknown_flow_ms: Math.round(whole.unknownFlowMs),
    source_ms: whole.sourceMs.map(Math.round),
  });
  near(
    stored.hour_watt_hours,
    hours.map(({ wattMs }) => wattMs / 3_600_000),
    2,
  );
  near(
    stored.quarter_watt_hours,
    hours.map(({ quarterWattHours }) => quarterWattHours),
    2,
  );
  if (!isOver) return;
  near(
    stored.five_watt_hours,
    fives.map(({ wattMs }) => wattMs / 3_600_000),
    3,
  );
}

/** A pump's readings told in pieces, some of them late, the rollups made now and then. */
const told = fc.record({
  readings: fc.constantFrom(...STARTS).chain((start) => anyReadings(wall(ZONE, start))),
  cuts: fc.array(fc.nat(600), { maxLength: 6 }),
  late: fc.array(fc.nat(1000), { maxLength: 3 }),
});

const isLate = (late: readonly number[], index: number) => late.some((place) => Math.abs(place - index) < 8);

describe('the rollups of a pump', () => {
  it('are those of all its readings, however they came and whenever it was rolled up', async () => {
    await fc.assert(
      fc.asyncProperty(told, async ({ readings, cuts, late }) => {
        const made = await makePump();
        const pump = createToldPump(pools.machine, made, CONTEXT);
        const inTime = readings.filter((_, index) => !isLate(late, index));
        const batches: Reading[][] = [];
        let start = 0;
        for (const cut of [...new Set([...cuts, inTime.length])].sort((left, right) => left - right)) {
          if (cut > start) batches.push(inTime.slice(start, cut));
          start = Math.max(start, cut);
        }
        for (const batch of batches) {
          if (batch.length === 0) continue;
          await pump.tell(batch);
          await rollUpAll();
        }
        const afterwards = readings.filter((_, index) => isLate(late, index));
        if (afterwards.length > 0) await pump.tell(afterwards);
        await rollUpAll();

        const [first, last] = [readings[0]?.at ?? 0, readings.at(-1)?.at ?? 0];
        const stored = await listDays(made.pumpId);
        const days = localDays(ZONE, first, last + 1);
        expect(stored).toHaveLength(days.length);
        for (const [index, day] of days.entries()) {
          const computed = rollUpDay(ZONE, day, pump.readings(), pump.runs(), last);
          expectSame(stored[index], computed, day.to <= last);
        }
      }),
      { numRuns: 40, interruptAfterTimeLimit: 60_000 },
    );
  }, 120_000);

  it('count once for their company when the pad gets a zone in which the day has another length', async () => {
    const made = await makePump();
    const pump = createToldPump(pools.machine, made, CONTEXT);
    const [from, to] = [wall(ZONE, '2025-11-02 00:00'), wall(ZONE, '2025-11-02 22:00')];
    const readings = Array.from({ length: (to - from) / 60_000 }, (_, minute): Reading => {
      return { at: from + minute * 60_000, rpm: 1700, watts: 600, closedInputs: 0, activeInput: 0 };
    });
    await pump.tell(readings);
    await rollUpAll();
    await pools.machine.query(
      `update pads set zone = 'America/Phoenix' where id = (select pad_id from pumps where id = $1)`,
      [made.pumpId],
    );
    await pools.machine.query(
      `insert into rollup_marks (id, company_id, pump_id, kind, from_at, to_at)
       values (gen_random_uuid(), $1, $2, 'days', '2025-11-01 12:00Z', '2025-11-04 12:00Z')`,
      [made.companyId, made.pumpId],
    );
    await rollUpAll();
    const { rows } = await pools.machine.query(
      `select c.day::text as day, c.pumps, c.watt_hours, c.hour_watt_hours from company_days c
       where c.company_id = $1 order by c.day`,
      [made.companyId],
    );
    const byDay = new Map((await listDays(made.pumpId)).map((day) => [day.day, day]));
    expect(rows.map(({ day }) => day)).toEqual([...byDay.keys()]);
    for (const { day, pumps, watt_hours: wattHours, hour_watt_hours: hours } of rows) {
      expect([day, pumps]).toEqual([day, 1]);
      expect(wattHours).toBeCloseTo(byDay.get(day).watt_hours, 3);
      near(hours, byDay.get(day).hour_watt_hours.map(Number), 2);
    }
  });

  it('add up to the days of their company, wall-clock hour by wall-clock hour', async () => {
    const { rows } = await pools.machine.query(`
      select c.watt_hours as company, sum(d.watt_hours) as pumps, (select sum(x) from unnest(c.hour_watt_hours) x) as hours
      from company_days c join pump_days d using (company_id, day) group by c.company_id, c.day`);
    expect(rows.length).toBeGreaterThan(0);
    for (const { company, pumps, hours } of rows) {
      expect(company).toBeCloseTo(pumps, 3);
      expect(hours).toBeCloseTo(pumps, 3);
    }
  });
});
