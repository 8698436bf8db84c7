export const ALARM_MESSAGES = {} as const;
