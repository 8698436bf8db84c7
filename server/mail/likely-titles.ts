/** What stands over an alarm's likely causes: where nothing singles one out, they are called a guess. */
export const LIKELY_TITLES = {
  certain: 'Likely causes',
  guess: 'Possible causes: a guess, the readings do not single one out',
} as const;
