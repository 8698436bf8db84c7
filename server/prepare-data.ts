import { hashDeviceSecret } from './broker/device-credential.ts';
import { migrateDatabase } from './db/migrate.ts';
import type { Pools } from './db/pools.ts';
import { DEMO_PASSWORD, seedDemo } from './db/seed/seed-demo.ts';
import { tellDemoHistory } from './demo-history.ts';
import type { Environment } from './env.ts';
import { hashPassword, refuseDemoPeople } from './features/session/index.ts';

type Options = {
  readonly env: Pick<Environment, 'databaseUrl' | 'isDemo' | 'dataFolder' | 'deviceKey' | 'historyDays'>;
  readonly openPools: () => Pools;
  readonly onProgress: (text: string) => void;
};

/** Brings the schema up to date; then the demo gets its company, and work refuses a database that holds the demo's. */
export async function prepareData({ env, openPools, onProgress }: Options): Promise<Pools> {
  await migrateDatabase({ databaseUrl: env.databaseUrl, onProgress });
  const pools = openPools();
  try {
    if (!env.isDemo) await refuseDemoPeople(pools.machine);
    else await prepareDemo(env, pools, onProgress);
    return pools;
  } catch (error) {
    await pools.end();
    throw error;
  }
}

async function prepareDemo(env: Options['env'], pools: Pools, onProgress: Options['onProgress']): Promise<void> {
  if (await seedDemoCompany(env, pools)) onProgress('The demo company is made');
  const { dataFolder, historyDays } = env;
  await tellDemoHistory({ machine: pools.machine, dataFolder, days: historyDays, now: Date.now(), onProgress });
}

const seedDemoCompany = ({ dataFolder, deviceKey }: Options['env'], { machine }: Pools): Promise<boolean> =>
  seedDemo(machine, {
    dataFolder,
    hashPassword: () => hashPassword(DEMO_PASSWORD),
    hashSecret: (secret) => hashDeviceSecret(deviceKey, secret),
  });
