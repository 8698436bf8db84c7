import { CATALOGUE } from './catalogue.ts';
import { createWords } from './create-words.ts';
import { HEALTH_MESSAGES } from './health.data.ts';

/** `t` of the page about the alarms' health. */
export const t = createWords({ ...CATALOGUE, ...HEALTH_MESSAGES });
