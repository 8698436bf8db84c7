import { createIdleAdvance } from './advance-idle.ts';
import { catchUp } from './catch-up.ts';
import { takeFreePumps, takePumps } from './claim-pumps.ts';
import { correctLateRuns } from './correct-late-runs.ts';
import { fallBehind } from './fall-behind.ts';
import type { FoldContext, FoldRequests } from './fold-context.ts';
import { foldMessages } from './fold-messages.ts';
import type { FoldTask } from './fold-work.ts';
import { reloadContexts } from './reload-contexts.ts';
import { tickPumps } from './tick-pumps.ts';
import { isLateDue, waitForMoreLate } from './wait-for-late.ts';

/** Messages are folded together up to this many readings: beyond it a commit takes long and gains nothing. */
const EVENTS_PER_COMMIT = 10_000;
/**
 * Between two commits: so that what comes in a trickle is committed in sips and not in drops, and so that folding takes
 * a third of the time at most while acknowledgements want the rest. Well under the second in which all is understood.
 */
const PAUSE_MS = { least: 40, most: 400, ofWork: 2 } as const;

/** Everything the fold does, in the order in which it is looked for. */
export function listFoldTasks(context: FoldContext, requests: FoldRequests): FoldTask[] {
  const idle = createIdleAdvance();
  const when = (isDue: () => boolean, run: () => Promise<void>) => () => (isDue() ? run : undefined);
  return [
    {
      name: 'messages',
      next: when(
        () => !context.queue.isEmpty(),
        () => foldNext(context, requests),
      ),
    },
    {
      name: 'own',
      next: when(
        () => requests.owned.size > 0,
        () => ownRequested(context, requests),
      ),
    },
    {
      name: 'commissioning',
      next: when(
        () => isAnyRecommissioned(requests),
        () => recommission(context, requests),
      ),
    },
    {
      name: 'sweep',
      next: when(
        () => requests.sweep,
        () => sweep(context, requests),
      ),
    },
    {
      name: 'listening',
      next: when(
        () => requests.listening,
        () => listenAgain(context, requests),
      ),
    },
    {
      name: 'doubt',
      next: when(
        () => requests.doubted.size > 0,
        async () => doubtRequested(context, requests),
      ),
    },
    {
      name: 'catch-up',
      next: when(
        () => context.catchUpAt <= context.now(),
        () => catchUpBetween(context, requests),
      ),
    },
    {
      name: 'tick',
      next: when(
        () => requests.tick,
        async () => {
          requests.tick = false;
          await tickPumps(context);
          await correctLate(context);
          await idle.run(context);
        },
      ),
    },
  ];
}

async function foldNext(context: FoldContext, requests: FoldRequests): Promise<void> {
  // Before anything of theirs is folded from memory.
  doubtRequested(context, requests);
  const from = performance.now();
  await foldMessages(context, context.queue.take(EVENTS_PER_COMMIT));
  const worked = performance.now() - from;
  const pause = Math.min(PAUSE_MS.most, Math.max(PAUSE_MS.least, worked * PAUSE_MS.ofWork));
  await new Promise((resolve) => setTimeout(resolve, pause));
}

function doubtRequested(context: FoldContext, { doubted }: FoldRequests): void {
  for (const pumpId of doubted) {
    const slot = context.slots.find(pumpId);
    if (slot?.mode === 'live') fallBehind(context, slot, 'behind', context.now());
  }
  doubted.clear();
}

/** Asked of the database even for pumps we hold: another process may have taken one that now comes back. */
async function ownRequested(context: FoldContext, { owned }: FoldRequests): Promise<void> {
  const pumpIds = [...owned];
  await takePumps(context, pumpIds);
  for (const pumpId of pumpIds) owned.delete(pumpId);
}

const isAnyRecommissioned = ({ recommissioned }: FoldRequests) => recommissioned === 'all' || recommissioned.size > 0;

async function recommission(context: FoldContext, requests: FoldRequests): Promise<void> {
  const { recommissioned } = requests;
  requests.recommissioned = new Set();
  try {
    await reloadContexts(context, recommissioned === 'all' ? undefined : [...recommissioned]);
  } catch (error) {
    requests.recommissioned = 'all';
    throw error;
  }
  // A pump that is monitored from now on has no owner yet.
  requests.sweep = true;
}

async function sweep(context: FoldContext, requests: FoldRequests): Promise<void> {
  await takeFreePumps(context);
  requests.sweep = false;
}

async function listenAgain(context: FoldContext, requests: FoldRequests): Promise<void> {
  requests.listening = false;
  for (const slot of context.slots.list()) {
    if (slot.mode === 'live') slot.fold.push({ kind: 'listening', receivedAt: context.listeningSince });
  }
}

/** A long catch-up lets what was just stored of other pumps pass in between. */
async function catchUpBetween(context: FoldContext, requests: FoldRequests): Promise<void> {
  await catchUp(context, async () => {
    if (!context.queue.isEmpty()) await foldNext(context, requests);
  });
}

async function correctLate(context: FoldContext): Promise<void> {
  const now = context.now();
  for (const slot of context.slots.list()) {
    if (slot.mode !== 'live' || !isLateDue(slot, now)) continue;
    waitForMoreLate(slot, now);
    if (await correctLateRuns(context, slot)) context.onNews({ pumpIds: [slot.pump.pumpId], mails: 0 });
  }
}
