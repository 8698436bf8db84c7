import { createServer } from 'node:net';
import { Aedes } from 'aedes';
import pg from 'pg';

/*
 * The yardstick: aedes and PostgreSQL with nothing between them but what durable storing needs. Each message is parsed
 * and waits, its PUBACK held, for the commit of a group; two writers, 10 ms window. No credentials, no checks, no fold.
 */
type Row = {
  readonly pump: number;
  readonly t: number;
  readonly rpm: number;
  readonly in: number;
  readonly act: number;
  readonly w: number;
};
type Waiting = { readonly rows: readonly Row[]; readonly done: () => void };

const WRITERS = 2;
const WINDOW_MS = 10;
const databaseUrl = process.argv[2] ?? '';
const pool = new pg.Pool({ connectionString: databaseUrl, max: WRITERS });
await pool.query(`create table bare_readings (pump int not null, at timestamptz not null, rpm real not null,
  inputs smallint not null, active smallint not null, watts real not null, primary key (pump, at))`);

const lanes: Waiting[][] = Array.from({ length: WRITERS }, () => []);
const pumps = new Map<string, number>();

async function flush(lane: number): Promise<void> {
  const batch = lanes[lane] ?? [];
  lanes[lane] = [];
  if (batch.length > 0) {
    const rows = batch.flatMap((waiting) => waiting.rows);
    await pool.query({
      name: 'store',
      text: `insert into bare_readings select pump, to_timestamp(at / 1000), rpm, inputs, active, watts from unnest(
        $1::int[], $2::float8[], $3::real[], $4::int2[], $5::int2[], $6::real[]) as r(pump, at, rpm, inputs, active, watts)
        on conflict do nothing`,
      values: [
        rows.map((row) => row.pump),
        rows.map((row) => row.t),
        rows.map((row) => row.rpm),
        rows.map((row) => row.in),
        rows.map((row) => row.act),
        rows.map((row) => row.w),
      ],
    });
    for (const { done } of batch) done();
  }
  setTimeout(() => void flush(lane), WINDOW_MS);
}

const broker = await Aedes.createBroker({
  authorizePublish: (client, packet, callback) => {
    const serial = client?.id ?? '';
    const pump = pumps.get(serial) ?? pumps.size + 1;
    pumps.set(serial, pump);
    const parsed = JSON.parse(packet.payload.toString());
    const readings: Omit<Row, 'pump'>[] = Array.isArray(parsed) ? parsed : [parsed];
    lanes[pump % WRITERS]?.push({
      rows: readings.map((reading) => ({ ...reading, pump })),
      done: () => callback(null),
    });
  },
});
for (let lane = 0; lane < WRITERS; lane += 1) void flush(lane);
const server = createServer(broker.handle);
server.listen(0, '127.0.0.1', () => {
  const address = server.address();
  process.send?.({ port: typeof address === 'object' && address ? address.port : 0 });
});
process.on('disconnect', () => process.exit(0));
