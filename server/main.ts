import { createContainer } from './container.ts';
import { deriveRoleUrl } from './db/database-roles.ts';
import { createPools } from './db/pools.ts';
import { listenForPeople, stopListening } from './http/listen.ts';
import { createDoorbell } from './live/doorbell.ts';
import { startLiveServer } from './live/live-server.ts';
import { createLiveSight } from './live-sight.ts';
import { prepareData } from './prepare-data.ts';
import { runProgram } from './run-program.ts';
import { createStream } from './stream.ts';

/** The process that takes readings and serves people. */
await runProgram('node', async ({ env, log, progress, atEnd }) => {
  const now = Date.now;
  const onError = (err: Error) => log.warn({ err }, 'a database connection broke');
  const pools = await prepareData({
    env,
    openPools: () => createPools(env.databaseUrl, { onError }),
    onProgress: progress,
  });
  atEnd(pools.end);
  const doorbell = createDoorbell({ databaseUrl: deriveRoleUrl(env.databaseUrl, 'millrace_machine'), log });
  atEnd(doorbell.stop);

  const stream = createStream({ env, machine: pools.machine, doorbell, log, now });
  const watch = { isBrokerUp: stream.isUp, findFoldLagSeconds: () => stream.count().fold.lagMs / 1000 };
  const { app, authenticate, endedSessions } = createContainer({ env, pools, log, now, watch });
  const server = await listenForPeople(app, env.http);
  atEnd(() => stopListening(server));
  const live = startLiveServer(server, {
    log,
    now,
    publicUrl: env.publicUrl,
    authenticate,
    onSessionEnded: endedSessions.onEnded,
    ...createLiveSight(pools.app, now),
  });
  atEnd(live.stop);
  doorbell.on('millrace_live', live.ring);
  progress(`Listening on ${env.http.host}:${env.http.port}`);

  await stream.start(progress);
  atEnd(stream.stop);
  await doorbell.start();
});
