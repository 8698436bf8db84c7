import { ALARM_MESSAGES } from './alarm.data.ts';
import { ERROR_MESSAGES } from './error.data.ts';
import { FLEET_MESSAGES } from './fleet.data.ts';
import { HOME_MESSAGES } from './home.data.ts';
import { PUMP_MESSAGES } from './pump.data.ts';
import { SESSION_MESSAGES } from './session.data.ts';
import { SHELL_MESSAGES } from './shell.data.ts';
import { STRIP_MESSAGES } from './strip.data.ts';

/** Every word of the screens that is not an alarm's own: those live in shared/domain/wording, for the mails too. */
export const CATALOGUE = {
  ...SHELL_MESSAGES,
  ...ERROR_MESSAGES,
  ...SESSION_MESSAGES,
  ...STRIP_MESSAGES,
  ...FLEET_MESSAGES,
  ...PUMP_MESSAGES,
  ...ALARM_MESSAGES,
  ...HOME_MESSAGES,
} as const;

export type Catalogue = typeof CATALOGUE;
