import { type Bench, type BenchTools, type Figure, median } from './bench.ts';
import { startChild } from './child-process.ts';
import { type Load, startLoad } from './load.ts';
import { fillDatabase, startWatch } from './watch.ts';

/** Enough that none of them comes near the rate a device may send at. */
const DEVICES = 1000;
const ROUNDS = 5;
const SLICE_SECONDS = 3;

/**
 * The real path against the bare one, in turns within one run: whatever else the machine does meets both alike. The
 * real one folds what it stores while it stores more; between turns it finishes, so that neither pays for the other.
 */
async function compare({ postgres, say }: BenchTools, readingsPerMessage: number): Promise<Figure[]> {
  const { createDatabase } = await postgres();
  const database = await createDatabase(`ingest_${readingsPerMessage}`);
  const bareDatabase = await createDatabase(`bare_${readingsPerMessage}`);
  const devices = await fillDatabase(database, DEVICES);
  const watch = await startWatch(database);
  const bare = startChild('bare-server.ts', [bareDatabase.databaseUrl]);
  const order = { devices, readingsPerMessage, window: 2 };
  const loads: Load[] = [];
  try {
    const barePort = await bare.next<number>('port');
    const real = await startLoad({ ...order, port: watch.port });
    loads.push(real);
    const yardstick = await startLoad({ ...order, port: barePort });
    loads.push(yardstick);
    const rates: { real: number; bare: number }[] = [];
    for (let round = 0; round <= ROUNDS; round += 1) {
      const bareRate = await measure(yardstick);
      const realRate = await measure(real);
      await watch.understood();
      // The first round warms both up.
      if (round > 0) rates.push({ real: realRate * readingsPerMessage, bare: bareRate * readingsPerMessage });
      say(`  round ${round}: bare ${Math.round(bareRate)}, real ${Math.round(realRate)} messages/s`);
    }
    return [
      {
        name: `ingest against bare, ${readingsPerMessage} a message`,
        value: median(rates.map((rate) => rate.real / rate.bare)),
        unit: '',
        atLeast: 0.7,
      },
      {
        name: `real path, ${readingsPerMessage} a message`,
        value: median(rates.map((rate) => rate.real)),
        unit: 'readings/s',
      },
      {
        name: `bare path, ${readingsPerMessage} a message`,
        value: median(rates.map((rate) => rate.bare)),
        unit: 'readings/s',
      },
    ];
  } finally {
    await Promise.all([...loads.map((load) => load.stop()), watch.stop(), bare.stop()]);
    await database.drop();
    await bareDatabase.drop();
  }
}

async function measure(load: Load): Promise<number> {
  const { messages, seconds } = await load.run({ seconds: SLICE_SECONDS });
  return messages / seconds;
}

export const ingestOne: Bench = {
  name: 'ingest-one',
  about: 'storing, understanding and acknowledging, one reading a message, against the bare path',
  run: (tools) => compare(tools, 1),
};

export const ingestForty: Bench = {
  name: 'ingest-forty',
  about: 'the same with forty readings a message',
  run: (tools) => compare(tools, 40),
};
