import type { ControlAnswer } from '../control/control-answer.ts';
import type { MotorSettings } from '../control/motor-settings.ts';
import type { PadState, PumpContext } from '../control/pump-context.ts';
import type { PumpEvent } from '../fold/pump-event.ts';
import type { Reading } from '../readings/reading.ts';
import type { SettingsKey } from './changed-settings.ts';
import type { MotorClockFacts } from './clocks/motor-clock-tracker.ts';
import type { Detector } from './detector.ts';
import type { InputFacts } from './inputs/input-facts.ts';
import type { LinkFacts } from './link/link-facts.ts';
import type { LoadFacts } from './load/load-facts.ts';
import type { WaterFacts } from './water/water-facts.ts';

/**
 * Everything the rules may know of one pump at one event, worked out once and shared. One object a pump, changed in
 * place: a rule reads it and copies what it keeps. Times are ms: device time for readings, arrival for the rest.
 */
export type Facts = {
  /** What is being judged, and its instant: device time of a reading, arrival of anything else. */
  kind: PumpEvent['kind'];
  now: number;
  receivedAt: number;
  context: PumpContext;
  /** The last reading, and how far it came after the one before it (0 for the first). */
  reading: Reading;
  /** The reading came alone in its message. */
  single: boolean;
  elapsedMs: number;
  /** No reading for more than three intervals, at least two minutes, before this one. */
  gap: boolean;
  /** The pump has said at least once what commands it. */
  reportsSource: boolean;
  control: ControlAnswer;
  inputs: InputFacts;
  load: LoadFacts;
  water: WaterFacts;
  link: LinkFacts;
  motorClock: MotorClockFacts;
  /** Pad-local time of the reading: day since 1970, weekday from Monday = 0, minute with its fraction. */
  localDay: number;
  localWeekday: number;
  localMinute: number;
  /** Minutes east of UTC at the reading. */
  zoneOffsetMinutes: number;
  padState: PadState;
  onSite: boolean;
  /** When our last visit ended; 0 = none known. */
  onSiteEndedAt: number;
  /** What the motor says it is set to, as far as it has said. */
  reportedSettings: Partial<MotorSettings>;
  /** In which of them it differs from what was commissioned. */
  changedSettings: readonly SettingsKey[];
  /** Whether the reading's speed is due by what the motor says it is set to, where that differs. */
  fitsReported: () => boolean;
  /** Whether a detector's alarm stands. */
  stands: (detector: Detector) => boolean;
};
