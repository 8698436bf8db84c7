import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { queryOf, waitUntilFolded } from '#tests/support/folded-stream.ts';
import { openRawDevice, type RawDevice, topicOf } from '#tests/support/test-broker.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';
import { startTestStream, type TestStream } from '#tests/support/test-stream.ts';

/*
 * The pumps of a test company run their program, 1700 rpm, from 08:00 to 18:00 by their pad's clock. The server's clock
 * stands at yesterday's noon of the first pad, so that a program is due whenever these tests run.
 */
const YESTERDAY = Math.floor(Date.now() / 86_400_000) - 1;
const NOON = instantOf('America/Los_Angeles', YESTERDAY, 720) ?? 0;
const MINUTE = 60_000;

let database: Awaited<ReturnType<typeof createFreshDatabase>>;
let running: TestStream;
let company: TestCompany;
let now = NOON;
/** Pumps whose pads lie in the first zone: every other pad does. */
let pumps: TestCompany['pumps'];

beforeAll(async () => {
  database = await createFreshDatabase();
  running = await startTestStream(database.databaseUrl, { now: () => now });
  company = await makeTestCompany(running.pools.machine, { pads: 24 });
  const { rows } = await running.pools.machine.query<{ id: string }>(
    `select p.id from pumps p join pads on pads.id = p.pad_id where pads.zone = 'America/Los_Angeles' and p.name = 'Filter pump'`,
  );
  const ids = new Set(rows.map(({ id }) => id));
  pumps = company.pumps.filter(({ pumpId }) => ids.has(pumpId));
});
afterAll(async () => {
  await running.stop();
  await database.drop();
});

const query = queryOf(() => database);
const folded = () => waitUntilFolded(running);

const running1700 = (at: number): Reading => ({
  at,
  rpm: 1700,
  closedInputs: 0,
  activeInput: 0,
  watts: 420,
  reportedSource: 'program',
});
const stopped = (at: number): Reading => ({ ...running1700(at), rpm: 0, watts: 6, reportedSource: 'program' });
const every10s = (from: number, to: number, make: (at: number) => Reading) =>
  Array.from({ length: Math.round((to - from) / 10_000) }, (_, index) => make(from + index * 10_000));

type Pump = TestCompany['pumps'][number];
const connections = new Map<string, RawDevice>();
async function send(pump: Pump, readings: readonly Reading[]): Promise<void> {
  const device =
    connections.get(pump.serial) ??
    (await openRawDevice(running.port, pump.serial, { password: Buffer.from(pump.secret) }));
  connections.set(pump.serial, device);
  for (let from = 0; from < readings.length; from += 400) {
    const payload = encodeReadings(readings.slice(from, from + 400));
    device.send({
      cmd: 'publish',
      topic: topicOf(pump.serial, 'readings'),
      payload,
      qos: 1,
      messageId: 1 + from / 400,
      dup: false,
      retain: false,
    });
    await device.next('puback');
  }
  await folded();
}

describe('what is stored is understood a moment later', () => {
  it('as runs, the pump this instant, and a cursor', async () => {
    const [pump] = pumps;
    await send(pump!, [
      ...every10s(NOON - 30 * MINUTE, NOON - 10 * MINUTE, running1700),
      ...every10s(NOON - 10 * MINUTE, NOON, (at) => ({
        ...running1700(at),
        rpm: 2850,
        closedInputs: 1,
        activeInput: 1,
        watts: 1400,
        reportedSource: 'input',
      })),
    ]);
    const runs = await query(
      `select source, mean_rpm, to_at is null as is_open, watt_hours from runs where pump_id = $1 order by from_at`,
      pump!.pumpId,
    );
    expect(runs.map(({ source, is_open }) => [source, is_open])).toEqual([
      ['program', false],
      ['input', true],
    ]);
    // 420 W for 20 minutes, held across the change: 140 Wh.
    expect(runs[0]!.watt_hours).toBeCloseTo(140, 0);
    const [state] = await query(
      `select s.now, s.epoch, date_part('epoch', s.heard_at) * 1000 as heard_at, s.cursor, date_part('epoch', s.high_water) * 1000 as high_water
       from pump_states s where pump_id = $1`,
      pump!.pumpId,
    );
    expect(state).toMatchObject({
      heard_at: NOON,
      high_water: NOON - 10_000,
      now: { rpm: 2850, source: 'input', expectedRpm: 2850 },
    });
  });

  it('as an alarm with its evidence, its first transition and a mail to the technician, together', async () => {
    const pump = pumps[1]!;
    await send(pump, every10s(NOON - 60 * MINUTE, NOON - 21 * MINUTE, running1700));
    await send(pump, every10s(NOON - 21 * MINUTE, NOON, stopped));
    const [alarm] = await query<{ id: string; from_at: Date }>('select * from alarms where pump_id = $1', pump.pumpId);
    expect(alarm).toMatchObject({
      detector: 'stopped',
      alarm_class: 'alarm',
      priority: 'soon',
      state: 'unacknowledged',
      count: 1,
    });
    expect(Math.abs(alarm!.from_at.getTime() - (NOON - 21 * MINUTE))).toBeLessThan(MINUTE);
    const transitions = await query('select kind, cause from alarm_transitions where alarm_id = $1', alarm!.id);
    expect(transitions.map(({ kind }) => kind)).toEqual(['raised']);
    const [mail, ...others] = await query<{ text: string; html: string; due_at: Date }>(
      'select * from outbox_mails where alarm_id = $1',
      alarm!.id,
    );
    expect(others).toEqual([]);
    expect(mail).toMatchObject({ to_address: company.technician.email, sent_at: null });
    expect(mail!.due_at.getTime()).toBe(now);
    expect(mail!.text).toContain(`https://watch.larkmoor.example/alarms/${alarm!.id}`);
    expect(mail!.html).toContain(`https://watch.larkmoor.example/alarms/${alarm!.id}`);
  });

  it('and an alarm whose condition ends returns, unacknowledged', async () => {
    const pump = pumps[1]!;
    now = NOON + 20 * MINUTE;
    await send(pump, every10s(NOON, now, running1700));
    const [alarm] = await query<{ id: string }>('select * from alarms where pump_id = $1', pump.pumpId);
    expect(alarm).toMatchObject({ state: 'returned' });
    const kinds = await query('select kind from alarm_transitions where alarm_id = $1 order by at', alarm!.id);
    expect(kinds.map(({ kind }) => kind)).toEqual(['raised', 'returned']);
    now = NOON;
  });

  it('and what a backlog raises and clears goes to history without a mail', async () => {
    const pump = pumps[2]!;
    const begin = NOON - 180 * MINUTE;
    await send(pump, [
      ...every10s(begin, begin + 20 * MINUTE, running1700),
      ...every10s(begin + 20 * MINUTE, begin + 60 * MINUTE, stopped),
    ]);
    await send(pump, every10s(begin + 60 * MINUTE, begin + 120 * MINUTE, running1700));
    const alarms = await query('select id, state from alarms where pump_id = $1', pump.pumpId);
    expect(alarms.map(({ state }) => state)).toEqual(['normal']);
    expect(await query('select from outbox_mails where alarm_id = $1', alarms[0]!.id)).toEqual([]);
  });

  it('and a late reading corrects the runs it touches and raises nothing', async () => {
    const pump = pumps[3]!;
    const begin = NOON - 90 * MINUTE;
    const kept = every10s(begin, NOON, running1700).filter(
      ({ at }) => at < begin + 20 * MINUTE || at >= begin + 30 * MINUTE,
    );
    const late = every10s(begin + 20 * MINUTE, begin + 30 * MINUTE, running1700);
    await send(pump, kept);
    // The run that is open is corrected when it has closed.
    await send(
      pump,
      every10s(NOON, NOON + 2 * MINUTE, (at) => ({
        ...running1700(at),
        rpm: 2850,
        closedInputs: 1,
        activeInput: 1,
        watts: 1400,
        reportedSource: 'input',
      })),
    );
    const before = await query('select source from runs where pump_id = $1 order by from_at', pump.pumpId);
    expect(before.map(({ source }) => source)).toEqual(['program', 'no-data', 'program', 'input']);
    await send(pump, late);
    now = NOON + 15_000;
    running.stream.tick();
    await folded();
    const after = await query<{ source: string; covered_ms: string; flags: string[] }>(
      'select source, covered_ms, flags from runs where pump_id = $1 order by from_at',
      pump.pumpId,
    );
    expect(after.map(({ source }) => source)).toEqual(['program', 'input']);
    expect(after[0]!.flags).toContain('late-corrected');
    expect(Number(after[0]!.covered_ms)).toBeCloseTo(90 * MINUTE, -5);
    expect(await query('select from alarms where pump_id = $1', pump.pumpId)).toEqual([]);
    now = NOON;
  });

  it('and a late reading within the run that is open corrects it as soon as that has closed', async () => {
    const pump = pumps[9]!;
    const [begin, away] = [NOON - 60 * MINUTE, NOON - 40 * MINUTE];
    const other = (at: number) => ({ ...running1700(at), rpm: 2850, closedInputs: 1, activeInput: 1, watts: 1400 });
    // After a break a device sends what it kept between newer readings: here two, and no gap shows.
    const isKept = ({ at }: Reading) => at >= away && at < away + 20_000;
    await send(
      pump,
      every10s(begin, NOON, running1700).filter((reading) => !isKept(reading)),
    );
    await send(pump, every10s(away, away + 20_000, other));
    const lookAt = async (at: number): Promise<unknown[]> => {
      now = at;
      running.stream.tick();
      await folded();
      const runs = await query('select source from runs where pump_id = $1 order by from_at', pump.pumpId);
      return runs.map(({ source }) => source);
    };
    expect(await lookAt(NOON + 15_000)).toEqual(['program']);
    await send(pump, every10s(NOON, NOON + MINUTE, other));
    expect(await lookAt(NOON + MINUTE)).toEqual(['program', 'input', 'program', 'input']);
    now = NOON;
  });

  it('and silence is noticed by the server’s own clock', async () => {
    const pump = pumps[4]!;
    await send(pump, every10s(NOON - 10 * MINUTE, NOON, running1700));
    now = NOON + 3 * MINUTE;
    running.stream.tick();
    await folded();
    const [state] = await query<{ silent_since: Date }>(
      'select silent_since from pump_states where pump_id = $1',
      pump.pumpId,
    );
    expect(state!.silent_since.getTime()).toBe(NOON);
    now = NOON + 62 * MINUTE;
    running.stream.tick();
    await folded();
    const alarms = await query('select detector, alarm_class, priority from alarms where pump_id = $1', pump.pumpId);
    expect(alarms).toEqual([{ detector: 'silent', alarm_class: 'alarm', priority: 'note' }]);
    await send(pump, [running1700(now)]);
    const [again] = await query('select silent_since from pump_states where pump_id = $1', pump.pumpId);
    expect(again).toEqual({ silent_since: null });
    now = NOON;
  });
});

describe('a server that starts again', () => {
  it('goes on where it stopped, and says nothing twice', async () => {
    const pump = pumps[5]!;
    await send(
      pump,
      every10s(NOON - 60 * MINUTE, NOON - 10 * MINUTE, (at) =>
        at < NOON - 40 * MINUTE ? running1700(at) : stopped(at),
      ),
    );
    const before = await query('select id, version from alarms where pump_id = $1', pump.pumpId);
    expect(before.length).toBe(1);
    for (const device of connections.values()) device.socket.destroy();
    connections.clear();
    await running.stop();
    running = await startTestStream(database.databaseUrl, { now: () => now });
    await folded();
    await send(pump, every10s(NOON - 10 * MINUTE, NOON, stopped));
    expect(await query('select id, version from alarms where pump_id = $1', pump.pumpId)).toEqual(before);
    expect((await query('select from outbox_mails where alarm_id = $1', before[0]!.id)).length).toBe(1);
  });

  it('folds what was stored while nobody folded', async () => {
    const pump = pumps[6]!;
    for (const device of connections.values()) device.socket.destroy();
    connections.clear();
    await running.stop();
    const values = every10s(NOON - 5 * MINUTE, NOON, running1700)
      .map(
        ({ at }) =>
          `(to_timestamp(${at / 1000}), to_timestamp(${at / 1000}), (select number from pumps where id = '${pump.pumpId}'), 1700, 420, 0, 0)`,
      )
      .join(', ');
    await query(
      `insert into readings (at, received_at, pump_number, rpm, watts, closed_inputs, active_input) values ${values}`,
    );
    running = await startTestStream(database.databaseUrl, { now: () => now });
    await folded();
    const [state] = await query<{ now: { rpm: number; at: number } }>(
      'select now from pump_states where pump_id = $1',
      pump.pumpId,
    );
    expect(state!.now).toMatchObject({ rpm: 1700, at: NOON - 10_000 });
  });
});

describe('two servers', () => {
  it('hand a pump over with its device, and neither loses nor repeats anything of it', async () => {
    const pump = pumps[7]!;
    await send(pump, every10s(NOON - 60 * MINUTE, NOON - 40 * MINUTE, running1700));
    connections.get(pump.serial)?.socket.destroy();
    connections.delete(pump.serial);
    const second = await startTestStream(database.databaseUrl, { now: () => now });
    const device = await openRawDevice(second.port, pump.serial, { password: Buffer.from(pump.secret) });
    const payload = encodeReadings(every10s(NOON - 40 * MINUTE, NOON, stopped));
    device.send({
      cmd: 'publish',
      topic: topicOf(pump.serial, 'readings'),
      payload,
      qos: 1,
      messageId: 9,
      dup: false,
      retain: false,
    });
    await device.next('puback');
    // What the first server was storing when the device moved must have been stored by then.
    now += 13_000;
    await expect
      .poll(() => query('select detector from alarms where pump_id = $1', pump.pumpId), { timeout: 15_000 })
      .toEqual([{ detector: 'stopped' }]);
    const runs = await query('select source from runs where pump_id = $1 order by from_at', pump.pumpId);
    expect(runs.length).toBe(2);
    device.socket.destroy();
    // Back to the first server, which still believes that it folds the pump.
    await send(pump, every10s(NOON, NOON + MINUTE, stopped));
    now += 13_000;
    await expect
      .poll(() => query('select high_water from pump_states where pump_id = $1', pump.pumpId), { timeout: 15_000 })
      .toEqual([{ high_water: new Date(NOON + MINUTE - 10_000) }]);
    expect((await query('select from alarms where pump_id = $1', pump.pumpId)).length).toBe(1);
    await second.stop();
    now = NOON;
  });
});
