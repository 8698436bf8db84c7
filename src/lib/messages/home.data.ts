export const HOME_MESSAGES = {} as const;
