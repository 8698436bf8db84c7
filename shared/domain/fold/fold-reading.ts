import { fitsSpeed } from '../control/speed-tolerance.ts';
import type { Facts } from '../detectors/facts.ts';
import { silenceLimitMs } from '../detectors/link/link-tracker.ts';
import { DAY_MS, MINUTE_MS, weekdayOf } from '../time/local-time.ts';
import { offsetSpanAt } from '../time/zone-offset.ts';
import { followAnswer } from './control-copy.ts';
import { isTryOver, tryBefore } from './mark-unprimed.ts';
import type { PumpEvent } from './pump-event.ts';
import type { PumpParts } from './pump-parts.ts';

/** Moves control, inputs, load, link and runs on by one reading, and the facts with them. */
export function foldReading(parts: PumpParts, { reading, single }: PumpEvent & { kind: 'reading' }): void {
  const { facts, control, inputs, load, water, link, runs } = parts;
  const seen = parts.seen();
  const previous = facts.reading;
  const elapsedMs = seen ? reading.at - previous.at : 0;
  const gap = elapsedMs > silenceLimitMs(facts.context);
  const started = tryBefore(facts);
  facts.now = reading.at;
  facts.reading = reading;
  facts.single = single;
  facts.elapsedMs = elapsedMs;
  facts.gap = gap;
  if (reading.reportedSource !== undefined) facts.reportsSource = true;
  tellLocalTime(parts, reading.at);
  followAnswer(parts.answer, control.push(reading), reading, elapsedMs);
  const { localDay, localMinute } = facts;
  const before = seen ? previous.closedInputs : undefined;
  inputs.read({ at: reading.at, closed: reading.closedInputs, before, gap, elapsedMs, localDay, localMinute });
  load.read(reading, facts.control, gap ? 0 : elapsedMs, gap);
  link.read(reading.at, seen ? previous.at : 0, gap, isRunningOn(facts));
  parts.motorClock.read(facts);
  water.read(facts);
  if (isTryOver(facts, started)) runs.flag('unprimed');
  runs.push(reading, facts.control, water.facts);
  if (isUnprimed(facts)) runs.flag('unprimed');
}

/** Turning, and not as a motor does that has just been switched on. */
function isRunningOn({ reading, context, control }: Facts): boolean {
  const { prime } = context.settings;
  if (prime === null || control.standing || reading.reportedSource === 'prime') return false;
  return reading.rpm > 0.9 * control.due.rpm && control.due.rpm > 0 && !fitsSpeed(reading.rpm, prime.rpm);
}

/** Every start is unprimed for a while; it says something once the prime is over, or after the pump had load. */
function isUnprimed({ load, now }: Facts): boolean {
  return load.primed === false && (load.primedOnce || now > load.primeEndsAt);
}

function tellLocalTime({ facts, zone }: PumpParts, at: number): void {
  if (!(at >= zone.from && at < zone.to)) {
    const span = offsetSpanAt(facts.context.zone, at);
    zone.from = span?.from ?? at;
    zone.to = span?.to ?? at;
    zone.offsetMinutes = span?.offsetMinutes ?? 0;
  }
  const wallMs = at + zone.offsetMinutes * MINUTE_MS;
  facts.zoneOffsetMinutes = zone.offsetMinutes;
  facts.localDay = Math.floor(wallMs / DAY_MS);
  facts.localWeekday = weekdayOf(facts.localDay);
  facts.localMinute = (wallMs - facts.localDay * DAY_MS) / MINUTE_MS;
}
