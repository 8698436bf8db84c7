import pino from 'pino';
import { deriveRoleUrl } from '#server/db/database-roles.ts';
import { createPools } from '#server/db/pools.ts';
import { createDoorbell } from '#server/live/doorbell.ts';
import { createStream } from '#server/stream.ts';
import { BENCH_DEVICE_KEY } from './bench-company.ts';

/** The real path in a process of its own: `process.argv[2]` is the database. Says its port, and counts when asked. */
const databaseUrl = process.argv[2] ?? '';
const log = pino({ level: 'warn' }, pino.destination(2));
const pools = createPools(databaseUrl, { onError: () => undefined });
const doorbell = createDoorbell({ databaseUrl: deriveRoleUrl(databaseUrl, 'millrace_machine'), log });
let lags: number[] = [];
const stream = createStream({
  env: {
    databaseUrl,
    publicUrl: 'https://bench.example',
    deviceKey: BENCH_DEVICE_KEY,
    mqtt: { host: '127.0.0.1', port: 0, tlsKeyFile: undefined, tlsCertificateFile: undefined },
  },
  machine: pools.machine,
  doorbell,
  log,
  now: Date.now,
  onFolded: (lagsMs) => {
    for (const lag of lagsMs) lags.push(lag);
  },
});
process.on('message', (question: 'counts' | 'lags') => {
  if (question === 'counts') {
    process.send?.({ counts: { ...stream.count(), rss: process.memoryUsage().rss } });
    return;
  }
  process.send?.({ lags });
  lags = [];
});
process.on('disconnect', () => process.exit(0));
const port = await stream.start();
await doorbell.start();
process.send?.({ port });
