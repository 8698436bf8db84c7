import { ALARM_MESSAGES } from './alarm.data.ts';
import { ALARM_ACT_MESSAGES } from './alarm-acts.data.ts';
import { CATALOGUE } from './catalogue.ts';
import { createWords } from './create-words.ts';
import { HOME_MESSAGES } from './home.data.ts';
import type { ValuesOf } from './message-values.ts';
import { PROFILE_MESSAGES } from './profile.data.ts';
import { PUMP_MESSAGES } from './pump.data.ts';

const PAGE_CATALOGUE = {
  ...CATALOGUE,
  ...PUMP_MESSAGES,
  ...ALARM_MESSAGES,
  ...ALARM_ACT_MESSAGES,
  ...HOME_MESSAGES,
  ...PROFILE_MESSAGES,
} as const;

type PageCatalogue = typeof PAGE_CATALOGUE;
export type PageMessageKey = keyof PageCatalogue;

/** Keys of messages that have no places. */
export type PlainKey = {
  [Key in PageMessageKey]: ValuesOf<PageCatalogue[Key]> extends [] ? Key : never;
}[PageMessageKey];

/** `t` of the pages about pumps, alarms and oneself, which come after the first load. Nothing of the first load may say these. */
export const t = createWords(PAGE_CATALOGUE);

/** Whether a name made at run time is a message's key. */
export const isPlainKey = (key: string): key is PlainKey => Object.hasOwn(PAGE_CATALOGUE, key);
