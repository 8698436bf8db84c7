import { z } from 'zod';
import { Id, Instant } from '../primitives.ts';
import { defineEndpoint, STAFF } from './endpoint.ts';

/** What is held equal: the hours the pump runs, or the water it moves; then with the old flow, US gpm. */
const Basis = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('same-hours') }),
  z.object({
    kind: z.literal('same-volume'),
    gpm: z.number().positive().max(500),
    sigmaGpm: z.number().min(0).max(250),
  }),
]);

/**
 * What the pump used before. `clamped`: the old motor’s watts, measured before it left, with one sigma of that meter;
 * `logged`: recorded over days; `nameplate`: reckoned from the old plate (total horsepower at full load, 15 % as one sigma).
 */
export const BaselineShape = z.discriminatedUnion('kind', [
  z.object({
    kind: z.enum(['clamped', 'logged']),
    watts: z.number().positive().max(10_000),
    sigmaWatts: z.number().min(0).max(5_000),
    basis: Basis,
    note: z.string().trim().max(500).default(''),
  }),
  z.object({
    kind: z.literal('nameplate'),
    horsepower: z.number().positive().max(10),
    serviceFactor: z.number().min(1).max(2),
    basis: Basis,
    note: z.string().trim().max(500).default(''),
  }),
]);
export type BaselineShape = z.infer<typeof BaselineShape>;

/** The baseline as stated, with the watts it comes to. `version` is for If-Match; 0 where none is stated. */
export const PumpBaseline = z.object({
  baseline: BaselineShape.nullable(),
  watts: z.number().nullable(),
  sigmaWatts: z.number().nullable(),
  statedAt: Instant.nullable(),
  statedBy: z.string().nullable(),
  version: z.number().int(),
});
export type PumpBaseline = z.infer<typeof PumpBaseline>;

const PumpParams = z.object({ pumpId: Id });

export const baselineEndpoints = {
  read: defineEndpoint({
    method: 'GET',
    path: '/api/pumps/:pumpId/baseline',
    summary: 'What the pump used before',
    roles: STAFF,
    params: PumpParams,
    response: PumpBaseline,
  }),
  replace: defineEndpoint({
    method: 'PUT',
    path: '/api/pumps/:pumpId/baseline',
    summary: 'State what the pump used before, or that nobody knows (null)',
    roles: STAFF,
    params: PumpParams,
    body: z.object({ baseline: BaselineShape.nullable() }),
    response: PumpBaseline,
    ifMatch: true,
  }),
};
