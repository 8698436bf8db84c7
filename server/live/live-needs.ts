import type { IncomingMessage } from 'node:http';
import type { Logger } from 'pino';
import type { Actor } from '#server/context.ts';
import type { Changes } from '#shared/contract/http/changes.ts';
import type { Sight } from './compose-news.ts';

/** What live connections need of the rest of the server. */
export type LiveNeeds = {
  readonly log: Logger;
  readonly now: () => number;
  readonly publicUrl: string;
  /** Who holds the session of an upgrade request; undefined for nobody. */
  readonly authenticate: (request: IncomingMessage) => Promise<Actor | undefined>;
  /** Calls back for every session that ends; what is returned stops that. */
  readonly onSessionEnded: (listener: (sessionId: string) => void) => () => void;
  /** What changed in a company since a cursor, as its manager reads it; without a cursor only the present one. */
  readonly readChanges: (companyId: string, since: string | undefined) => Promise<Changes>;
  /** The pumps a person may see now; `all` for staff. */
  readonly listVisiblePumps: (actor: Actor) => Promise<Sight>;
  /** An alarm as a homeowner reads it: without what staff say to one another. */
  readonly hideStaffWords: (alarm: Changes['alarms'][number]) => Changes['alarms'][number];
};
