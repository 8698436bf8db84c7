import { hashDeviceSecret } from './broker/device-credential.ts';
import { migrateDatabase } from './db/migrate.ts';
import type { Pools } from './db/pools.ts';
import { DEMO_PASSWORD, seedDemo } from './db/seed/seed-demo.ts';
import type { Environment } from './env.ts';
import { hashPassword, refuseDemoPeople } from './features/session/index.ts';

type Options = {
  readonly env: Pick<Environment, 'databaseUrl' | 'isDemo' | 'dataFolder' | 'deviceKey'>;
  readonly openPools: () => Pools;
  readonly onProgress: (text: string) => void;
};

/** Brings the schema up to date; then the demo gets its company, and work refuses a database that holds the demo's. */
export async function prepareData({ env, openPools, onProgress }: Options): Promise<Pools> {
  await migrateDatabase({ databaseUrl: env.databaseUrl, onProgress });
  const pools = openPools();
  try {
    if (!env.isDemo) await refuseDemoPeople(pools.machine);
    else if (await seedDemoCompany(env, pools)) onProgress('The demo company is made');
    return pools;
  } catch (error) {
    await pools.end();
    throw error;
  }
}

const seedDemoCompany = ({ dataFolder, deviceKey }: Options['env'], { machine }: Pools): Promise<boolean> =>
  seedDemo(machine, {
    dataFolder,
    hashPassword: () => hashPassword(DEMO_PASSWORD),
    hashSecret: (secret) => hashDeviceSecret(deviceKey, secret),
  });
