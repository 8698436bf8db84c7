import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { hashPassword } from '#server/features/session/index.ts';
import { findFreePort } from '#tests/support/free-port.ts';
import { createRealProgram } from '#tests/support/real-program.ts';
import { type Bench, quantile } from './bench.ts';
import { BENCH_DEVICE_KEY } from './bench-company.ts';
import type { BenchDatabase } from './bench-database.ts';
import { openLiveWatcher } from './live-watcher.ts';
import { startLoad } from './load.ts';
import { connectDevice, type DeviceLogin, publish } from './load-device.ts';
import { writeReadings } from './load-readings.ts';
import { fillDatabase } from './watch.ts';

const READINGS_PER_SECOND = 1000;
const WARM_UP_SECONDS = 5;
const SECONDS = 25;
const PROBE_EVERY_MS = 97;
const ON_SCREEN = 100;
const PUBLIC_URL = 'https://bench.example';
const MANAGER = { email: 'manager@bench.example', password: 'a password of the bench' };

/** From the device's publish to the frame at an open screen, through the product's own server. */
export const socketLatency: Bench = {
  name: 'socket-latency',
  about: `from publish to the frame at an open screen at ${READINGS_PER_SECOND} readings a second`,
  run: async ({ postgres }) => {
    const database = await (await postgres()).createDatabase('socket_latency');
    const devices = await fillDatabase(database, READINGS_PER_SECOND + 1);
    const { probe, onScreen, pumpId } = await prepareScreen(database, devices);
    const ports = { http: await findFreePort(), mqtt: await findFreePort() };
    const server = createRealProgram('server/main.ts', {
      NODE_ENV: 'production',
      DATABASE_URL: database.databaseUrl,
      SMTP_URL: 'smtp://127.0.0.1:1',
      PUBLIC_URL,
      TOKEN_KEY: 'token-key-of-the-bench-0123456789abcdef',
      DEVICE_KEY: BENCH_DEVICE_KEY,
      PORT: String(ports.http),
      MQTT_PORT: String(ports.mqtt),
      LOG_LEVEL: 'error',
    });
    await server.start();
    const others = devices.filter(({ serial }) => serial !== probe.serial);
    const load = await startLoad({ port: ports.mqtt, devices: others, readingsPerMessage: 1, window: 1 });
    const watcher = await openLiveWatcher({ httpPort: ports.http, publicUrl: PUBLIC_URL }, MANAGER);
    try {
      await load.run({ seconds: WARM_UP_SECONDS, messagesPerSecond: READINGS_PER_SECOND });
      const lateness: number[] = [];
      const sentAt = new Map<number, number>();
      watcher.watch(onScreen, (id, at) => {
        if (id !== pumpId) return;
        // One frame shows the newest reading: those before it have been overtaken and are on the screen as well.
        for (const [sent, when] of sentAt) {
          if (sent > at) continue;
          lateness.push(performance.now() - when);
          sentAt.delete(sent);
        }
      });
      const device = await connectDevice(ports.mqtt, probe, () => undefined);
      const timer = setInterval(() => {
        const now = Date.now();
        sentAt.set(now, performance.now());
        publish(device, writeReadings(now, 1, 1));
      }, PROBE_EVERY_MS);
      const report = await load.run({ seconds: SECONDS, messagesPerSecond: READINGS_PER_SECOND });
      clearInterval(timer);
      await new Promise((resolve) => setTimeout(resolve, 1500));
      return [
        { name: 'publish to screen p95 at 1,000 readings/s', value: quantile(lateness, 0.95), unit: 'ms', atMost: 800 },
        { name: 'publish to screen p50', value: quantile(lateness, 0.5), unit: 'ms' },
        {
          name: 'readings that reached the screen',
          value: lateness.length / (lateness.length + sentAt.size),
          unit: '',
          atLeast: 0.99,
        },
        { name: 'readings a second meanwhile', value: report.messages / report.seconds, unit: '' },
      ];
    } finally {
      watcher.close();
      await load.stop();
      await server.killHard();
      await database.drop();
    }
  },
};

/** A manager who can sign in, and the pumps on the screen, the probed one among them. */
async function prepareScreen({ superuserUrl }: BenchDatabase, devices: readonly DeviceLogin[]) {
  const client = new pg.Client({ connectionString: superuserUrl });
  await client.connect();
  try {
    await client.query(
      `insert into users (id, company_id, email, name, role, password_hash)
       select $1, id, $2, 'Manager', 'manager', $3 from companies`,
      [randomUUID(), MANAGER.email, await hashPassword(MANAGER.password)],
    );
    const { rows } = await client.query<{ id: string; serial: string }>(
      `select f.pump_id as id, d.serial from device_fittings f join devices d on d.id = f.device_id order by d.serial limit $1`,
      [ON_SCREEN],
    );
    const probe = devices.find(({ serial }) => serial === rows[0]?.serial);
    if (probe === undefined) throw new Error('no pump to watch');
    return { probe, pumpId: rows[0]?.id ?? '', onScreen: rows.map(({ id }) => id) };
  } finally {
    await client.end();
  }
}
