import type pg from 'pg';
import type { Logger } from 'pino';
import { gatherMail } from './gather-mail.ts';
import type { SendMail } from './mail-transport.ts';
import { type ClaimedMail, claimMails, markDelayed, markFailed, markSent } from './outbox-claim-repository.ts';
import { isRefusedForGood, retryDelayMs } from './retry-delay.ts';

export type OutboxSenderOptions = {
  /** The machine role's. */
  readonly pool: pg.Pool;
  readonly send: SendMail;
  readonly now: () => number;
  readonly log: Logger;
  /** How often the outbox is looked at without being rung for, ms. */
  readonly pollMs?: number;
};

/** Sends what lies in the outbox, each mail at least once and under its own Message-ID. */
export type OutboxSender = {
  readonly start: () => void;
  /** There may be mail. */
  readonly wake: () => void;
  /** Finishes what it is sending. */
  readonly stop: () => Promise<void>;
};

const POLL_MS = 1000;
const SENT_AT_ONCE = 4;

/** Nothing is sent before `start`. */
export function createOutboxSender(options: OutboxSenderOptions): OutboxSender {
  const { log } = options;
  let working: Promise<void> | undefined;
  let timer: NodeJS.Timeout | undefined;
  let stopped = false;

  const work = async (): Promise<void> => {
    try {
      while (!stopped && (await sendDue(options)));
    } catch (err) {
      log.warn({ err }, 'the outbox cannot be read');
    }
    working = undefined;
  };
  const wake = (): void => {
    if (!stopped) working ??= work();
  };
  return {
    wake,
    start: () => {
      timer = setInterval(wake, options.pollMs ?? POLL_MS);
      wake();
    },
    stop: async () => {
      stopped = true;
      clearInterval(timer);
      await working;
    },
  };
}

/** Sends what is due now; whether there may be more. */
async function sendDue(options: OutboxSenderOptions): Promise<boolean> {
  const mails = await claimMails(options.pool, options.now());
  const groups = [...groupMails(mails).values()];
  for (let from = 0; from < groups.length; from += SENT_AT_ONCE) {
    await Promise.all(groups.slice(from, from + SENT_AT_ONCE).map((group) => sendGroup(options, group)));
  }
  return groups.length > 0;
}

/** Mails to one address that leave at one instant, in the order in which they were written. */
function groupMails(mails: readonly ClaimedMail[]): Map<string, ClaimedMail[]> {
  const groups = new Map<string, ClaimedMail[]>();
  for (const mail of mails.toSorted((a, b) => (a.id < b.id ? -1 : 1))) {
    const key = `${mail.dueAt} ${mail.address}`;
    groups.set(key, [...(groups.get(key) ?? []), mail]);
  }
  return groups;
}

async function sendGroup({ pool, send, now, log }: OutboxSenderOptions, group: readonly ClaimedMail[]): Promise<void> {
  const [first] = group;
  if (first === undefined) return;
  const ids = group.map(({ id }) => id);
  const { address, messageId, attempts } = first;
  try {
    await send({ ...gatherMail(group), address, messageId });
  } catch (error) {
    const text = (error instanceof Error ? error.message : String(error)).slice(0, 500);
    const isOver = isRefusedForGood(error, attempts);
    log.warn({ err: error, messageId, attempts }, isOver ? 'a mail was given up' : 'a mail is delayed');
    if (isOver) await markFailed(pool, ids, text, now());
    else await markDelayed(pool, ids, text, now() + retryDelayMs(attempts));
    return;
  }
  await markSent(pool, ids, now());
  log.info({ messageId, attempts, parts: group.length }, 'a mail was sent');
}
