import { z } from 'zod';
import { SOURCES } from '#shared/domain/readings/reading.ts';
import { Instant } from '../primitives.ts';

export const RunSourceName = z.enum([...SOURCES, 'no-data', 'unknown']);
export type RunSourceName = z.infer<typeof RunSourceName>;

/** A run as screens draw it. `to` is null while it is open. Speeds in rpm, energy in watt-hours. */
export const Run = z.object({
  from: Instant,
  to: Instant.nullable(),
  source: RunSourceName,
  expectedSource: RunSourceName,
  closedInputs: z.number().int().min(0).max(255),
  activeInput: z.number().int().min(0).max(8),
  expectedRpm: z.number(),
  meanRpm: z.number(),
  meanWatts: z.number(),
  wattHours: z.number(),
  coveredMs: z.number(),
  gallons: z.number().nullable(),
  flags: z.array(z.enum(['off-expected', 'unprimed', 'ramp-only', 'late-corrected'])),
});
export type Run = z.infer<typeof Run>;

/** A run expected ahead of now. */
export const PlannedRun = z.object({
  from: Instant,
  to: Instant,
  source: RunSourceName,
  closedInputs: z.number().int(),
  activeInput: z.number().int(),
  rpm: z.number(),
});
export type PlannedRun = z.infer<typeof PlannedRun>;
