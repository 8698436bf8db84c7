import { createBacktestRunner } from './backtest/stored/backtest-runner.ts';
import { deriveRoleUrl } from './db/database-roles.ts';
import { createPools } from './db/pools.ts';
import { advisePrograms } from './jobs/advise-programs.ts';
import { announceAssignments } from './jobs/announce-assignments.ts';
import { cleanUpTables } from './jobs/clean-up-tables.ts';
import { endExplanations } from './jobs/end-explanations.ts';
import { escalateAlarms } from './jobs/escalate-alarms.ts';
import { keepPartitions } from './jobs/keep-partitions.ts';
import { createLeadership } from './jobs/leadership.ts';
import { pruneRollups } from './jobs/prune-rollups.ts';
import { rollUp } from './jobs/roll-up.ts';
import { createScheduler } from './jobs/scheduler.ts';
import { withdrawUntrue } from './jobs/withdraw-untrue.ts';
import { createDoorbell } from './live/doorbell.ts';
import { createSmtpTransport } from './mail/mail-transport.ts';
import { createOutboxSender } from './mail/outbox-sender.ts';
import { runProgram } from './run-program.ts';

/** The process for whatever must not hold up a reading: mail, and the housekeeping. */
await runProgram('worker', async ({ env, log, progress, atEnd }) => {
  const onError = (err: Error) => log.warn({ err }, 'a database connection broke');
  const { machine, end } = createPools(env.databaseUrl, { onError, sizes: { app: 1, machine: 5 } });
  atEnd(end);
  const machineUrl = deriveRoleUrl(env.databaseUrl, 'millrace_machine');

  const sender = createOutboxSender({
    pool: machine,
    send: createSmtpTransport({ smtpUrl: env.smtpUrl, from: env.mailFrom }),
    now: Date.now,
    log,
  });
  const doorbell = createDoorbell({ databaseUrl: machineUrl, log });
  doorbell.on('millrace_mail', sender.wake);
  await doorbell.start();
  atEnd(doorbell.stop);
  sender.start();
  atEnd(sender.stop);

  const scheduler = createScheduler({
    jobs: [
      withdrawUntrue,
      escalateAlarms,
      endExplanations,
      announceAssignments,
      keepPartitions,
      cleanUpTables,
      rollUp,
      advisePrograms,
      pruneRollups,
    ],
    context: { pool: machine, publicUrl: env.publicUrl, now: Date.now, log },
    leadership: createLeadership(machineUrl),
  });
  const backtests = createBacktestRunner({ pool: machine, now: Date.now, log });
  doorbell.on('millrace_backtest', backtests.wake);
  backtests.start();
  atEnd(backtests.stop);

  scheduler.start();
  atEnd(scheduler.stop);
  progress('Sending alarm mail');
});
