import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { asMachine, asPerson, type Sight } from '#server/db/transaction.ts';
import { makePartitionsBetween } from '#server/fold/history/history-repository.ts';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import { encodeStatus } from '#shared/contract/mqtt/status.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { queryOf, waitUntilFolded } from '#tests/support/folded-stream.ts';
import { openRawDevice, type RawDevice, topicOf } from '#tests/support/test-broker.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';
import { startTestStream, type TestStream } from '#tests/support/test-stream.ts';

/*
 * The server's clock is the tests' own: it stands around the first of November 2026, when clocks in Los Angeles go back
 * an hour. Every other pad is in the area North and in that zone, the others are in South.
 */
const ZONE = 'America/Los_Angeles';
const dayOf = (month: number, day: number) => Date.UTC(2026, month - 1, day) / 86_400_000;
const at = (day: number, minute: number) => instantOf(ZONE, day, minute) ?? 0;
const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const OCTOBER_20 = at(dayOf(10, 20), 0);

let database: Awaited<ReturnType<typeof createFreshDatabase>>;
let running: TestStream;
let now = OCTOBER_20;
/** Where the tests go from hour to hour the server is to believe that it stood still: then no pump was silent. */
let isLeaping = false;
const wallClock = () => (isLeaping ? now : Date.now());

type Pump = TestCompany['pumps'][number];
const connections = new Map<string, RawDevice>();
let packet = 0;

beforeAll(async () => {
  database = await createFreshDatabase();
  running = await startTestStream(database.databaseUrl, { now: () => now, wallClock });
  await asMachine(running.pools.machine, (_db, client) =>
    makePartitionsBetween(client, OCTOBER_20 - 24 * HOUR, OCTOBER_20 + 30 * 24 * HOUR),
  );
});
afterAll(async () => {
  await running.stop();
  await database.drop();
});

const query = queryOf(() => database);
const folded = () => waitUntilFolded(running);
const pass = async (until: number) => {
  now = until;
  running.stream.tick();
  await folded();
};

async function connect(pump: Pump): Promise<RawDevice> {
  const known = connections.get(pump.serial);
  if (known !== undefined) return known;
  const payload = encodeStatus({ state: 'lost', connection: randomUUID() });
  const will = { topic: topicOf(pump.serial, 'status'), payload, qos: 1, retain: false };
  const device = await openRawDevice(running.port, pump.serial, { password: Buffer.from(pump.secret), will });
  await device.next('connack');
  connections.set(pump.serial, device);
  return device;
}

/** The connections of these pumps' devices break; resolves when the server knows it. */
async function drop(pumps: readonly Pump[]): Promise<void> {
  for (const { serial } of pumps) {
    connections.get(serial)?.socket.destroy();
    connections.delete(serial);
  }
  const count = async () => {
    await running.stream.drain();
    const pumpIds = pumps.map(({ pumpId }) => pumpId);
    return (await query('select 1 from pump_states where lost_at is not null and pump_id = any($1)', pumpIds)).length;
  };
  await expect.poll(count).toBe(pumps.length);
}

async function send(pump: Pump, readings: readonly Reading[]): Promise<void> {
  const device = await connect(pump);
  packet = (packet % 60_000) + 1;
  const what = { topic: topicOf(pump.serial, 'readings'), payload: encodeReadings(readings), messageId: packet };
  device.send({ cmd: 'publish', ...what, qos: 1, dup: false, retain: false });
  await device.next('puback');
}

/** At night nothing is due but the freeze guard. */
const resting = (time: number, ambientCelsius = 20): Reading => {
  const idle = { at: time, closedInputs: 0, activeInput: 0, ambientCelsius } as const;
  return ambientCelsius < 4
    ? { ...idle, rpm: 1000, watts: 180, reportedSource: 'freeze' }
    : { ...idle, rpm: 0, watts: 6, reportedSource: 'off' };
};
const sayAll = async (pumps: readonly Pump[], ambientCelsius?: number) => {
  await Promise.all(pumps.map((pump) => send(pump, [resting(now, ambientCelsius)])));
  await folded();
};

/** Time passes, and these pumps go on speaking: every step is shorter than what counts as silence. */
const goOn = async (pumps: readonly Pump[], until: number, ambientCelsius?: number) => {
  while (now < until) {
    now = Math.min(until, now + 90_000);
    await sayAll(pumps, ambientCelsius);
  }
  await pass(now);
};

/** Pumps of a new company: of the area North, and of South. */
async function makeFleet(pads: number) {
  const company = await makeTestCompany(running.pools.machine, { pads });
  await running.pools.machine.query('update pads set zone = $2 where company_id = $1', [company.companyId, ZONE]);
  const { rows } = await running.pools.machine.query<{ id: string; area: string }>(
    `select p.id, pad.area from pumps p join pads pad on pad.id = p.pad_id where p.company_id = $1 and p.name = 'Filter pump'`,
    [company.companyId],
  );
  const areas = new Map(rows.map(({ id, area }) => [id, area]));
  const of = (area: string) => company.pumps.filter(({ pumpId }) => areas.get(pumpId) === area);
  const { rows: booster } = await running.pools.machine.query(
    `update pumps set monitored = false where company_id = $1 and name = 'Booster' returning id`,
    [company.companyId],
  );
  expect(booster.length).toBe(1);
  return { company, north: of('North'), south: of('South') };
}

const alarmsOf = (companyId: string) =>
  query<{ id: string; pump_id: string | null; group_kind: string | null; state: string; covered_by: string | null }>(
    `select id, pump_id, group_kind, group_area, detector, cause, priority, state, suppressed, covered_by, evidence from alarms
     where company_id = $1 order by raised_at, id`,
    companyId,
  );
const mailsOf = (companyId: string) =>
  query<{ to_address: string; subject: string; text: string }>(
    'select to_address, subject, text from outbox_mails where company_id = $1',
    companyId,
  );
/** Alarms that speak for several pumps, and members of such, as a person sees them. */
const seenBy = (sight: Sight) =>
  asPerson(running.pools.app, sight, 'read', async (_db, client) => {
    const groups = await client.query('select id from alarms where pump_id is null');
    const members = await client.query('select pump_id from alarm_members');
    return [groups.rowCount, members.rowCount];
  });
const standingMembers = (alarmId: string) =>
  query<{ pump_id: string }>('select pump_id from alarm_members where alarm_id = $1 and left_at is null', alarmId);

async function restart(): Promise<void> {
  for (const device of connections.values()) device.socket.destroy();
  connections.clear();
  await running.stop();
  running = await startTestStream(database.databaseUrl, { now: () => now, wallClock });
  await folded();
}

describe('a power cut in one area', () => {
  it('is one alarm and one mail, whose members’ own alarms call nobody, and is over when they are back', async () => {
    now = at(dayOf(10, 21), 60);
    const { company, north, south } = await makeFleet(40);
    const dark = north.slice(0, 4);
    await sayAll([...north, ...south], -3);
    const cut = now;
    const lit = [...north.slice(4), ...south];
    await goOn(lit, cut + 61 * MINUTE, -3);

    const alarms = await alarmsOf(company.companyId);
    const [group, ...more] = alarms.filter(({ pump_id }) => pump_id === null);
    expect(more).toEqual([]);
    expect(group).toMatchObject({
      group_kind: 'area-silence',
      group_area: 'North',
      detector: 'silent',
      cause: 'power',
      priority: 'urgent',
      state: 'unacknowledged',
      evidence: { pumps: 4, pads: 4, stillStanding: 4, area: 'North' },
    });
    const silent = alarms.filter(({ pump_id }) => pump_id !== null);
    expect(silent.map(({ pump_id }) => pump_id).sort()).toEqual(dark.map(({ pumpId }) => pumpId).sort());
    for (const alarm of silent)
      expect(alarm).toMatchObject({ detector: 'silent', cause: 'power', suppressed: true, covered_by: group!.id });
    expect((await standingMembers(group!.id)).length).toBe(4);
    expect(await seenBy(company.technician.sight)).toEqual([1, 4]);
    // The owner of the first pad reads of their own pump alone, and why it is silent.
    expect(await seenBy(company.homeowner.sight)).toEqual([0, 0]);
    const mails = (await mailsOf(company.companyId)).filter(({ text }) => text.includes('quiet together'));
    expect(mails.map(({ to_address }) => to_address)).toEqual([company.technician.email]);
    expect(mails[0]!.subject).toBe('Urgent: 4 pads in North went quiet together · North, 4 pumps on 4 pads');
    expect(await mailsOf(company.companyId)).toHaveLength(1);
    // No worker runs here: a mail that had not left would be taken back when all is over.
    await query('update outbox_mails set sent_at = now(), attempts = 1 where company_id = $1', company.companyId);

    await restart();
    await sayAll(lit, -3);
    await sayAll(dark.slice(0, 3), -3);
    expect((await standingMembers(group!.id)).length).toBe(1);
    expect((await alarmsOf(company.companyId)).find(({ id }) => id === group!.id)).toMatchObject({
      state: 'unacknowledged',
      evidence: { stillStanding: 1 },
    });
    await sayAll(dark.slice(3), -3);
    await goOn([...lit, ...dark], now + 14 * MINUTE, -3);
    const after = await alarmsOf(company.companyId);
    expect(after.find(({ id }) => id === group!.id)).toMatchObject({ state: 'returned' });
    const members = after.filter(({ covered_by }) => covered_by === group!.id);
    expect(members.map(({ state }) => state)).toEqual(['normal', 'normal', 'normal', 'normal']);
    expect(await mailsOf(company.companyId)).toHaveLength(1);
  });

  it('and one pad that is silent by itself keeps its own alarm', async () => {
    now = at(dayOf(10, 22), 60);
    const { company, north, south } = await makeFleet(12);
    await sayAll([...north, ...south]);
    await goOn([...north.slice(1), ...south], now + 65 * MINUTE);
    expect(await alarmsOf(company.companyId)).toMatchObject([
      { pump_id: north[0]!.pumpId, detector: 'silent', suppressed: false, covered_by: null },
    ]);
  });
});

describe('our own link', () => {
  it('that loses devices of every area at once is one alarm, mailed to the manager; what stays away speaks for itself', async () => {
    now = at(dayOf(10, 23), 60);
    const { company, north, south } = await makeFleet(20);
    const lost = [...north.slice(0, 4), ...south.slice(0, 4)];
    const kept = [...north.slice(4), ...south.slice(4)];
    await sayAll([...north, ...south]);
    await goOn([...north, ...south], now + 3 * MINUTE);
    const from = now;
    await drop(lost);
    await goOn(kept, from + 3 * MINUTE);
    const [group, ...more] = await alarmsOf(company.companyId);
    expect(more).toEqual([]);
    expect(group).toMatchObject({ group_kind: 'own-link', cause: 'own-link', priority: 'urgent', pump_id: null });
    expect(group).toMatchObject({ evidence: { pumps: 8, pads: 8 } });
    const mails = await mailsOf(company.companyId);
    expect(mails.map(({ to_address }) => to_address)).toEqual([company.manager.email]);
    expect(mails[0]!.subject).toContain('8 devices dropped at once: our own link');

    await goOn(kept, from + 65 * MINUTE);
    const held = (await alarmsOf(company.companyId)).filter(({ pump_id }) => pump_id !== null);
    expect(held).toHaveLength(8);
    for (const alarm of held) expect(alarm).toMatchObject({ suppressed: true, covered_by: group!.id });
    expect(await mailsOf(company.companyId)).toHaveLength(1);

    // All but one are back: our link is well, and the one has to be looked at.
    await sayAll(lost.slice(1));
    await pass(now + 1000);
    const after = await alarmsOf(company.companyId);
    expect(after.find(({ id }) => id === group!.id)).toMatchObject({ state: 'returned' });
    expect(after.find(({ pump_id }) => pump_id === lost[0]!.pumpId)).toMatchObject({
      state: 'unacknowledged',
      suppressed: false,
      covered_by: null,
    });
  });
});

/** A minute of a pump whose input 1 is closed from 09:00 to 10:40 by a clock that is `fastMinutes` ahead. */
function minuteOf(time: number, startOfDay: number, fastMinutes: number): Reading {
  const minute = Math.round((time - startOfDay) / MINUTE);
  const dial = minute + fastMinutes;
  if (dial >= 540 && dial < 640) {
    return { ...{ at: time, rpm: 2850, closedInputs: 1, activeInput: 1, watts: 1400, reportedSource: 'input' } };
  }
  const runs = minute >= 480 && minute < 1080;
  return runs
    ? { ...{ at: time, rpm: 1700, closedInputs: 0, activeInput: 0, watts: 420, reportedSource: 'program' } }
    : { ...{ at: time, rpm: 0, closedInputs: 0, activeInput: 0, watts: 6, reportedSource: 'off' } };
}

describe('the day on which the hour changes', () => {
  it('makes one list of all clocks that nobody set, without a mail, and the next server goes on with it', async () => {
    now = at(dayOf(10, 25), 0);
    isLeaping = true;
    const { company, north } = await makeFleet(8);
    const playDay = async (day: number, fastMinutes: number) => {
      const [start, end] = [at(day, 0), at(day + 1, 0)];
      // From six in the morning on: the change itself is at night.
      const morning = start + (end - start) - 24 * HOUR;
      for (let from = start; from < end; from += 6 * HOUR) {
        const until = Math.min(end, from + 6 * HOUR);
        now = until;
        for (const pump of north) {
          const times = Array.from({ length: (until - from) / MINUTE }, (_, index) => from + index * MINUTE);
          await send(
            pump,
            times.map((time) => minuteOf(time, morning, fastMinutes)),
          );
        }
        await folded();
      }
    };
    for (let day = dayOf(10, 25); day < dayOf(11, 1); day += 1) await playDay(day, 0);
    expect(await alarmsOf(company.companyId)).toEqual([]);
    for (let day = dayOf(11, 1); day < dayOf(11, 3); day += 1) await playDay(day, 60);
    await restart();
    for (let day = dayOf(11, 3); day < dayOf(11, 6); day += 1) await playDay(day, 60);

    const alarms = await alarmsOf(company.companyId);
    const groups = alarms.filter(({ pump_id }) => pump_id === null);
    expect(groups).toMatchObject([
      { group_kind: 'daylight-saving', cause: 'daylight-saving', evidence: { pumps: north.length } },
    ]);
    const own = alarms.filter(({ pump_id }) => pump_id !== null);
    expect(own.map(({ pump_id }) => pump_id).sort()).toEqual(north.map(({ pumpId }) => pumpId).sort());
    for (const alarm of own) expect(alarm).toMatchObject({ detector: 'clock-shift', covered_by: groups[0]!.id });
    expect(await mailsOf(company.companyId)).toEqual([]);
  });
});

describe('the morning after a windy night', () => {
  it('makes one list and one mail of the baskets of an area, which the next server goes on with', async () => {
    now = at(dayOf(11, 10), 0);
    isLeaping = true;
    const { company, north } = await makeFleet(12);
    // A quarter less: a basket that is plugged with leaves, and water still moves.
    const isFallen = (index: number, day: number) => day === dayOf(11, 14) && index < 5;
    const playDay = async (day: number, fromMinute = 0, toMinute = 1440) => {
      now = at(day, toMinute);
      for (const [index, pump] of north.entries()) {
        const times = Array.from({ length: toMinute - fromMinute }, (_, minute) => at(day, fromMinute + minute));
        await send(
          pump,
          times.map((time) => {
            const reading = minuteOf(time, at(day, 0), 0);
            return isFallen(index, day) && reading.rpm > 0 ? { ...reading, watts: reading.watts * 0.75 } : reading;
          }),
        );
      }
      await folded();
    };
    for (let day = dayOf(11, 10); day < dayOf(11, 14); day += 1)
      for (const quarter of [0, 1, 2, 3]) await playDay(day, quarter * 360, (quarter + 1) * 360);
    expect(await alarmsOf(company.companyId)).toEqual([]);
    await playDay(dayOf(11, 14), 0, 480);
    await restart();
    await playDay(dayOf(11, 14), 480, 840);

    const alarms = await alarmsOf(company.companyId);
    const [group, ...others] = alarms.filter(({ pump_id }) => pump_id === null);
    expect(others).toEqual([]);
    expect(group).toMatchObject({
      group_kind: 'load-fall',
      group_area: 'North',
      evidence: { pads: 5, stillStanding: 5 },
    });
    const own = alarms.filter(({ pump_id }) => pump_id !== null);
    expect(own.map(({ pump_id }) => pump_id).sort()).toEqual(
      north
        .slice(0, 5)
        .map(({ pumpId }) => pumpId)
        .sort(),
    );
    for (const alarm of own)
      expect(alarm).toMatchObject({ detector: 'low-load', suppressed: true, covered_by: group!.id });
    expect((await mailsOf(company.companyId)).map(({ subject }) => subject)).toEqual([
      expect.stringContaining('Load fell at once on 5 pads in North'),
    ]);
  }, 60_000);
});
