import type pg from 'pg';
import type { CommissionedPump } from '#server/db/commissioned-pumps.ts';
import type { AlarmChange } from '#server/fold/alarm-change.ts';
import { listNewestStarts, lockOpenAlarms, saveAlarmChanges } from '#server/fold/alarms-repository.ts';
import { applySignals } from '#server/fold/apply-signals.ts';
import {
  type CostlyMemory,
  type DailyAdvice,
  judgeCostlyProgram,
  NO_COSTLY_MEMORY,
} from '#shared/domain/advisor/judge-costly-program.ts';
import { lockCostlyMemory, saveCostlyMemory } from './costly-repository.ts';

/**
 * Judges a pump's advice of today against what is remembered of the days before it, and takes what comes of it into the
 * pump's alarms, in the transaction that keeps the advice. A day judged again takes its own place, and the memory knows
 * whether the note stands: a worker that is started anew doubles nothing. `past` is what is remembered where nothing is
 * yet. Answers the alarms that changed; a note calls nobody.
 */
export async function noteCostlyProgram(
  client: pg.ClientBase,
  pump: CommissionedPump,
  today: DailyAdvice,
  past: CostlyMemory = NO_COSTLY_MEMORY,
): Promise<AlarmChange[]> {
  const { pumpId } = pump;
  const remembered = (await lockCostlyMemory(client, pumpId)) ?? past;
  const { memory, signal } = judgeCostlyProgram(remembered, today);
  // A pump that nothing can be said of yet is still to be looked at for the first time.
  if (memory !== NO_COSTLY_MEMORY) await saveCostlyMemory(client, pumpId, memory);
  if (signal === undefined) return [];
  const open = await lockOpenAlarms(client, [pumpId]);
  const newestStarts = await listNewestStarts(client, [pumpId]);
  const changes = applySignals([{ ...pump, signals: [signal] }], { open, newestStarts }, today.at);
  await saveAlarmChanges(client, changes);
  return changes;
}
