import { CATALOGUE } from './catalogue.ts';
import { createWords } from './create-words.ts';
import { TARIFFS_MESSAGES } from './tariffs.data.ts';

/** `t` of the pages about tariffs. */
export const t = createWords({ ...CATALOGUE, ...TARIFFS_MESSAGES });
