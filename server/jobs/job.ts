import type pg from 'pg';
import type { Logger } from 'pino';

/** What a job works with. */
export type JobContext = {
  /** The machine role's. */
  readonly pool: pg.Pool;
  readonly publicUrl: string;
  readonly now: () => number;
  readonly log: Logger;
};

/** Something that is done every so often, by one process of all. Doing it twice does no harm. */
export type Job = {
  readonly name: string;
  readonly everyMs: number;
  readonly run: (context: JobContext) => Promise<void>;
};
