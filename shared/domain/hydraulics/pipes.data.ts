/** Inside diameters of PVC Schedule 40 pipe, inches by nominal size. Source: HI engineering data book, ppp-plas_sch_pipe-4. */
export const PVC_SCHEDULE_40_INCHES = { '1.5': 1.601, '2': 2.058, '2.5': 2.457, '3': 3.055 } as const;
export type NominalPipe = keyof typeof PVC_SCHEDULE_40_INCHES;

/**
 * Largest velocities, ft/s: suction 6, return 8. From memory (commonly quoted with the California Energy Code
 * §150.0(p)); one county's code reads 6 and 10 for public pools (Pima County AZ 8.32.160).
 */
export const VELOCITY_LIMIT_FEET_PER_SECOND = { suction: 6, return: 8 } as const;
export type PipeSide = keyof typeof VELOCITY_LIMIT_FEET_PER_SECOND;
