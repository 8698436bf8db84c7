import { SET_ASIDE } from '#server/db/set-aside.ts';

/** Mails that say that nobody has seen to the alarm. */
const UNSEEN = `('escalated', 're-alarmed')`;

/**
 * Whether a mail `m` no longer tells the truth: its alarm was set aside, its condition is over (one that chatters waits for
 * a person all the same), or it says that nobody acknowledged what somebody has. A mail that has not left is then taken
 * back, however often it was tried, and never sent.
 */
export const UNTRUE = `exists (select from alarms a where a.id = m.alarm_id and (${SET_ASIDE} or a.state = 'normal'
  or a.returned_at is not null and a.state <> 'latched'
  or a.state = 'acknowledged' and split_part(m.transition, ' ', 1) in ${UNSEEN}))`;
