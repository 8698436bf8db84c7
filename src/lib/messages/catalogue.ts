import { ERROR_MESSAGES } from './error.data.ts';
import { FLEET_MESSAGES } from './fleet.data.ts';
import { SHELL_MESSAGES } from './shell.data.ts';
import { SIGN_IN_MESSAGES } from './sign-in.data.ts';
import { STRIP_MESSAGES } from './strip.data.ts';

/**
 * The words of the first load: frame, sign-in, fleet. Those of pages that come later come with them (`page-words.ts` and
 * its neighbours); alarms' own live in shared/domain/wording, for the mails too.
 */
export const CATALOGUE = {
  ...SHELL_MESSAGES,
  ...ERROR_MESSAGES,
  ...SIGN_IN_MESSAGES,
  ...STRIP_MESSAGES,
  ...FLEET_MESSAGES,
} as const;

export type Catalogue = typeof CATALOGUE;
