import type { z } from 'zod';
import type { Role } from '../primitives.ts';

type Shape = z.ZodType;

/**
 * One endpoint as data: the server mounts it, the browser calls it, the interface description lists it.
 * `path` has `:name` parameters. `roles` says who may call it; `public` needs no session.
 */
export type Endpoint = {
  readonly method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  readonly path: `/api/${string}`;
  readonly summary: string;
  readonly roles: readonly Role[] | 'public';
  readonly status?: 200 | 201 | 204;
  readonly params?: Shape;
  readonly query?: Shape;
  readonly body?: Shape;
  readonly response: Shape;
  /** A change that needs `If-Match` with the ETag of what was read. */
  readonly ifMatch?: boolean;
  /** A creation that honours `Idempotency-Key`. */
  readonly idempotent?: boolean;
};

/** @example defineEndpoint({ method: 'GET', path: '/api/health', summary: '…', roles: 'public', response: Health }) */
export const defineEndpoint = <const E extends Endpoint>(endpoint: E): E => endpoint;

export const EVERYONE: readonly Role[] = ['manager', 'technician', 'homeowner'];
export const STAFF: readonly Role[] = ['manager', 'technician'];
export const MANAGERS: readonly Role[] = ['manager'];
