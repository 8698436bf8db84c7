import { createHmac } from 'node:crypto';
import pg from 'pg';

/** The two logins the server works with; a third, the owner, is the one in DATABASE_URL. */
export const DATABASE_ROLES = ['millrace_app', 'millrace_machine'] as const;
export type DatabaseRole = (typeof DATABASE_ROLES)[number];

/** PostgreSQL's codes: wrong password, role exists, and two that a concurrent `create role` can end with. */
const WRONG_PASSWORD = ['28P01', '28000'];
const ALREADY_MADE = ['42710', '23505', 'XX000'];
const NOT_ALLOWED = '42501';

/**
 * The address of the same database for one of the roles. Its password follows from the owner's (HMAC-SHA256, so that
 * it does not give the owner's away): only DATABASE_URL is configured.
 */
export function deriveRoleUrl(databaseUrl: string, role: DatabaseRole): string {
  const url = new URL(databaseUrl);
  if (url.password === '')
    throw new Error('DATABASE_URL names no password; the passwords of two roles follow from it.');
  const key = decodeURIComponent(url.password);
  url.password = createHmac('sha256', key).update(`millrace database role ${role}`).digest('base64url');
  url.username = role;
  return url.href;
}

/** Makes the roles where they are missing. Roles belong to the whole cluster, so another database may be first. */
export async function ensureDatabaseRoles(owner: pg.Client, databaseUrl: string): Promise<void> {
  for (const role of DATABASE_ROLES) {
    const roleUrl = deriveRoleUrl(databaseUrl, role);
    const { rowCount } = await owner.query('select from pg_roles where rolname = $1', [role]);
    if (rowCount === 0) await createRole(owner, role, roleUrl);
    if (await isRefused(roleUrl)) await setPassword(owner, role, roleUrl);
  }
}

async function createRole(owner: pg.Client, role: DatabaseRole, roleUrl: string): Promise<void> {
  try {
    await owner.query(`create role ${role} login nosuperuser password ${passwordLiteral(roleUrl)}`);
  } catch (error) {
    if (codeOf(error) === NOT_ALLOWED) throw lacksCreateRole(owner);
    if (!ALREADY_MADE.includes(codeOf(error) ?? '')) throw error;
  }
}

/** After the owner's password was changed. */
async function setPassword(owner: pg.Client, role: DatabaseRole, roleUrl: string): Promise<void> {
  try {
    await owner.query(`alter role ${role} login password ${passwordLiteral(roleUrl)}`);
  } catch (error) {
    throw codeOf(error) === NOT_ALLOWED ? lacksCreateRole(owner) : error;
  }
}

async function isRefused(roleUrl: string): Promise<boolean> {
  const client = new pg.Client({ connectionString: roleUrl });
  try {
    await client.connect();
    return false;
  } catch (error) {
    if (WRONG_PASSWORD.includes(codeOf(error) ?? '')) return true;
    throw error;
  } finally {
    await client.end();
  }
}

const passwordLiteral = (roleUrl: string) => pg.escapeLiteral(new URL(roleUrl).password);

const codeOf = (error: unknown) => (error instanceof pg.DatabaseError ? error.code : undefined);

const lacksCreateRole = (owner: pg.Client) =>
  new Error(
    `The login of DATABASE_URL may not make roles. As a superuser, type: ALTER ROLE ${pg.escapeIdentifier(owner.user ?? 'owner')} CREATEROLE`,
  );
