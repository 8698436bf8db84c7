import type pg from 'pg';
import type { Logger } from 'pino';
import { beginListening, stillListening } from './listening-repository.ts';

/** The server's own record of when it could hear anything at all. */
export type Listening = { readonly start: () => Promise<void>; readonly stop: () => Promise<void> };

export type ListeningOptions = {
  readonly pool: pg.Pool;
  /** Called every few seconds while listening goes on. */
  readonly onTick: () => void;
  /** The process stood still for a while (a suspended machine, a moved clock): it listens anew from now on. */
  readonly onGap: () => void;
  readonly now: () => number;
  readonly log: Logger;
};

const TICK_MS = 5_000;
/** A pause this long between two ticks was no busy moment. */
const GAP_MS = 60_000;

/** Nothing is recorded before `start`. */
export function createListening({ pool, onTick, onGap, now, log }: ListeningOptions): Listening {
  let periodId: string | undefined;
  let lastAt = now();
  let timer: NodeJS.Timeout | undefined;
  let writing: Promise<void> = Promise.resolve();

  const record = async (isNew: boolean, at: number): Promise<void> => {
    if (periodId === undefined || isNew) periodId = await beginListening(pool, at);
    else await stillListening(pool, periodId, at);
  };
  const tick = (): void => {
    const at = now();
    const isGap = at - lastAt > GAP_MS || at < lastAt;
    lastAt = at;
    writing = record(isGap, at).catch((err: unknown) => log.warn({ err }, 'could not note that the server listens'));
    if (isGap) onGap();
    onTick();
  };
  return {
    start: async () => {
      lastAt = now();
      await record(true, lastAt);
      timer = setInterval(tick, TICK_MS);
    },
    stop: async () => {
      clearInterval(timer);
      await writing;
      if (periodId !== undefined) await stillListening(pool, periodId, now());
    },
  };
}
