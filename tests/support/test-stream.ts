import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import pg from 'pg';
import pino from 'pino';
import { deriveRoleUrl } from '#server/db/database-roles.ts';
import { createPools, type Pools } from '#server/db/pools.ts';
import { createDoorbell } from '#server/live/doorbell.ts';
import { createStream, type Stream } from '#server/stream.ts';
import { topicOf } from '#tests/support/test-broker.ts';
import { TEST_DEVICE_KEY } from '#tests/support/test-company.ts';

export const TEST_PUBLIC_URL = 'https://watch.larkmoor.example';

export type TestStream = {
  readonly stream: Stream;
  readonly port: number;
  readonly pools: Pools;
  readonly stop: () => Promise<void>;
};

/**
 * The real stream on a database of a test's own: broker, ingest and fold, on a free port. A test that moves `now` by
 * hours while seconds pass gives the true clock as `wallClock`: otherwise the server takes it that it stood still.
 */
export async function startTestStream(
  databaseUrl: string,
  { now = Date.now, wallClock = now }: { readonly now?: () => number; readonly wallClock?: () => number } = {},
): Promise<TestStream> {
  const log = pino({ level: process.env.TEST_LOG ?? 'silent' });
  const pools = createPools(databaseUrl, { onError: () => undefined, sizes: { app: 2, machine: 4 } });
  const doorbell = createDoorbell({ databaseUrl: deriveRoleUrl(databaseUrl, 'millrace_machine'), log });
  const stream = createStream({
    env: {
      databaseUrl,
      publicUrl: TEST_PUBLIC_URL,
      deviceKey: TEST_DEVICE_KEY,
      mqtt: { host: '127.0.0.1', port: 0, tlsKeyFile: undefined, tlsCertificateFile: undefined },
    },
    machine: pools.machine,
    doorbell,
    log,
    now,
    wallClock,
  });
  const port = await stream.start();
  await doorbell.start();
  return {
    stream,
    port,
    pools,
    stop: async () => {
      await stream.stop();
      await doorbell.stop();
      await pools.end();
    },
  };
}

type Login = { readonly serial: string; readonly secret: string };

/** Publishes with Debian's own client at QoS 1; rejects when the broker refused it or took away the connection. */
export async function mosquittoPublish(
  port: number,
  { serial, secret }: Login,
  payload: string,
  { topic = topicOf(serial, 'readings'), more = [] as readonly string[] } = {},
): Promise<void> {
  const who = ['-i', serial, '-u', serial, '-P', secret];
  const what = ['-t', topic, '-m', payload, '-q', '1', '-k', '60'];
  await promisify(execFile)('mosquitto_pub', ['-h', '127.0.0.1', '-p', String(port), ...who, ...what, ...more], {
    timeout: 15_000,
  });
}

/** Rows of a query past row-level security. */
export async function querySuperuser<Row extends pg.QueryResultRow>(
  superuserUrl: string,
  text: string,
  values: readonly unknown[] = [],
): Promise<Row[]> {
  const client = new pg.Client({ connectionString: superuserUrl });
  await client.connect();
  try {
    return (await client.query<Row>(text, [...values])).rows;
  } finally {
    await client.end();
  }
}
