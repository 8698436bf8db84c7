import { z } from 'zod';
import { Id, Instant, pageOf, pageQuery } from '../primitives.ts';
import { defineEndpoint, MANAGERS } from './endpoint.ts';

export const Serial = z
  .string()
  .regex(
    /^[A-Z0-9][A-Z0-9-]{5,31}$/,
    'a serial has 6 to 32 capital letters, digits and hyphens and starts with a letter or digit',
  );

export const Device = z.object({
  id: Id,
  serial: z.string(),
  pumpId: Id.nullable(),
  padName: z.string().nullable(),
  intervalSeconds: z.number().int(),
  state: z.enum(['online', 'lost', 'never']),
  firmware: z.string().nullable(),
  heardAt: Instant.nullable(),
  secretSetAt: Instant.nullable(),
  revokedAt: Instant.nullable(),
  refused: z.number().int(),
  version: z.number().int(),
});
export type Device = z.infer<typeof Device>;

export const CreateDevice = z.object({
  serial: Serial,
  pumpId: Id.optional(),
  intervalSeconds: z.number().int().min(5).max(60).default(10),
});

export type CreateDevice = z.infer<typeof CreateDevice>;

/** The secret is shown in this answer and never again. */
export const DeviceWithSecret = Device.extend({ secret: z.string() });

export const Refusal = z.object({ receivedAt: Instant, reason: z.string(), detail: z.string(), sample: z.string() });

const DeviceParams = z.object({ deviceId: Id });

export const deviceEndpoints = {
  list: defineEndpoint({
    method: 'GET',
    path: '/api/devices',
    summary: 'Telemetry units of the company',
    roles: MANAGERS,
    query: z.object({ q: z.string().trim().max(100).optional(), ...pageQuery(500, 100) }),
    response: pageOf(Device),
  }),
  create: defineEndpoint({
    method: 'POST',
    path: '/api/devices',
    summary: 'Register a telemetry unit; answers its secret once',
    roles: MANAGERS,
    status: 201,
    body: CreateDevice,
    response: DeviceWithSecret,
    idempotent: true,
  }),
  rotateSecret: defineEndpoint({
    method: 'POST',
    path: '/api/devices/:deviceId/secret',
    summary: 'Give a unit a new secret; its open connection is closed',
    roles: MANAGERS,
    params: DeviceParams,
    response: DeviceWithSecret,
    ifMatch: true,
  }),
  revokeSecret: defineEndpoint({
    method: 'DELETE',
    path: '/api/devices/:deviceId/secret',
    summary: "Revoke a unit's secret; its open connection is closed",
    roles: MANAGERS,
    params: DeviceParams,
    response: Device,
    ifMatch: true,
  }),
  refusals: defineEndpoint({
    method: 'GET',
    path: '/api/devices/:deviceId/refusals',
    summary: 'What was refused from a unit and why',
    roles: MANAGERS,
    params: DeviceParams,
    query: z.object(pageQuery(200, 50)),
    response: pageOf(Refusal),
  }),
};
