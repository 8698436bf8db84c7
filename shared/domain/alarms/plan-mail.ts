import type { Priority } from '../detectors/detector.ts';

const MINUTE_MS = 60_000;

/** Others on a pad within this time of its first mail join one follow-up. */
export const FOLLOW_UP_WITHIN_MS = 2 * MINUTE_MS;
/** At most one mail a pad in this time, apart from that follow-up. */
export const PAD_PAUSE_MS = 60 * MINUTE_MS;
/** A person gets at most this many mails in that time; the rest is a digest. */
export const PERSON_MAILS = 5;
export const PERSON_WINDOW_MS = 10 * MINUTE_MS;

/**
 * When the last mail of one pad to one person left or leaves, whether it tells of an urgent alarm, and whether others
 * may follow it up.
 */
export type PadMailState = { readonly lastAt: number; readonly urgent: boolean; readonly first: boolean };

/** When one person's last mails left or leave, oldest first, at most PERSON_MAILS. */
export type PersonMailState = { readonly sentAt: readonly number[] };

export type MailRequest = {
  readonly at: number;
  readonly priority: Priority;
  /** Undefined inside mail hours; outside, when they next begin. */
  readonly hoursBeginAt: number | undefined;
  readonly pad: PadMailState | undefined;
  readonly person: PersonMailState;
};

/**
 * When a mail leaves, and what it joins: mails with the same `leavesAt`, pad and person are one mail. `pad` and
 * `person` are what to keep for the next question.
 */
export type MailPlan = {
  readonly kind: 'first' | 'follow-up' | 'hourly' | 'digest' | 'morning';
  readonly leavesAt: number;
  readonly pad: PadMailState;
  readonly person: PersonMailState;
};

/**
 * When an alarm's mail leaves: the first for a pad at once; others on that pad within two minutes join one follow-up;
 * afterwards at most one an hour a pad; a person gets at most five in ten minutes, then a digest; outside mail hours
 * only urgent ones leave. An urgent alarm never waits behind a mail that was of something less.
 *
 * @example planMail({ at: 0, priority: 'soon', hoursBeginAt: undefined, pad: undefined, person: { sentAt: [] } }).leavesAt // 0
 */
export function planMail(request: MailRequest): MailPlan {
  const { at, priority, hoursBeginAt, pad, person } = request;
  if (hoursBeginAt !== undefined && priority !== 'urgent') return keep('morning', hoursBeginAt, request);
  const { kind, wantedAt } = wantedLeave(at, priority, pad);
  const recent = person.sentAt.filter((sentAt) => sentAt > wantedAt - PERSON_WINDOW_MS && sentAt !== wantedAt);
  if (recent.length < PERSON_MAILS) return keep(kind, wantedAt, request);
  return keep('digest', (recent[recent.length - PERSON_MAILS] ?? wantedAt) + PERSON_WINDOW_MS, request);
}

function wantedLeave(
  at: number,
  priority: Priority,
  pad: PadMailState | undefined,
): { readonly kind: MailPlan['kind']; readonly wantedAt: number } {
  const overtakes = priority === 'urgent' && pad?.urgent === false;
  if (pad === undefined || overtakes || at >= pad.lastAt + PAD_PAUSE_MS) return { kind: 'first', wantedAt: at };
  // A mail of this pad waits already: this alarm goes with it.
  if (at < pad.lastAt) return { kind: 'hourly', wantedAt: pad.lastAt };
  const followUpAt = pad.lastAt + FOLLOW_UP_WITHIN_MS;
  return pad.first && at <= followUpAt
    ? { kind: 'follow-up', wantedAt: followUpAt }
    : { kind: 'hourly', wantedAt: pad.lastAt + PAD_PAUSE_MS };
}

/** A mail that others may join keeps its place: only one that leaves later moves the pad's last mail on. */
function keep(kind: MailPlan['kind'], leavesAt: number, request: MailRequest): MailPlan {
  const { pad, person, priority } = request;
  const urgent = priority === 'urgent' || (pad?.lastAt === leavesAt && pad.urgent);
  const sentAt = person.sentAt.includes(leavesAt) ? person.sentAt : [...person.sentAt, leavesAt];
  return {
    kind,
    leavesAt,
    pad: { lastAt: leavesAt, urgent, first: kind === 'first' },
    person: { sentAt: sentAt.toSorted((a, b) => a - b).slice(-PERSON_MAILS * 2) },
  };
}
