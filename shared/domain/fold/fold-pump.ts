import type { PumpContext } from '../control/pump-context.ts';
import type { AlarmSignal } from '../detectors/detector.ts';
import { type DetectorParameters, resolveParameters } from '../detectors/detector-parameters.ts';
import type { Facts } from '../detectors/facts.ts';
import { silenceLimitMs } from '../detectors/link/link-tracker.ts';
import type { Json } from '../detectors/plain-state.ts';
import { checkReading, isSoundReading } from '../readings/check-reading.ts';
import type { FoldOutput, PumpNow, UnfoldedReading } from './fold-output.ts';
import { foldReading } from './fold-reading.ts';
import type { PumpEvent } from './pump-event.ts';
import { pumpNow } from './pump-now.ts';
import { createPumpParts, type PumpParts } from './pump-parts.ts';
import type { SavedPumpFold } from './saved-pump-fold.ts';

/** The fold of one pump: from events to runs and alarm signals. */
export type PumpFold = {
  /**
   * Takes one event in, in order of arrival. A reading at or below `highWater` is refused, and so is one that its model
   * cannot say; both count as a word from the device. Throws a DetectorFailure where a rule fails; the fold is then good for nothing but being thrown away.
   */
  push(event: PumpEvent): void;
  /** What came of the events since the last call. */
  take(): FoldOutput;
  /** The pump this instant; undefined before the first reading. */
  now(): PumpNow | undefined;
  /** Device time of the last reading folded, ms; undefined before the first. */
  highWater(): number | undefined;
  /** The device's last word, ms, once it is silent: no word for three intervals, at least two minutes, or its will. */
  silentSince(): number | undefined;
  /** When the device's connection dropped, by its will, ms; undefined while it stands or nothing is known of it. */
  lostAt(): number | undefined;
  /** The state: `hot` small and ever changing, `learnt` seldom; `learntVersion` grows only when `learnt` changed. */
  save(): { readonly hot: Json; readonly learnt: Json; readonly learntVersion: number };
  /** The same state under new commissioned data, and new rule figures where given. This fold is not to be used on. */
  withContext(context: PumpContext, parameters?: DetectorParameters): PumpFold;
};

/**
 * The fold of one pump under its commissioned data, going on from what was saved. What of it cannot be read back
 * starts afresh. `parameters` are the rules' figures, the defaults where left out.
 *
 * @example
 * const fold = createPumpFold(context, saved);
 * fold.push({ kind: 'reading', reading, receivedAt, single: true });
 * fold.take().signals;
 */
export function createPumpFold(
  context: PumpContext,
  saved?: SavedPumpFold,
  parameters: DetectorParameters = resolveParameters(),
): PumpFold {
  return foldOf(context, createPumpParts(context, parameters, saved), []);
}

function foldOf(commissioned: PumpContext, made: PumpParts, pending: AlarmSignal[]): PumpFold {
  let signals = pending;
  let unfolded: UnfoldedReading[] = [];
  let parts = made;
  return {
    push: (event) => {
      const before = signals.length;
      const { traits } = commissioned;
      const isSound = event.kind !== 'reading' || isSoundReading(event.reading, traits);
      if (!isSound) unfolded.push({ at: event.reading.at, faults: checkReading(event.reading, traits) });
      if (takeIn(parts, event, isSound)) parts = createPumpParts(commissioned, parts.parameters, parts.save());
      else parts.bank.judge(parts.facts, signals);
      // What an alarm speaks of is no part of what is usual.
      for (let index = before; index < signals.length; index += 1)
        if (signals[index]?.type === 'raised') parts.load.discard();
    },
    take: () => {
      const output = { runs: parts.runs.take(), signals, unfolded };
      signals = [];
      unfolded = [];
      return output;
    },
    now: () => (parts.seen() ? pumpNow(parts.facts) : undefined),
    highWater: () => (parts.seen() ? parts.facts.reading.at : undefined),
    silentSince: () => silentSinceOf(parts.facts),
    lostAt: () => parts.facts.link.lostAt || undefined,
    save: () => parts.save(),
    withContext: (context, parameters = parts.parameters) =>
      foldOf(context, createPumpParts(context, parameters, parts.save()), signals),
  };
}

/** Takes an event into the facts; answers whether the device's pace turned out to be another than was thought. */
function takeIn(parts: PumpParts, event: PumpEvent, isSound: boolean): boolean {
  const { facts, link, pad } = parts;
  link.hear(event);
  facts.kind = event.kind;
  facts.now = event.receivedAt;
  facts.receivedAt = event.receivedAt;
  if (pad.hear(event)) {
    facts.padState = pad.state();
    facts.onSite = pad.onSite();
    facts.onSiteEndedAt = pad.onSiteEndedAt();
  }
  if (event.kind === 'settings') parts.hearSettings(event.settings);
  if (event.kind !== 'reading') return false;
  const late = parts.seen() && event.reading.at <= facts.reading.at;
  // A late reading corrects history elsewhere, one that cannot be is kept as it came; here they only say that the
  // device is there.
  if (late || !isSound) {
    facts.kind = 'time';
    return false;
  }
  const previousAt = parts.seen() ? facts.reading.at : event.reading.at;
  foldReading(parts, event);
  return parts.pace.read(event.reading.at - previousAt);
}

function silentSinceOf({ link, receivedAt, context }: Facts): number | undefined {
  if (link.lastWordAt === 0) return undefined;
  const quiet = receivedAt - Math.max(link.lastWordAt, link.listeningSince) > silenceLimitMs(context);
  return quiet || link.connection === 'lost' ? link.lastWordAt : undefined;
}
