import { createContainer } from './container.ts';
import { createPools } from './db/pools.ts';
import { listenForPeople, stopListening } from './http/listen.ts';
import { prepareData } from './prepare-data.ts';
import { runProgram } from './run-program.ts';

/** The process that takes readings and serves people. */
await runProgram('node', async ({ env, log, progress, atEnd }) => {
  const onError = (err: Error) => log.warn({ err }, 'a database connection broke');
  const pools = await prepareData({
    env,
    openPools: () => createPools(env.databaseUrl, { onError }),
    onProgress: progress,
  });
  atEnd(pools.end);
  const watch = { isBrokerUp: () => true, findFoldLagSeconds: () => undefined };
  const { app } = createContainer({ env, pools, log, now: Date.now, watch });
  const server = await listenForPeople(app, env.http);
  atEnd(() => stopListening(server));
  progress(`Listening on ${env.http.host}:${env.http.port}`);
});
