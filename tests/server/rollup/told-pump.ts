import type pg from 'pg';
import { createControl } from '#shared/domain/control/create-control.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { createRunFold, type RunFlow } from '#shared/domain/runs/create-run-fold.ts';
import type { Run } from '#shared/domain/runs/run.ts';

/** Water that the flow meter tells of a reading; now and then it cannot. */
const flowOf = ({ rpm, at }: Reading): RunFlow | undefined =>
  (at / 1000) % 11 === 0 ? undefined : { gpm: rpm / 50, sigmaShare: 0.08 };

/** The runs of readings in order of time, the last one open. */
export function runsOf(context: PumpContext, readings: readonly Reading[]): Run[] {
  const control = createControl(context);
  const fold = createRunFold(context);
  for (const reading of readings) fold.push(reading, control.push(reading), flowOf(reading));
  return fold.take();
}

export type ToldPump = {
  /** Stores readings as if they had just come and been folded; those before the last one came late. */
  readonly tell: (readings: readonly Reading[]) => Promise<void>;
  readonly readings: () => readonly Reading[];
  readonly runs: () => readonly Run[];
};

const byTime = (left: Reading, right: Reading): number => left.at - right.at;

/**
 * Writes a pump's readings, runs and high water as ingest and fold leave them, without a broker. Late readings correct the
 * runs they touch and mark the days, as the fold does.
 */
export function createToldPump(
  machine: pg.Pool,
  pump: { readonly pumpId: string; readonly pumpNumber: number; readonly companyId: string },
  context: PumpContext,
): ToldPump {
  let all: Reading[] = [];
  let runs: Run[] = [];

  const store = async (readings: readonly Reading[]): Promise<void> => {
    await machine.query(
      `insert into readings (at, received_at, pump_number, rpm, watts, closed_inputs, active_input)
       select to_timestamp(at / 1000), now(), $1, rpm, watts, mask, 0
       from unnest($2::float8[], $3::real[], $4::real[], $5::int2[]) as told(at, rpm, watts, mask) on conflict do nothing`,
      [
        pump.pumpNumber,
        readings.map(({ at }) => at),
        readings.map(({ rpm }) => rpm),
        readings.map(({ watts }) => watts),
        readings.map(({ closedInputs }) => closedInputs),
      ],
    );
  };
  const storeRuns = async (client: pg.PoolClient): Promise<void> => {
    await client.query('delete from runs where pump_id = $1', [pump.pumpId]);
    await client.query(
      `insert into runs (pump_id, company_id, from_at, to_at, covered_ms, watt_hours, expected_rpm, mean_rpm, mean_watts,
         gallons, gallons_sigma, closed_inputs, active_input, source, expected_source)
       select $1, $2, to_timestamp(r.from / 1000), to_timestamp(r.to / 1000), r."coveredMs", r."wattHours", r."expectedRpm",
         r."meanRpm", r."meanWatts", r.gallons, r."gallonsSigma", r."closedInputs", r."activeInput", r.source, r."expectedSource"
       from jsonb_to_recordset($3::jsonb) as r("from" float8, "to" float8, "coveredMs" bigint, "wattHours" float8,
         "expectedRpm" real, "meanRpm" real, "meanWatts" real, gallons real, "gallonsSigma" real, "closedInputs" int2, "activeInput" int2,
         source text, "expectedSource" text)`,
      [pump.pumpId, pump.companyId, JSON.stringify(runs)],
    );
  };
  const commit = async (late: readonly Reading[]): Promise<void> => {
    const client = await machine.connect();
    try {
      await client.query('begin');
      await storeRuns(client);
      await client.query(
        `insert into pump_states (pump_id, company_id, pump_number, high_water) values ($1, $2, $3, to_timestamp($4::float8 / 1000))
         on conflict (pump_id) do update set high_water = excluded.high_water`,
        [pump.pumpId, pump.companyId, pump.pumpNumber, all.at(-1)?.at],
      );
      const touched = runs.filter(({ from, to = Number.POSITIVE_INFINITY }) =>
        late.some(({ at }) => at >= from - 1 && at <= to),
      );
      const [first, last] = [touched[0], touched.at(-1)];
      if (first !== undefined && last !== undefined)
        await client.query(
          `insert into rollup_marks (id, company_id, pump_id, kind, from_at, to_at)
           values (gen_random_uuid(), $1, $2, 'days', to_timestamp($3::float8 / 1000), to_timestamp($4::float8 / 1000))`,
          [pump.companyId, pump.pumpId, first.from, last.to ?? all.at(-1)?.at],
        );
      await client.query('commit');
    } finally {
      client.release();
    }
  };
  return {
    tell: async (readings) => {
      const highWater = all.at(-1)?.at ?? Number.NEGATIVE_INFINITY;
      all = [...all, ...readings].sort(byTime);
      runs = runsOf(context, all);
      await store(readings);
      await commit(readings.filter(({ at }) => at <= highWater));
    },
    readings: () => all,
    runs: () => runs,
  };
}
