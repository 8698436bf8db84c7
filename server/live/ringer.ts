import type pg from 'pg';
import type { Logger } from 'pino';
import { ring, ringForPumps } from './ring.ts';

type News = { readonly pumpIds: readonly string[]; readonly mails: number };

/** Gathers what changed within a blink, so that a hundred small commits ring a few times. */
export type Ringer = { readonly ring: (news: News) => void };

const GATHER_MS = 40;

/** A ring that fails is not repeated: whoever listens looks at everything after a break. */
export function createRinger(pool: pg.Pool, log: Logger): Ringer {
  let pumpIds = new Set<string>();
  let mails = 0;
  let isGathering = false;

  const send = async (): Promise<void> => {
    const ids = [...pumpIds];
    const hasMail = mails > 0;
    pumpIds = new Set();
    mails = 0;
    isGathering = false;
    await ringForPumps(pool, 'millrace_live', ids);
    if (hasMail) await ring(pool, 'millrace_mail');
  };
  return {
    ring: (news) => {
      for (const id of news.pumpIds) pumpIds.add(id);
      mails += news.mails;
      if (isGathering) return;
      isGathering = true;
      setTimeout(() => {
        send().catch((err: unknown) => log.debug({ err }, 'could not ring'));
      }, GATHER_MS);
    },
  };
}
