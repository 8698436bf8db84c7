import type pg from 'pg';
import { asPerson } from './db/transaction.ts';
import { hideStaffWords } from './features/alarms/index.ts';
import { listChanges, listNoChanges } from './features/changes/index.ts';
import { listOwnedPumps } from './features/pumps/index.ts';
import type { LiveNeeds } from './live/live-needs.ts';

/** Nobody: the reader of a company's news, which are cut for each person before they leave. */
const NOBODY = '00000000-0000-0000-0000-000000000000';

/** What live connections read, and what each person may see of it, both through the database's own rules. */
export function createLiveSight(
  app: pg.Pool,
  now: () => number,
): Pick<LiveNeeds, 'readChanges' | 'listVisiblePumps' | 'hideStaffWords'> {
  return {
    readChanges: (companyId, since) => {
      const wholeCompany = { companyId, userId: NOBODY, role: 'manager' as const, customerId: undefined };
      return asPerson(app, wholeCompany, 'read', (db) => {
        const asking = { db, actor: wholeCompany, now: now() };
        return since === undefined ? listNoChanges(asking) : listChanges(asking, since);
      });
    },
    listVisiblePumps: async (actor) =>
      actor.role === 'homeowner' ? asPerson(app, actor, 'read', listOwnedPumps) : 'all',
    hideStaffWords,
  };
}
