/** What a rule makes of this instant. Numbers, so that judging a reading allocates nothing. */
export const NORMAL = 0;
export const ABNORMAL = 1;
/** The readings say nothing either way: a pump that rests, ramps or is still being learnt. */
export const UNJUDGED = 2;

export type Judgement = typeof NORMAL | typeof ABNORMAL | typeof UNJUDGED;
