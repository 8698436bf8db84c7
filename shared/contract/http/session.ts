import { z } from 'zod';
import { Id, Instant, Role } from '../primitives.ts';
import { defineEndpoint, EVERYONE } from './endpoint.ts';

export const Preferences = z.object({
  units: z.enum(['us', 'si']).default('us'),
  theme: z.enum(['system', 'light', 'dark']).default('system'),
  clock: z.enum(['locale', '12', '24']).default('locale'),
});
export type Preferences = z.infer<typeof Preferences>;

export const CreateSession = z.object({
  email: z
    .email()
    .max(254)
    .transform((text) => text.toLowerCase()),
  password: z.string().min(1).max(200),
});
export type CreateSession = z.infer<typeof CreateSession>;

export const Session = z.object({
  user: z.object({ id: Id, name: z.string(), initials: z.string(), email: z.string(), role: Role }),
  company: z.object({ id: Id, name: z.string(), zone: z.string(), phone: z.string().nullable() }),
  preferences: Preferences,
  /** When the short access token ends; the browser renews before that. */
  accessUntil: Instant,
  serverNow: Instant,
});
export type Session = z.infer<typeof Session>;

export const UpdatePreferences = z.object({
  units: z.enum(['us', 'si']).optional(),
  theme: z.enum(['system', 'light', 'dark']).optional(),
  clock: z.enum(['locale', '12', '24']).optional(),
});

export const sessionEndpoints = {
  create: defineEndpoint({
    method: 'POST',
    path: '/api/session',
    summary: 'Sign in',
    roles: 'public',
    status: 201,
    body: CreateSession,
    response: Session,
  }),
  renew: defineEndpoint({
    method: 'POST',
    path: '/api/session/renewal',
    summary: 'Renew the session from its refresh cookie',
    roles: 'public',
    response: Session,
  }),
  read: defineEndpoint({
    method: 'GET',
    path: '/api/session',
    summary: 'Who is signed in',
    roles: EVERYONE,
    response: Session,
  }),
  remove: defineEndpoint({
    method: 'DELETE',
    path: '/api/session',
    summary: 'Sign out',
    roles: 'public',
    status: 204,
    response: z.undefined(),
  }),
  updatePreferences: defineEndpoint({
    method: 'PATCH',
    path: '/api/session/preferences',
    summary: "Change one's own preferences",
    roles: EVERYONE,
    body: UpdatePreferences,
    response: Session,
  }),
};
