import { RAW_RETENTION_DAYS } from '#server/db/reading-partitions.ts';
import { rollUpWaiting } from '#server/rollup/roll-up-waiting.ts';
import type { Job } from './job.ts';

/** A tenth of a core, however many pumps there are: the more there are, the older the figures may be. */
const EVERY_MS = 20_000;
const BUDGET_MS = 2_000;
/** A pump's figures are not worked out more often than this. */
const FRESH_MS = 60_000;

/** Rolls up what was folded since, for whoever waits longest. */
export const rollUp: Job = {
  name: 'roll up',
  everyMs: EVERY_MS,
  run: async ({ pool, now, log }) => {
    const options = { pool, now, rawDays: RAW_RETENTION_DAYS, freshMs: FRESH_MS, budgetMs: BUDGET_MS };
    const { failed } = await rollUpWaiting(options);
    for (const { pumpId, err } of failed) log.warn({ err, pumpId }, 'a pump cannot be rolled up');
  },
};
