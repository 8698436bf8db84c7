import { DAY_MS } from '../time/local-time.ts';
import { zoneOffsetAt } from '../time/zone-offset.ts';
import { SPEAKS_FOR_DAYS } from './gather-signs.ts';
import { type AlarmToExplain, likelyCausesOf, type WordedCauses } from './likely-causes-of.ts';
import type { FoundCounts } from './rank-causes.ts';

/**
 * The likely causes of an alarm at a pad in a zone: as `likelyCausesOf`, with what the calendar knows of the days before
 * it. `found` counts what this company found for the detector. An unknown zone leaves the calendar out.
 *
 * @example explainAlarm({ detector: 'clock-shift', cause: 'unknown', from, evidence: {} }, 'America/New_York').causes.length > 0 // true
 */
export function explainAlarm(alarm: AlarmToExplain, zone: string, found: FoundCounts = {}): WordedCauses {
  const before = zoneOffsetAt(zone, alarm.from - SPEAKS_FOR_DAYS['clocks-shifted'] * DAY_MS);
  const then = zoneOffsetAt(zone, alarm.from);
  const seen = before === undefined || then === undefined ? {} : { 'clocks-shifted': before !== then };
  return likelyCausesOf(alarm, { seen }, found);
}
