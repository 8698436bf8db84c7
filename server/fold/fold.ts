import type { StoredMessage } from '#server/ingest/stored-message.ts';
import type { FoldContext, FoldOptions, FoldRequests } from './fold-context.ts';
import { createFoldQueue } from './fold-queue.ts';
import { listFoldTasks } from './fold-tasks.ts';
import { createFoldWork } from './fold-work.ts';
import { saveStates } from './save-touched.ts';
import { createSlotTable } from './slot-table.ts';

/** "Stored, then understood": the second half. Everything but `start`, `drain` and `stop` returns at once. */
export type Fold = {
  /** Takes the pumps that nobody folds and begins to catch up with what is stored of them. */
  readonly start: () => Promise<void>;
  /** What was stored a moment ago, in order. */
  readonly accept: (messages: readonly StoredMessage[]) => void;
  /** Something of these pumps may have been stored unheard: they are read from the database from here on. */
  readonly doubt: (pumpIds: readonly string[]) => void;
  /** A device of this pump is connected here now. */
  readonly own: (pumpId: string) => void;
  /** What is commissioned of these pumps changed; undefined = perhaps of all. */
  readonly recommission: (pumpIds: readonly string[] | undefined) => void;
  /** Time passes: silence, late readings, idle cursors. */
  readonly tick: () => void;
  /** Looks for pumps whose process has died. */
  readonly sweep: () => void;
  /** The server paused: silence counts from now on. */
  readonly listenAgain: () => void;
  readonly counts: () => FoldCounts;
  readonly drain: () => Promise<void>;
  readonly stop: () => Promise<void>;
};

export type FoldCounts = {
  readonly pumps: number;
  readonly setAside: number;
  readonly behind: number;
  /** How long the oldest stored message has waited to be understood, ms. */
  readonly lagMs: number;
};

/** What waits in memory at most, readings; beyond it pumps are read from the database instead. */
const MOST_WAITING = 200_000;
const WAKE_EVERY_MS = 500;
/** After a crash the last statements of the old process end within moments; its pumps are free then. */
const FIRST_SWEEPS = 10;
const FIRST_SWEEP_PAUSE_MS = 200;

/** Nothing is folded before `start`. */
export function createFold(options: FoldOptions): Fold {
  const context: FoldContext = {
    ...options,
    slots: createSlotTable(),
    queue: createFoldQueue(),
    listeningSince: options.now(),
    catchUpAt: Number.POSITIVE_INFINITY,
  };
  const requests: FoldRequests = {
    doubted: new Set(),
    owned: new Set(),
    recommissioned: new Set(),
    sweep: false,
    tick: false,
    listening: false,
  };
  const work = createFoldWork(listFoldTasks(context, requests), options.log);
  const ask = (change: () => void) => {
    change();
    work.wake();
  };
  let waker: NodeJS.Timeout | undefined;
  return {
    start: async () => {
      context.listeningSince = options.now();
      waker = setInterval(work.wake, WAKE_EVERY_MS);
      await sweepUntilFree(context, requests, work.wake, work.drain);
    },
    accept: (messages) => ask(() => acceptMessages(context, requests, messages)),
    doubt: (pumpIds) =>
      ask(() => {
        for (const pumpId of pumpIds) requests.doubted.add(pumpId);
      }),
    own: (pumpId) => ask(() => requests.owned.add(pumpId)),
    recommission: (pumpIds) => ask(() => noteRecommissioned(requests, pumpIds)),
    tick: () => ask(() => (requests.tick = true)),
    sweep: () => ask(() => (requests.sweep = true)),
    listenAgain: () =>
      ask(() => {
        context.listeningSince = options.now();
        requests.listening = true;
      }),
    counts: () => countFold(context),
    drain: work.drain,
    stop: async () => {
      clearInterval(waker);
      await work.stop();
      await saveStates(context);
    },
  };
}

async function sweepUntilFree(
  context: FoldContext,
  requests: FoldRequests,
  wake: () => void,
  drain: () => Promise<void>,
): Promise<void> {
  const monitored = (await context.listPumps()).length;
  for (let attempt = 0; attempt < FIRST_SWEEPS; attempt += 1) {
    requests.sweep = true;
    wake();
    await drain();
    if (context.slots.size() >= monitored) return;
    await new Promise((resolve) => setTimeout(resolve, FIRST_SWEEP_PAUSE_MS));
  }
}

function acceptMessages(context: FoldContext, { doubted }: FoldRequests, messages: readonly StoredMessage[]): void {
  for (const message of messages) {
    const slot = context.slots.find(message.pumpId);
    if (slot === undefined) continue;
    slot.lastStored = Math.max(slot.lastStored, message.sequence);
    if (slot.mode !== 'live') continue;
    if (context.queue.events() < MOST_WAITING) context.queue.push(message);
    else doubted.add(message.pumpId);
  }
}

function noteRecommissioned(requests: FoldRequests, pumpIds: readonly string[] | undefined): void {
  if (pumpIds === undefined || requests.recommissioned === 'all') requests.recommissioned = 'all';
  else for (const pumpId of pumpIds) requests.recommissioned.add(pumpId);
}

function countFold(context: FoldContext): FoldCounts {
  const slots = context.slots.list();
  const oldest = context.queue.oldest();
  return {
    pumps: slots.length,
    setAside: slots.filter(({ mode }) => mode === 'set-aside').length,
    behind: slots.filter(({ mode }) => mode === 'behind' || mode === 'reload').length,
    lagMs: oldest === undefined ? 0 : Math.max(0, context.now() - oldest),
  };
}
