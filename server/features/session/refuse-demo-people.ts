import type pg from 'pg';
import { DEMO_PASSWORD } from '#server/db/seed/seed-demo.ts';
import { asMachine } from '#server/db/transaction.ts';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import { isPassword } from './password.ts';
import { findPersonByEmail } from './session-repository.ts';

/** Stops a start in production where somebody of the demo company can still sign in with the printed password. */
export async function refuseDemoPeople(machine: pg.Pool): Promise<void> {
  for (const { email } of LARKMOOR.people) {
    const person = await asMachine(machine, (db) => findPersonByEmail(db, email));
    if (person === undefined || person.disabledAt !== null) continue;
    if (!(await isPassword(person.passwordHash, DEMO_PASSWORD))) continue;
    throw new Error(
      `This database holds the demo company: ${email} can sign in with the password printed in the manual. ` +
        'Remedy: use an empty database for work, or start the demo with: npm start',
    );
  }
}
