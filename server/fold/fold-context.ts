import type pg from 'pg';
import type { Logger } from 'pino';
import type { CommissionedPump } from '#server/db/commissioned-pumps.ts';
import type { FoldNews } from './fold-news.ts';
import type { FoldQueue } from './fold-queue.ts';
import type { SlotTable } from './slot-table.ts';

export type FoldOptions = {
  /** Connections of the machine role that hold this process's epoch. */
  readonly pool: pg.Pool;
  readonly epoch: number;
  readonly publicUrl: string;
  /** Monitored pumps as commissioned now: all, or those asked for. */
  readonly listPumps: (pumpIds?: readonly string[]) => Promise<readonly CommissionedPump[]>;
  readonly onNews: (news: FoldNews) => void;
  /** How long each message waited from its arrival until it was understood, ms. */
  readonly onFolded: (lagsMs: readonly number[]) => void;
  readonly now: () => number;
  readonly log: Logger;
};

/** What every step of the fold works on. All of it changes in the fold's one loop, never beside it. */
export type FoldContext = FoldOptions & {
  readonly slots: SlotTable;
  readonly queue: FoldQueue;
  /** Since when this process has been listening without a pause, ms: silence before that proves nothing. */
  listeningSince: number;
  /** When the next pump that is behind may be read from the database, ms; Infinity = none is behind. */
  catchUpAt: number;
};

/** What was asked of the fold from outside its loop; the loop takes it up in its own time. */
export type FoldRequests = {
  readonly doubted: Set<string>;
  readonly owned: Set<string>;
  /** Pumps whose commissioning changed; `all` = perhaps every one. */
  recommissioned: Set<string> | 'all';
  sweep: boolean;
  tick: boolean;
  listening: boolean;
};
