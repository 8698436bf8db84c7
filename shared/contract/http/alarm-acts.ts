import { z } from 'zod';
import { ERROR_CODES } from '../errors.ts';
import { Id, Instant } from '../primitives.ts';
import { Alarm } from './alarms.ts';
import { defineEndpoint, MANAGERS, STAFF } from './endpoint.ts';

const Reason = z.string().trim().min(1, 'say why').max(300);
const Note = z.string().trim().max(500).optional();

/** Why and until when an alarm calls nobody: at most a week. */
export const ShelveAlarm = z.object({ until: Instant, reason: Reason });
export const TakeOutOfService = z.object({ reason: Reason });
export const AssignAlarm = z.object({ technicianId: Id });
export const AnswerNothingToDo = z.object({ note: Note });
/** What was found, and the cause of the alarm's list it was, where it is one of them. */
export const WorkOffNote = z.object({
  found: z.string().trim().min(1, 'say what you found').max(1000),
  cause: z.string().max(40).optional(),
});

/** One thing a person does to an alarm, as data: what a list of alarms is done to, and how that is undone. */
export const AlarmAct = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('acknowledge'), note: Note }),
  z.object({ kind: z.literal('withdraw-acknowledgement') }),
  z.object({ kind: z.literal('shelve'), ...ShelveAlarm.shape }),
  z.object({ kind: z.literal('unshelve') }),
  z.object({ kind: z.literal('take-out-of-service'), ...TakeOutOfService.shape }),
  z.object({ kind: z.literal('return-to-service') }),
  z.object({ kind: z.literal('assign'), ...AssignAlarm.shape }),
  z.object({ kind: z.literal('unassign') }),
  z.object({ kind: z.literal('nothing-to-do'), ...AnswerNothingToDo.shape }),
  z.object({ kind: z.literal('withdraw-nothing-to-do') }),
  z.object({ kind: z.literal('work-off'), ...WorkOffNote.shape }),
  z.object({ kind: z.literal('withdraw-work-off') }),
]);
export type AlarmAct = z.infer<typeof AlarmAct>;

export const ActOnAlarms = z.object({
  acts: z
    .array(
      z.object({
        alarmId: Id,
        /** The version that was looked at: another one refuses this alarm alone. Left out = whatever it is now. */
        version: z.number().int().optional(),
        act: AlarmAct,
      }),
    )
    .min(1)
    .max(200),
});
export type ActOnAlarms = z.infer<typeof ActOnAlarms>;

/** What became of each: those that were done as they stand now, the others with the reason. */
export const AlarmActsDone = z.object({
  done: z.array(Alarm),
  refused: z.array(z.object({ alarmId: Id, code: z.enum(ERROR_CODES as [string, ...string[]]), detail: z.string() })),
});
export type AlarmActsDone = z.infer<typeof AlarmActsDone>;

export const Technicians = z.object({
  items: z.array(
    z.object({
      id: Id,
      name: z.string(),
      /** Open alarms that go to them now. */
      openAlarms: z.number().int(),
    }),
  ),
});
export type Technicians = z.infer<typeof Technicians>;

const AlarmParams = z.object({ alarmId: Id });

export const alarmActEndpoints = {
  technicians: defineEndpoint({
    method: 'GET',
    path: '/api/technicians',
    summary: 'Technicians an alarm may be given to',
    roles: STAFF,
    response: Technicians,
  }),
  actOnMany: defineEndpoint({
    method: 'POST',
    path: '/api/alarms/acts',
    summary: 'Do something to several alarms; one that is refused holds up none of the others',
    roles: STAFF,
    body: ActOnAlarms,
    response: AlarmActsDone,
    idempotent: true,
  }),
  shelve: defineEndpoint({
    method: 'PUT',
    path: '/api/alarms/:alarmId/shelf',
    summary: 'Hold an alarm until an instant: it stays, but calls nobody',
    roles: STAFF,
    params: AlarmParams,
    body: ShelveAlarm,
    response: Alarm,
    ifMatch: true,
  }),
  unshelve: defineEndpoint({
    method: 'DELETE',
    path: '/api/alarms/:alarmId/shelf',
    summary: 'End the hold of an alarm',
    roles: STAFF,
    params: AlarmParams,
    response: Alarm,
  }),
  takeOutOfService: defineEndpoint({
    method: 'PUT',
    path: '/api/alarms/:alarmId/out-of-service',
    summary: 'Take an alarm out of service until somebody returns it',
    roles: MANAGERS,
    params: AlarmParams,
    body: TakeOutOfService,
    response: Alarm,
    ifMatch: true,
  }),
  returnToService: defineEndpoint({
    method: 'DELETE',
    path: '/api/alarms/:alarmId/out-of-service',
    summary: 'Return an alarm to service',
    roles: MANAGERS,
    params: AlarmParams,
    response: Alarm,
  }),
  assign: defineEndpoint({
    method: 'PUT',
    path: '/api/alarms/:alarmId/assignment',
    summary: 'Give an alarm to a technician, who gets a mail',
    roles: MANAGERS,
    params: AlarmParams,
    body: AssignAlarm,
    response: Alarm,
    ifMatch: true,
  }),
  unassign: defineEndpoint({
    method: 'DELETE',
    path: '/api/alarms/:alarmId/assignment',
    summary: "Give an alarm back to its pad's technician",
    roles: MANAGERS,
    params: AlarmParams,
    response: Alarm,
  }),
  nothingToDo: defineEndpoint({
    method: 'PUT',
    path: '/api/alarms/:alarmId/nothing-to-do',
    summary: 'Record that an alarm calls for nothing; it is acknowledged with it',
    roles: STAFF,
    params: AlarmParams,
    body: AnswerNothingToDo,
    response: Alarm,
  }),
  withdrawNothingToDo: defineEndpoint({
    method: 'DELETE',
    path: '/api/alarms/:alarmId/nothing-to-do',
    summary: "Undo one's own answer within five minutes",
    roles: STAFF,
    params: AlarmParams,
    response: Alarm,
  }),
  workOff: defineEndpoint({
    method: 'PUT',
    path: '/api/alarms/:alarmId/done',
    summary: 'Close a note of the work list with what was found',
    roles: STAFF,
    params: AlarmParams,
    body: WorkOffNote,
    response: Alarm,
    ifMatch: true,
  }),
  withdrawWorkOff: defineEndpoint({
    method: 'DELETE',
    path: '/api/alarms/:alarmId/done',
    summary: 'Put a note back on the work list within five minutes',
    roles: STAFF,
    params: AlarmParams,
    response: Alarm,
  }),
};
