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

export const Alarm = z.object({
  id: Id,
  pumpId: Id,
  padId: Id,
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
  suppressed: z.boolean(),
  outOfService: z.boolean(),
  technicianName: z.string().nullable(),
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
});

export const AlarmMail = z.object({
  to: z.string(),
  subject: z.string(),
  queuedAt: Instant,
  sentAt: Instant.nullable(),
  attempts: z.number().int(),
});

export const AlarmDetail = Alarm.extend({
  transitions: z.array(AlarmTransition),
  mails: z.array(AlarmMail),
  serverNow: Instant,
});
export type AlarmDetail = z.infer<typeof AlarmDetail>;

export const AlarmsQuery = z.object({
  show: z.enum(['open', 'unacknowledged', 'shelved', 'history', 'all']).default('open'),
  alarmClass: z.enum(['alarm', 'note']).optional(),
  priority: z.enum(PRIORITIES).optional(),
  detector: z.enum(DETECTORS).optional(),
  pumpId: Id.optional(),
  area: z.string().max(60).optional(),
  q: z.string().trim().max(100).optional(),
  sort: z.enum(['worst', 'newest', 'oldest', 'name']).default('worst'),
  ...pageQuery(200, 100),
});
export type AlarmsQuery = z.infer<typeof AlarmsQuery>;

export const AlarmPage = pageOf(Alarm).extend({
  /** Open alarms and notes the person may see, whatever the filter. */
  totals: z.object({
    urgent: z.number().int(),
    soon: z.number().int(),
    note: z.number().int(),
    unacknowledged: z.number().int(),
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
