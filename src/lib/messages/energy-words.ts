import { CATALOGUE } from './catalogue.ts';
import { createWords } from './create-words.ts';
import { ENERGY_MESSAGES } from './energy.data.ts';
import { PROGRAM_MESSAGES } from './program.data.ts';

/** `t` of what energy costs and what would cost less. */
export const t = createWords({ ...CATALOGUE, ...ENERGY_MESSAGES, ...PROGRAM_MESSAGES });
