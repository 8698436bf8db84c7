import type { Logger } from 'pino';

/** Says why devices are refused, one line a reason in a while, with how many were refused since the last one. */
export type RefusalLog = (reason: string, details: Readonly<Record<string, unknown>>) => void;

const INTERVAL_MS = 10_000;

/** Bounded by design: a device that knocks a thousand times a second writes one line in ten seconds. */
export function createRefusalLog(log: Logger, now: () => number): RefusalLog {
  const said = new Map<string, { at: number; since: number }>();
  return (reason, details) => {
    const last = said.get(reason) ?? { at: Number.NEGATIVE_INFINITY, since: 0 };
    last.since += 1;
    said.set(reason, last);
    if (now() - last.at < INTERVAL_MS) return;
    log.warn({ ...details, reason, count: last.since }, 'device refused');
    said.set(reason, { at: now(), since: 0 });
  };
}
