import { clockDifference } from '#shared/domain/time/clock-time.ts';
import { DAY_MS, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import { zoneOffsetAt } from '#shared/domain/time/zone-offset.ts';
import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL } from '../judgement.ts';

/** Beginnings of the last outages: local day, minute of the day, instant, how long. `hits` on days running. */
type State = { begins: number[][]; minute: number; lastDay: number; hits: number; from: number };
type Parameters = RuleParameters<'fed-through-clock'>;

/** A silence that begins when yesterday's outage did is taken for another after this long. */
const SILENT_FOR_MS = 30 * MINUTE_MS;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { link, now } = facts;
  if (facts.kind === 'reading' && link.outageEnded) takeOutage(state, facts, parameters);
  if (facts.kind === 'time' && link.lastWordAt > link.listeningSince && now - link.lastWordAt >= SILENT_FOR_MS) {
    takeSilence(state, facts, parameters);
  }
  if (state.hits < parameters.days) return NORMAL;
  return hasKeptPower(state, facts) ? NORMAL : ABNORMAL;
}

/** Power that stayed on for two days past the hour shows that the wiring was put right. */
function hasKeptPower(state: State, { kind, localDay, localMinute }: Facts): boolean {
  if (kind !== 'reading') return false;
  const days = localDay - state.lastDay;
  const kept = days > 2 || (days === 2 && localMinute > state.minute + 30);
  if (kept) state.hits = 0;
  return kept;
}

function takeOutage(state: State, { link, context }: Facts, parameters: Parameters): void {
  const outage = link.outages.at(-1);
  if (outage === undefined || (link.reportsBoots && !outage.booted)) return;
  const lastedMs = outage.to - outage.from;
  if (lastedMs < parameters.shortestOutageMinutes * MINUTE_MS || lastedMs >= DAY_MS) return;
  const { day, minute } = localBegin(context.zone, outage.from);
  if (state.begins.at(-1)?.[2] !== outage.from) {
    state.begins = [...state.begins, [day, minute, outage.from, Math.round(lastedMs / MINUTE_MS)]].slice(-4);
  }
  countDays(state, day, minute, parameters);
}

/** The next outage seen from its beginning: no word since about when yesterday's began. */
function takeSilence(state: State, { reading, context }: Facts, parameters: Parameters): void {
  if (reading.at === 0 || state.begins.length === 0) return;
  const { day, minute } = localBegin(context.zone, reading.at);
  if (state.lastDay !== day) countDays(state, day, minute, parameters);
}

/** Outages that began on days running within ten minutes of the same time of day, this one the last. */
function countDays(state: State, day: number, minute: number, { sameTimeMinutes }: Parameters): void {
  const isSame = (begin: readonly number[], onDay: number): boolean =>
    begin[0] === onDay && Math.abs(clockDifference(begin[1] ?? 0, minute)) <= sameTimeMinutes;
  let hits = 1;
  let from = 0;
  for (let back = day - 1; ; back -= 1) {
    const begin = state.begins.find((candidate) => isSame(candidate, back));
    if (begin === undefined) break;
    hits += 1;
    from = begin[2] ?? 0;
  }
  if (hits < 2) return;
  if (state.hits < hits || state.from === 0) state.from = from;
  state.hits = hits;
  state.minute = minute;
  state.lastDay = day;
}

function localBegin(zone: string, at: number): { readonly day: number; readonly minute: number } {
  const wall = at + (zoneOffsetAt(zone, at) ?? 0) * MINUTE_MS;
  const day = Math.floor(wall / DAY_MS);
  return { day, minute: (wall - day * DAY_MS) / MINUTE_MS };
}

function describe(state: State, { link }: Facts): Finding {
  return {
    cause: 'unknown',
    from: state.from,
    evidence: {
      days: state.hits,
      atMinute: Math.round(state.minute),
      minutes: state.begins.at(-1)?.[3] ?? null,
      newBoot: link.reportsBoots,
    },
  };
}

export const fedThroughClock = defineDetector<'fed-through-clock', State>({
  detector: 'fed-through-clock',
  hears: ['reading', 'time'],
  initial: () => ({ begins: [], minute: 0, lastDay: 0, hits: 0, from: 0 }),
  judge,
  delaySeconds: () => 0,
  describe,
});
