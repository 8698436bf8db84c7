import { ACKNOWLEDGE_WITHIN_MS } from '../alarms/escalate.ts';
import { PRIORITIES, type Priority } from '../detectors/detector.ts';
import type { Annunciation } from './life-story.ts';

/**
 * How long alarms of one priority waited to be seen. `medianMs` and `slowMs` (nine of ten were quicker) leave out those
 * nobody has acknowledged, which `waiting` counts. `inTime` = within our own limit; null where there is none.
 */
export type AcknowledgeFigures = {
  readonly priority: Priority;
  readonly count: number;
  readonly acknowledged: number;
  readonly medianMs: number | null;
  readonly slowMs: number | null;
  readonly limitMs: number | null;
  readonly inTime: number | null;
  readonly escalated: number;
  readonly waiting: number;
};

/** The value below which a share of sorted values lies (nearest rank); null for none. */
const rankOf = (sorted: readonly number[], share: number): number | null =>
  sorted[Math.max(0, Math.ceil(share * sorted.length) - 1)] ?? null;

/**
 * Acknowledging by priority.
 *
 * @example acknowledgeFigures([{ at: 0, priority: 'urgent', acknowledgedAt: 60_000, escalated: false }])[0]?.medianMs // 60_000
 */
export const acknowledgeFigures = (annunciations: readonly Annunciation[]): AcknowledgeFigures[] =>
  PRIORITIES.map((priority) => {
    const ours = annunciations.filter((one) => one.priority === priority);
    const waits = ours
      .flatMap(({ at, acknowledgedAt }) => (acknowledgedAt === null ? [] : [acknowledgedAt - at]))
      .sort((a, b) => a - b);
    const limitMs = ACKNOWLEDGE_WITHIN_MS[priority] ?? null;
    return {
      priority,
      count: ours.length,
      acknowledged: waits.length,
      medianMs: rankOf(waits, 0.5),
      slowMs: rankOf(waits, 0.9),
      limitMs,
      inTime: limitMs === null ? null : waits.filter((wait) => wait <= limitMs).length,
      escalated: ours.filter(({ escalated }) => escalated).length,
      waiting: ours.length - waits.length,
    };
  });
