import { z } from 'zod';
import { DETECTORS, PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { Id, Instant, InstantParam, listParam, pageOf, pageQuery } from '../primitives.ts';
import { Evidence } from './alarms.ts';
import { defineEndpoint, EVERYONE } from './endpoint.ts';
import {
  EquipmentShape,
  MotorSettingsShape,
  MotorTraitsShape,
  PadStateName,
  WiredInputShape,
} from './pump-settings.ts';
import { PlannedRun, Run, RunSourceName } from './runs.ts';

/** The pump this instant, from its last reading. `at` is device time. */
export const PumpNow = z.object({
  at: Instant,
  rpm: z.number(),
  watts: z.number(),
  closedInputs: z.number().int(),
  activeInput: z.number().int(),
  source: RunSourceName,
  expectedSource: RunSourceName,
  expectedRpm: z.number(),
  until: Instant.nullable(),
  lockedBy: z.number().int().nullable(),
  primed: z.boolean().nullable(),
  /** Read from the watts, US gpm with one standard deviation; null where they cannot tell. */
  flow: z.object({ gpm: z.number(), sigmaGpm: z.number() }).nullable(),
  /** The decision's reason as the domain's `Because`. */
  because: z.looseObject({ kind: z.string() }),
});
export type PumpNow = z.infer<typeof PumpNow>;

/** The worst open alarm of a pump, as a mark on its row. */
export const AlarmMark = z.object({
  id: Id,
  detector: z.enum(DETECTORS),
  cause: z.string(),
  /** The alarm's evidence, for the numbers in its title. */
  evidence: Evidence,
  priority: z.enum(PRIORITIES),
  acknowledged: z.boolean(),
  from: Instant,
  open: z.number().int().min(1),
});
export type AlarmMark = z.infer<typeof AlarmMark>;

/** What changes on a row while one watches. `heardAt` is arrival of the last message; `silent` by the device's own interval. */
export const PumpLive = z.object({
  pumpId: Id,
  now: PumpNow.nullable(),
  heardAt: Instant.nullable(),
  silentSince: Instant.nullable(),
  alarm: AlarmMark.nullable(),
});
export type PumpLive = z.infer<typeof PumpLive>;

export const PumpRow = PumpLive.extend({
  padId: Id,
  padName: z.string(),
  pumpName: z.string(),
  /** Null for a homeowner. */
  customerName: z.string().nullable(),
  area: z.string().nullable(),
  zone: z.string(),
  padState: PadStateName,
  serial: z.string().nullable(),
  motorModel: z.string().nullable(),
  intervalSeconds: z.number(),
  settings: MotorSettingsShape,
  traits: MotorTraitsShape,
  inputs: z.array(WiredInputShape),
});
export type PumpRow = z.infer<typeof PumpRow>;

export const FLEET_SORTS = ['worst', 'name', 'rpm', 'watts', 'heard'] as const;
export const FLEET_FILTERS = ['running', 'on-input', 'prime-trouble', 'off-expected', 'silent', 'alarm'] as const;

export const FleetQuery = z.object({
  q: z.string().trim().max(100).optional(),
  area: z.string().max(60).optional(),
  filter: z.enum(FLEET_FILTERS).optional(),
  priority: z.enum(PRIORITIES).optional(),
  sort: z.enum(FLEET_SORTS).default('worst'),
  ...pageQuery(500, 200),
});
export type FleetQuery = z.infer<typeof FleetQuery>;

export const FleetPage = pageOf(PumpRow).extend({
  /** Over everything the person may see that the search and area keep, before `filter` and `priority`. */
  totals: z.object({
    pumps: z.number().int(),
    running: z.number().int(),
    idle: z.number().int(),
    urgent: z.number().int(),
    soon: z.number().int(),
    note: z.number().int(),
    silent: z.number().int(),
  }),
  /** How many rows match the filter in all. */
  matching: z.number().int(),
  areas: z.array(z.string()),
  serverNow: Instant,
});
export type FleetPage = z.infer<typeof FleetPage>;

/** A window of time, half-open, at most 35 days. */
export const WindowQuery = z
  .object({ from: InstantParam, until: InstantParam })
  .refine(({ from, until }) => until > from && until - from <= 35 * 86_400_000, {
    message: 'until must lie after from, by at most 35 days',
    path: ['until'],
  });

export const Strip = z.object({ pumpId: Id, runs: z.array(Run), planned: z.array(PlannedRun) });
export type Strip = z.infer<typeof Strip>;

export const StripsQuery = z
  .object({ pumps: listParam(Id, 100), from: InstantParam, until: InstantParam })
  .refine(({ from, until }) => until > from && until - from <= 8 * 86_400_000, {
    message: 'until must lie after from, by at most 8 days',
    path: ['until'],
  });

/**
 * Columns of equal length for a chart: `t` in ms; null is a gap. Bucketed to at most `width` with the extremes kept; from an
 * hour a point on without the closed inputs, from 35 days on without the expected speed.
 */
export const ReadingSeries = z.object({
  bucketMs: z.number().int().min(0),
  t: z.array(Instant),
  rpm: z.array(z.number().nullable()),
  rpmMin: z.array(z.number().nullable()),
  rpmMax: z.array(z.number().nullable()),
  expectedRpm: z.array(z.number().nullable()),
  watts: z.array(z.number().nullable()),
  wattsMin: z.array(z.number().nullable()),
  wattsMax: z.array(z.number().nullable()),
  closedInputs: z.array(z.number().int().nullable()),
  /** Part of the window that readings cover, 0 to 1. */
  coverage: z.number(),
});
export type ReadingSeries = z.infer<typeof ReadingSeries>;

export const PumpDetail = PumpRow.extend({
  purpose: z.enum(['filter', 'booster', 'spa', 'feature']),
  street: z.string(),
  equipment: z.array(EquipmentShape),
  poolGallons: z.number().nullable(),
  turnoversPerDay: z.number().nullable(),
  technicianName: z.string().nullable(),
  motor: z
    .object({
      model: z.string(),
      serial: z.string(),
      frame: z.string(),
      totalHorsepower: z.number(),
      serviceFactor: z.number(),
      installedAt: Instant.nullable(),
    })
    .nullable(),
  wetEndModel: z.string().nullable(),
  device: z
    .object({ serial: z.string(), firmware: z.string().nullable(), state: z.enum(['online', 'lost', 'never']) })
    .nullable(),
  nominalVolts: z.number().nullable(),
  /** Learnt facts a person may want to see beside the chart. */
  learning: z.boolean(),
  /** From when the reader may see this pump: start of the ownership for a homeowner. */
  visibleFrom: Instant,
  otherPumps: z.array(z.object({ id: Id, name: z.string(), monitored: z.boolean() })),
});
export type PumpDetail = z.infer<typeof PumpDetail>;

const PumpParams = z.object({ pumpId: Id });

export const pumpEndpoints = {
  list: defineEndpoint({
    method: 'GET',
    path: '/api/pumps',
    summary: 'Fleet rows, worst first unless asked otherwise',
    roles: EVERYONE,
    query: FleetQuery,
    response: FleetPage,
  }),
  strips: defineEndpoint({
    method: 'GET',
    path: '/api/strips',
    summary: 'Runs of several pumps in one window',
    roles: EVERYONE,
    query: StripsQuery,
    response: z.object({ strips: z.array(Strip), serverNow: Instant }),
  }),
  read: defineEndpoint({
    method: 'GET',
    path: '/api/pumps/:pumpId',
    summary: 'One pump',
    roles: EVERYONE,
    params: PumpParams,
    response: PumpDetail,
  }),
  runs: defineEndpoint({
    method: 'GET',
    path: '/api/pumps/:pumpId/runs',
    summary: 'Runs of a pump in a window, and those planned ahead of now',
    roles: EVERYONE,
    params: PumpParams,
    query: WindowQuery,
    response: z.object({ runs: z.array(Run), planned: z.array(PlannedRun) }),
  }),
  readings: defineEndpoint({
    method: 'GET',
    path: '/api/pumps/:pumpId/readings',
    summary: 'Readings of a pump in a window as chart columns',
    roles: EVERYONE,
    params: PumpParams,
    query: z
      .object({
        from: InstantParam,
        until: InstantParam,
        width: z.coerce.number().int().min(10).max(4000).default(1000),
      })
      .refine(({ from, until }) => until > from && until - from <= 800 * 86_400_000, {
        message: 'until must lie after from, by at most 800 days',
        path: ['until'],
      }),
    response: ReadingSeries,
  }),
};
