import { decide } from '../control/decide.ts';
import { fitsSpeed } from '../control/speed-tolerance.ts';
import type { Facts } from './facts.ts';

/** Asked for every reading of a pump with changed settings, so the answer is kept for a while, ms. */
const KEEP_MS = 60_000;

/**
 * Answers whether a reading's speed, standstill included, is the one that the settings reported by the motor call for.
 * Without a report it never is.
 *
 * @example facts.fitsReported = createReportedFit(facts);
 */
export function createReportedFit(facts: Facts): () => boolean {
  let at = Number.NEGATIVE_INFINITY;
  let closed = -1;
  let reported: Facts['reportedSettings'] | undefined;
  let dueRpm = 0;
  return () => {
    const { reading, control, context, reportedSettings } = facts;
    if (Object.keys(reportedSettings).length === 0) return false;
    const fresh =
      reading.at >= at && reading.at - at < KEEP_MS && closed === reading.closedInputs && reported === reportedSettings;
    if (!fresh) {
      at = reading.at;
      closed = reading.closedInputs;
      reported = reportedSettings;
      const settings = { ...context.settings, ...reportedSettings };
      const { zone, traits } = context;
      const { motorClockOffsetMinutes } = control;
      dueRpm = decide(settings, traits, { at, zone, motorClockOffsetMinutes, closedInputs: closed }).rpm;
    }
    const primeRpm = { ...context.settings, ...reportedSettings }.prime?.rpm;
    if (primeRpm !== undefined && reading.reportedSource === 'prime' && fitsSpeed(reading.rpm, primeRpm)) return true;
    return control.standing ? dueRpm === 0 : dueRpm > 0 && fitsSpeed(reading.rpm, dueRpm);
  };
}
