import { z } from 'zod';
import { DETECTORS, PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { Id, Instant, pageOf, pageQuery } from '../primitives.ts';
import { defineEndpoint, EVERYONE, STAFF } from './endpoint.ts';

/** ISA-18.2 states. `normal` = returned and acknowledged: history. */
export const ALARM_STATES = ['unacknowledged', 'acknowledged', 'returned', 'latched', 'normal'] as const;

export const Evidence = z.record(
  z.string(),
  z.union([z.number(), z.string(), z.boolean(), z.null(), z.array(z.union([z.number(), z.string()]))]),
);

/** What a person did about an alarm; `by` is their name, null for readers who may not know it. */
const Deed = { at: Instant, by: z.string().nullable() };

/** What one alarm speaks for: pads of one area that went silent or lost load together, clocks that nobody set, or our own link. */
export const AlarmGroup = z.object({
  kind: z.enum(['area-silence', 'daylight-saving', 'load-fall', 'own-link']),
  area: z.string().nullable(),
  pumps: z.number().int(),
  pads: z.number().int(),
  /** Pumps of which something still stands. */
  standing: z.number().int(),
});
export type AlarmGroup = z.infer<typeof AlarmGroup>;

/** A pump that an alarm speaks for. */
export const AlarmMember = z.object({
  pumpId: Id,
  pumpName: z.string(),
  padId: Id,
  padName: z.string(),
  area: z.string().nullable(),
  joinedAt: Instant,
  /** When its own condition was over; null while it stands. */
  leftAt: Instant.nullable(),
  /** Its own alarm, where there is one. */
  alarmId: Id.nullable(),
});
export type AlarmMember = z.infer<typeof AlarmMember>;

export const Alarm = z.object({
  id: Id,
  /** null = it speaks for several pumps: see `group`. */
  pumpId: Id.nullable(),
  padId: Id.nullable(),
  padName: z.string(),
  pumpName: z.string(),
  customerName: z.string().nullable(),
  area: z.string().nullable(),
  zone: z.string(),
  detector: z.enum(DETECTORS),
  alarmClass: z.enum(['alarm', 'note']),
  priority: z.enum(PRIORITIES),
  state: z.enum(ALARM_STATES),
  cause: z.string(),
  evidence: Evidence,
  /** When the condition began; `raisedAt` when the rule spoke; `returnedAt` when it returned to normal. */
  from: Instant,
  raisedAt: Instant,
  returnedAt: Instant.nullable(),
  count: z.number().int().min(1),
  acknowledgedAt: Instant.nullable(),
  acknowledgedBy: z.string().nullable(),
  acknowledgementNote: z.string().nullable(),
  escalatedAt: Instant.nullable(),
  shelvedUntil: Instant.nullable(),
  shelvedBy: z.string().nullable(),
  shelvedReason: z.string().nullable(),
  suppressed: z.boolean(),
  /** What explains it, where it is one of the pump's own: its pad's state, or another of its alarms. */
  suppressedBy: z.object({ padState: z.string().nullable(), detector: z.enum(DETECTORS).nullable() }).nullable(),
  outOfService: z.boolean(),
  outOfServiceSince: z.object({ ...Deed, reason: z.string().nullable() }).nullable(),
  /** "Nothing to do", about its last raising. */
  answer: z.object({ ...Deed, note: z.string().nullable() }).nullable(),
  /** A note that was worked off, with what was found. */
  done: z.object({ ...Deed, found: z.string().nullable(), cause: z.string().nullable() }).nullable(),
  /** Who was given it instead of the pad's technician. */
  assignedTo: z.object({ id: Id, name: z.string() }).nullable(),
  /** Whom it goes to: who was given it, else the pad's technician. */
  technicianName: z.string().nullable(),
  /** The day of the pad's next stop, where it is on a route: today or later, in the pad's zone. */
  nextStopOn: z.iso.date().nullable(),
  /** One alarm for what befell several pumps at once; `pumpName` is then empty and `padName` says where. */
  group: AlarmGroup.nullable(),
  /** The alarm that speaks for this one. */
  coveredBy: Id.nullable(),
  /** Ends the run of versions of this alarm: pass it as If-Match. */
  version: z.number().int(),
});
export type Alarm = z.infer<typeof Alarm>;

export const AlarmTransition = z.object({
  at: Instant,
  kind: z.string(),
  by: z.string().nullable(),
  note: z.string().nullable(),
  priority: z.enum(PRIORITIES),
  cause: z.string(),
  /** How the alarm's figures stood then. */
  evidence: Evidence,
});

export const AlarmMail = z.object({
  to: z.string(),
  subject: z.string(),
  queuedAt: Instant,
  sentAt: Instant.nullable(),
  attempts: z.number().int(),
});

/** One cause in its place, in words: what it is, how a technician tells, what speaks for and against it. */
export const RankedCause = z.object({
  cause: z.string(),
  name: z.string(),
  check: z.string(),
  standing: z.enum(['likely', 'possible', 'unlikely']),
  /** The rule itself named it from the readings. */
  detectorSays: z.boolean(),
  reasonsFor: z.array(z.string()),
  reasonsAgainst: z.array(z.string()),
  /** Of so many closed cases of this company, so many found it. */
  found: z.number().int(),
  calls: z.number().int(),
});
export type RankedCause = z.infer<typeof RankedCause>;

export const RankedCauses = z.object({
  /** The likeliest first. */
  causes: z.array(RankedCause),
  /** Whether readings or closed cases single one out; where not, the first is a guess and is to be called one. */
  certain: z.boolean(),
  restsOn: z.array(z.enum(['signs', 'closed-calls', 'starting-guess'])),
});
export type RankedCauses = z.infer<typeof RankedCauses>;

export const AlarmDetail = Alarm.extend({
  /** Null for readers who are told in plain words only. */
  likely: RankedCauses.nullable(),
  /** The pumps it speaks for, those that stand first; empty for an alarm of one pump. */
  members: z.array(AlarmMember),
  transitions: z.array(AlarmTransition),
  mails: z.array(AlarmMail),
  serverNow: Instant,
});
export type AlarmDetail = z.infer<typeof AlarmDetail>;

/**
 * Which alarms a list shows. `open` and `unacknowledged` leave out what was set aside; `standing` is all that is not
 * history; `history` has worked-off notes too.
 */
export const ALARM_SHOWS = [
  'open',
  'unacknowledged',
  'shelved',
  'suppressed',
  'out-of-service',
  'standing',
  'history',
  'all',
] as const;

export const AlarmsQuery = z.object({
  show: z.enum(ALARM_SHOWS).default('open'),
  alarmClass: z.enum(['alarm', 'note']).optional(),
  priority: z.enum(PRIORITIES).optional(),
  detector: z.enum(DETECTORS).optional(),
  pumpId: Id.optional(),
  area: z.string().max(60).optional(),
  /** Only those that go to whoever asks. */
  whose: z.enum(['mine']).optional(),
  q: z.string().trim().max(100).optional(),
  sort: z.enum(['worst', 'newest', 'oldest', 'name']).default('worst'),
  ...pageQuery(200, 100),
});
export type AlarmsQuery = z.infer<typeof AlarmsQuery>;

export const AlarmPage = pageOf(Alarm).extend({
  /**
   * Open alarms by priority and open notes the person may see, whatever the filter: those that were set aside are
   * counted apart. `unacknowledged` = alarms that wait for somebody; a note waits for nobody.
   */
  totals: z.object({
    urgent: z.number().int(),
    soon: z.number().int(),
    note: z.number().int(),
    unacknowledged: z.number().int(),
    shelved: z.number().int(),
    suppressed: z.number().int(),
    outOfService: z.number().int(),
  }),
  serverNow: Instant,
});
export type AlarmPage = z.infer<typeof AlarmPage>;

export const AcknowledgeAlarm = z.object({ note: z.string().trim().max(500).optional() });

const AlarmParams = z.object({ alarmId: Id });

export const alarmEndpoints = {
  list: defineEndpoint({
    method: 'GET',
    path: '/api/alarms',
    summary: 'Alarms by state and priority',
    roles: EVERYONE,
    query: AlarmsQuery,
    response: AlarmPage,
  }),
  read: defineEndpoint({
    method: 'GET',
    path: '/api/alarms/:alarmId',
    summary: 'One alarm with its transitions',
    roles: EVERYONE,
    params: AlarmParams,
    response: AlarmDetail,
  }),
  acknowledge: defineEndpoint({
    method: 'POST',
    path: '/api/alarms/:alarmId/acknowledgement',
    summary: 'Acknowledge an alarm; repeating it changes nothing',
    roles: STAFF,
    params: AlarmParams,
    body: AcknowledgeAlarm,
    response: Alarm,
    idempotent: true,
  }),
  withdrawAcknowledgement: defineEndpoint({
    method: 'DELETE',
    path: '/api/alarms/:alarmId/acknowledgement',
    summary: "Undo one's own acknowledgement within five minutes",
    roles: STAFF,
    params: AlarmParams,
    response: Alarm,
  }),
};
