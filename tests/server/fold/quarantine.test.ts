import { afterAll, beforeAll, expect, it, vi } from 'vitest';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import { detectorFailure } from '#shared/domain/detectors/detector-failure.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { openRawDevice, topicOf } from '#tests/support/test-broker.ts';
import { makeTestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';
import { querySuperuser, startTestStream, type TestStream } from '#tests/support/test-stream.ts';

const failing = vi.hoisted(() => ({ pumpId: '' }));

// No rule throws by itself: one is made to, for one pump.
vi.mock('#shared/domain/fold/fold-pump.ts', async (original) => {
  const real = await original<typeof import('#shared/domain/fold/fold-pump.ts')>();
  return {
    ...real,
    createPumpFold: (...parameters: Parameters<typeof real.createPumpFold>) => {
      const fold = real.createPumpFold(...parameters);
      return {
        ...fold,
        push: (event: Parameters<typeof fold.push>[0]) => {
          if (parameters[0].pumpId === failing.pumpId && event.kind === 'reading' && event.reading.rpm === 666) {
            throw detectorFailure('stopped', new TypeError('x is not a function'));
          }
          fold.push(event);
        },
      };
    },
  };
});

let database: Awaited<ReturnType<typeof createFreshDatabase>>;
let running: TestStream;
beforeAll(async () => {
  database = await createFreshDatabase();
  running = await startTestStream(database.databaseUrl);
});
afterAll(async () => {
  await running.stop();
  await database.drop();
});

it('a detector that throws sets its pump aside by name, and stops no acknowledgement and no other pump', async () => {
  const company = await makeTestCompany(running.pools.machine);
  const [bad, good] = company.pumps;
  failing.pumpId = bad!.pumpId;
  const begin = Date.now() - 60_000;
  const reading = (at: number, rpm: number): Reading => ({ at, rpm, closedInputs: 0, activeInput: 0, watts: 400 });
  const devices = await Promise.all(
    [bad!, good!].map((pump) => openRawDevice(running.port, pump.serial, { password: Buffer.from(pump.secret) })),
  );
  for (let index = 0; index < 20; index += 1) {
    for (const [place, pump] of [bad!, good!].entries()) {
      const payload = encodeReadings([reading(begin + index * 1000, index === 3 ? 666 : 1700)]);
      const message = { topic: topicOf(pump.serial, 'readings'), payload, qos: 1 as const, messageId: index + 1 };
      devices[place]!.send({ cmd: 'publish', ...message, dup: false, retain: false });
      expect(await devices[place]!.next('puback')).toMatchObject({ messageId: index + 1 });
    }
  }
  await running.stream.drain();
  const states = await querySuperuser(
    database.superuserUrl,
    `select s.quarantine_reason, s.quarantined_at is not null as is_aside, (s.now ->> 'at')::float8 as at,
       (select count(*)::int from readings r where r.pump_number = s.pump_number) as stored
     from pump_states s where s.pump_id = any($1::uuid[]) order by s.pump_id = $2 desc`,
    [[bad!.pumpId, good!.pumpId], bad!.pumpId],
  );
  expect(states[0]).toMatchObject({
    is_aside: true,
    quarantine_reason: 'detector stopped failed: x is not a function',
    stored: 20,
  });
  expect(states[1]).toMatchObject({ is_aside: false, at: begin + 19_000, stored: 20 });
  expect(running.stream.count().fold.setAside).toBe(1);
  for (const device of devices) device.socket.destroy();
});

it('a pump that was set aside is taken up again by the next start, from where it was', async () => {
  failing.pumpId = '';
  await running.stop();
  running = await startTestStream(database.databaseUrl);
  await running.stream.drain();
  const states = await querySuperuser(
    database.superuserUrl,
    `select quarantined_at, (now ->> 'rpm')::float8 as rpm from pump_states where now is not null`,
  );
  expect(states).toEqual([
    { quarantined_at: null, rpm: 1700 },
    { quarantined_at: null, rpm: 1700 },
  ]);
});
