import { and, eq, isNull, sql } from 'drizzle-orm';
import { newId } from '#server/db/new-id.ts';
import { auditEntries } from '#server/db/schema/audit-entries.ts';
import { companies } from '#server/db/schema/companies.ts';
import { refreshTokens } from '#server/db/schema/refresh-tokens.ts';
import { users } from '#server/db/schema/users.ts';
import type { Transaction } from '#server/db/transaction.ts';

const personColumns = {
  userId: users.id,
  companyId: users.companyId,
  customerId: users.customerId,
  email: users.email,
  name: users.name,
  role: users.role,
  preferences: users.preferences,
  disabledAt: users.disabledAt,
  companyName: companies.name,
  companyZone: companies.zone,
  companyPhone: companies.phone,
};

export type Person = Awaited<ReturnType<typeof findPersonById>> & object;

/** By e-mail address, with the hash of their password: for the machine role, when nobody is signed in yet. */
export async function findPersonByEmail(db: Transaction, email: string) {
  const [person] = await db
    .select({ ...personColumns, passwordHash: users.passwordHash })
    .from(users)
    .innerJoin(companies, eq(companies.id, users.companyId))
    .where(eq(sql`lower(${users.email})`, email.toLowerCase()));
  return person;
}

export async function findPersonById(db: Transaction, userId: string) {
  const [person] = await db
    .select(personColumns)
    .from(users)
    .innerJoin(companies, eq(companies.id, users.companyId))
    .where(eq(users.id, userId));
  return person;
}

export async function savePreferences(db: Transaction, userId: string, changed: object): Promise<void> {
  await db
    .update(users)
    .set({ preferences: sql`${users.preferences} || ${JSON.stringify(changed)}::jsonb` })
    .where(eq(users.id, userId));
}

export type RefreshRow = {
  readonly companyId: string;
  readonly userId: string;
  readonly familyId: string;
  readonly signedInAt: Date;
  readonly tokenHash: Buffer;
  readonly issuedAt: Date;
  readonly expiresAt: Date;
};

export const addRefreshToken = (db: Transaction, row: RefreshRow) =>
  db.insert(refreshTokens).values({ id: newId(), ...row });

/** Locks the row: two renewals with one token are decided one after the other. */
export async function findRefreshToken(db: Transaction, tokenHash: Buffer) {
  const [row] = await db.select().from(refreshTokens).where(eq(refreshTokens.tokenHash, tokenHash)).for('update');
  return row;
}

export const markRefreshTokenUsed = (db: Transaction, id: string, usedAt: Date) =>
  db.update(refreshTokens).set({ usedAt }).where(eq(refreshTokens.id, id));

export const revokeFamily = (db: Transaction, familyId: string, revokedAt: Date) =>
  db
    .update(refreshTokens)
    .set({ revokedAt })
    .where(and(eq(refreshTokens.familyId, familyId), isNull(refreshTokens.revokedAt)));

export type SessionAudit = {
  readonly companyId: string;
  readonly userId: string;
  readonly name: string | undefined;
  readonly action: 'session.created' | 'session.refused' | 'session.replayed' | 'session.ended';
  readonly at: Date;
  readonly address: string | undefined;
  readonly requestId: string;
};

/** Refused attempts are written down under the account they were for, though it was not its owner who acted. */
export const auditSession = (db: Transaction, { userId, name, address, ...entry }: SessionAudit) =>
  db.insert(auditEntries).values({
    id: newId(),
    ...entry,
    actorUserId: entry.action === 'session.refused' ? null : userId,
    actorName: name ?? null,
    subjectKind: 'user',
    subjectId: userId,
    address: address ?? null,
  });
