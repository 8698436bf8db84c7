import type { ControlAnswer } from '#shared/domain/control/control-answer.ts';
import { fitsSpeed } from '#shared/domain/control/speed-tolerance.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { isRecord, type Json } from '../plain-state.ts';
import type { LoadState } from './load-state.ts';
import { weightedMedian } from './watts-sketch.ts';

/** So many starts teach the watts of a primed pump at its prime speed. */
const TEACHING_STARTS = 10;

/** Learns what the pump draws at the end of a prime that carried load. */
export type PrimeTeacher = {
  /** Follows a reading; answers whether something was learnt. */
  readonly follow: (reading: Reading, control: ControlAnswer, state: LoadState) => boolean;
  /** Prime speed, rpm, and its usual watts; undefined before ten starts. */
  readonly usual: () => { readonly rpm: number; readonly watts: number } | undefined;
  readonly save: () => Json;
};

/**
 * A teacher that goes on from what was saved.
 *
 * @example createPrimeTeacher(undefined).usual() // undefined
 */
export function createPrimeTeacher(saved: unknown): PrimeTeacher {
  const record = isRecord(saved) ? saved : {};
  let rpm = typeof record.rpm === 'number' ? record.rpm : 0;
  let watts = Array.isArray(record.watts)
    ? record.watts.filter((value): value is number => Number.isFinite(value))
    : [];
  let candidate = 0;
  let candidateRpm = 0;
  return {
    follow: (reading, control, state) => {
      if (control.due.source === 'prime') {
        const settled = state.primed === 1 && fitsSpeed(reading.rpm, control.due.rpm);
        candidate = settled ? state.smoothWatts : 0;
        candidateRpm = control.due.rpm;
        return false;
      }
      if (candidate === 0) return false;
      if (candidateRpm !== rpm) watts = [];
      rpm = candidateRpm;
      watts = [...watts.slice(1 - TEACHING_STARTS), Math.round(candidate)];
      candidate = 0;
      return true;
    },
    usual: () => {
      if (watts.length < TEACHING_STARTS) return undefined;
      const median = weightedMedian(watts.map((value) => ({ value, weight: 1 })));
      return median === undefined ? undefined : { rpm, watts: median };
    },
    save: () => ({ rpm, watts: [...watts] }),
  };
}
