import { z } from 'zod';
import { PRIORITIES } from '#shared/domain/detectors/detector.ts';
import {
  type FigureLimits,
  FOLDED_DETECTORS,
  limitsOfFigure,
  listFigures,
} from '#shared/domain/detectors/figure-limits.ts';
import type { RuleSettings } from '#shared/domain/detectors/rule-settings.ts';
import { Id, Instant } from '../primitives.ts';
import { defineEndpoint, MANAGERS, STAFF } from './endpoint.ts';

const UNIT_WORDS: Readonly<Record<FigureLimits['unit'], string>> = {
  s: ' s',
  min: ' min',
  h: ' h',
  d: ' days',
  '°C': ' °C',
  rpm: ' rpm',
  share: ' (1 = 100 %)',
  times: '',
};

const allowed = ({ least, most, unit, whole }: FigureLimits): string =>
  `${whole ? 'a whole number' : 'a number'} from ${least} to ${most}${UNIT_WORDS[unit]}`;

function figureShape(figure: string) {
  const limits = limitsOfFigure(figure);
  const error = `takes ${allowed(limits)}`;
  const number = z.number({ error }).min(limits.least, { error }).max(limits.most, { error });
  return (limits.whole ? number.int({ error }) : number).optional();
}

const named =
  (what: string, names: readonly string[]) => (issue: { readonly code?: string; readonly keys?: unknown }) =>
    issue.code === 'unrecognized_keys' ? `has no such ${what}; there are ${names.join(', ')}` : undefined;

function ruleShape(detector: (typeof FOLDED_DETECTORS)[number]) {
  const figures = listFigures(detector).map(([name]) => name);
  return z
    .strictObject(
      {
        enabled: z.boolean({ error: 'is true or false' }).optional(),
        priority: z.enum(PRIORITIES, { error: `is one of ${PRIORITIES.join(', ')}` }).optional(),
        figures: z
          .strictObject(Object.fromEntries(figures.map((name) => [name, figureShape(name)])), {
            error: named('figure', figures),
          })
          .optional(),
      },
      { error: named('field', ['enabled', 'priority', 'figures']) },
    )
    .optional();
}

/** Every shape is made from the defaults, which is what the type says. */
const parseSettings = (value: unknown): RuleSettings => value as RuleSettings;

/**
 * What is set otherwise than the defaults, by detector; what is left out holds as it is. A refusal names the figure and
 * what it takes.
 */
export const RuleSettingsShape = z
  .strictObject(Object.fromEntries(FOLDED_DETECTORS.map((detector) => [detector, ruleShape(detector)])), {
    error: named('rule', FOLDED_DETECTORS),
  })
  .transform(parseSettings);

/** Whom settings are for; the most specific wins, figure by figure. */
export const RuleScope = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('company') }),
  z.strictObject({ kind: z.literal('model'), modelId: Id }),
  z.strictObject({ kind: z.literal('pump'), pumpId: Id }),
]);
export type RuleScope = z.infer<typeof RuleScope>;

/** As stored: read again by the rules, which leave out what they do not know. */
export const StoredRules = z.record(
  z.string(),
  z.object({
    enabled: z.boolean().optional(),
    priority: z.enum(PRIORITIES).optional(),
    figures: z.record(z.string(), z.number()).optional(),
  }),
);
export type StoredRules = z.infer<typeof StoredRules>;

export const RuleLayer = z.object({
  scope: RuleScope,
  /** The company, the motor model, or the pad and pump. */
  name: z.string(),
  rules: StoredRules,
  /** What the company and, for a pump, its motor model set: what holds here where `rules` say nothing. */
  inherited: StoredRules,
  /** 0 = nothing was ever set here. */
  version: z.number().int(),
  changedAt: Instant.nullable(),
  changedBy: z.string().nullable(),
});
export type RuleLayer = z.infer<typeof RuleLayer>;

export const RuleLayers = z.object({
  company: RuleLayer,
  /** Every motor model of the company, whether anything is set for it or not. */
  models: z.array(RuleLayer),
  /** Pumps with settings of their own. */
  pumps: z.array(RuleLayer),
  /** For a caller that has no copy of the rules: what can be set, and within which limits. */
  catalogue: z.array(
    z.object({
      detector: z.enum(FOLDED_DETECTORS),
      figures: z.array(
        z.object({
          name: z.string(),
          usual: z.number(),
          unit: z.string(),
          least: z.number(),
          most: z.number(),
          whole: z.boolean(),
        }),
      ),
    }),
  ),
});
export type RuleLayers = z.infer<typeof RuleLayers>;

export const SetRules = z.strictObject({ rules: RuleSettingsShape });

const change = { method: 'PUT', roles: MANAGERS, body: SetRules, response: RuleLayer, ifMatch: true } as const;
const read = { method: 'GET', roles: STAFF, response: RuleLayer } as const;
const ModelParams = z.object({ modelId: Id });
const PumpParams = z.object({ pumpId: Id });

export const ruleEndpoints = {
  list: defineEndpoint({
    method: 'GET',
    path: '/api/rules',
    summary: 'What the company, its motor models and pumps set otherwise than the rules’ defaults',
    roles: STAFF,
    response: RuleLayers,
  }),
  readCompany: defineEndpoint({ ...read, path: '/api/rules/company', summary: 'Rules of the company' }),
  readModel: defineEndpoint({
    ...read,
    path: '/api/rules/models/:modelId',
    summary: 'Rules of a motor model',
    params: ModelParams,
  }),
  readPump: defineEndpoint({
    ...read,
    path: '/api/rules/pumps/:pumpId',
    summary: 'Rules of a pump',
    params: PumpParams,
  }),
  setCompany: defineEndpoint({ ...change, path: '/api/rules/company', summary: 'Set rules for the company' }),
  setModel: defineEndpoint({
    ...change,
    path: '/api/rules/models/:modelId',
    summary: 'Set rules for a motor model',
    params: ModelParams,
  }),
  setPump: defineEndpoint({
    ...change,
    path: '/api/rules/pumps/:pumpId',
    summary: 'Set rules for a pump',
    params: PumpParams,
  }),
};
