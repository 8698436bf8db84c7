import type { Actor } from '#server/context.ts';
import { RequestError } from '#server/errors.ts';
import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';

type Kind = AlarmAct['kind'];

/** What a technician does about an alarm; a manager does all of it, a homeowner nothing. */
const TECHNICIANS: ReadonlySet<Kind> = new Set<Kind>([
  'acknowledge',
  'withdraw-acknowledgement',
  'shelve',
  'unshelve',
  'nothing-to-do',
  'withdraw-nothing-to-do',
  'work-off',
  'withdraw-work-off',
]);

/** Whether somebody in a role may do a thing to an alarm at all. */
export const mayAct = ({ role }: Pick<Actor, 'role'>, kind: Kind): boolean =>
  role === 'manager' || (role === 'technician' && TECHNICIANS.has(kind));

export function requireMayAct(actor: Actor, kind: Kind): void {
  if (!mayAct(actor, kind)) throw new RequestError('forbidden', `This is not for a ${actor.role} to do.`);
}
