import type { Transaction } from '#server/db/transaction.ts';
import type { Health } from '#shared/contract/http/health.ts';
import { findMailQueue } from './health-read-model.ts';

/** What health is asked of; the parts outside the database say it of themselves. */
export type HealthServices = {
  readonly version: string;
  readonly machineDb: Transaction;
  readonly isBrokerUp: () => boolean;
  /** Seconds the fold is behind what is stored; undefined where nothing waits. */
  readonly findFoldLagSeconds: () => number | undefined;
};

/** Mail that is due waits no longer than this while its server works. */
const MAIL_IS_LATE_SECONDS = 120;

/** Whether the watch runs, and which part does not. It answers while the database is down: that is when one asks. */
export async function readHealth(services: HealthServices, now: number): Promise<Health> {
  const { version, machineDb, isBrokerUp, findFoldLagSeconds } = services;
  const mail = await findMailQueue(machineDb).catch(() => undefined);
  const oldestMailSeconds = mail?.oldestSeconds ?? null;
  const parts: Health['parts'] = {
    database: mail === undefined ? 'down' : 'ok',
    broker: isBrokerUp() ? 'ok' : 'down',
    mail: mail === undefined ? 'unknown' : (oldestMailSeconds ?? 0) > MAIL_IS_LATE_SECONDS ? 'down' : 'ok',
    foldLagSeconds: findFoldLagSeconds() ?? null,
    oldestMailSeconds,
  };
  const isOk = parts.database === 'ok' && parts.broker === 'ok' && parts.mail === 'ok';
  return { status: isOk ? 'ok' : 'degraded', version, serverNow: now, parts };
}
