export const PUMP_MESSAGES = {} as const;
