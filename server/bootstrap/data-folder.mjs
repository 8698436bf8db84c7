import { createHash } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readdirSync, readFileSync, realpathSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { canReach, giveTo } from './account.mjs';
import { refusal, say } from './say.mjs';

/** The file that says a folder is ours: nothing is ever deleted without it. */
export const MARKER = 'millrace-data-folder.txt';

/** A Unix socket's address holds 108 bytes with its closing zero (unix(7)). */
const LONGEST_SOCKET_PATH = 107;

/** @param {string} folder */
export function isOurs(folder) {
  return existsSync(join(folder, MARKER));
}

/** @param {string} folder */
function mark(folder) {
  writeFileSync(join(folder, MARKER), 'Millrace keeps its data here. "npm run reset" deletes it.\n');
}

/** Twelve letters that stand for a path. @param {string} path */
export function shortNameOf(path) {
  return createHash('sha256').update(path).digest('hex').slice(0, 12);
}

/**
 * Makes the data folder where it is missing and returns its real path. A folder that holds something else is refused.
 *
 * @param {string} folder
 */
export function openDataFolder(folder) {
  try {
    mkdirSync(folder, { recursive: true });
    if (!isOurs(folder) && readdirSync(folder).length > 0) {
      throw refusal(
        `${folder} holds something that is not Millrace's. Choose an empty folder: MILLRACE_DATA=… npm start`,
      );
    }
    mkdirSync(join(folder, 'logs'), { recursive: true, mode: 0o700 });
    if (!isOurs(folder)) mark(folder);
    // Others may pass through to the database folder, which is its account's own, and see nothing on the way.
    chmodSync(folder, 0o711);
  } catch (error) {
    const code = /** @type {NodeJS.ErrnoException} */ (error).code;
    if (code === undefined) throw error;
    throw refusal(
      `The data folder ${folder} cannot be used (${code}). If another user made it, start Millrace as that user; ` +
        'otherwise choose another: MILLRACE_DATA=… npm start',
    );
  }
  return realpathSync(folder);
}

/** The file that remembers a database folder that lies outside the data folder. @param {string} dataFolder */
const noteOf = (dataFolder) => join(dataFolder, 'database-folder.txt');

/** Where a data folder's database lies, undefined when it never had one. @param {string} dataFolder */
export function findDatabaseFolder(dataFolder) {
  if (existsSync(noteOf(dataFolder))) return readFileSync(noteOf(dataFolder), 'utf8').trim();
  const inside = join(dataFolder, 'postgres');
  return existsSync(inside) ? inside : undefined;
}

/**
 * The database folder of a data folder, made where it is missing: inside it, or, when the account that runs PostgreSQL
 * cannot get there (root's home folder is closed to everybody else), in a place of its own that the data folder
 * remembers.
 *
 * @param {string} dataFolder
 * @param {import('./account.mjs').Account | undefined} account
 * @param {{ elsewhere?: string, isReachable?: boolean }} [machine] elsewhere: parent of the folders that lie outside
 */
export async function openDatabaseFolder(dataFolder, account, machine = {}) {
  const { elsewhere = '/var/lib/millrace', isReachable = await canReach(account, dataFolder) } = machine;
  const known = findDatabaseFolder(dataFolder);
  const folder = known ?? join(isReachable ? dataFolder : join(elsewhere, shortNameOf(dataFolder)), 'postgres');
  const isInside = folder === join(dataFolder, 'postgres');
  if (isInside && !isReachable) {
    throw refusal(
      `The user "${account?.name}", who runs PostgreSQL, can no longer reach ${dataFolder}. ` +
        'Move the folder back, or open the way to it with chmod o+x on the folders above it.',
    );
  }
  if (!isInside) {
    mkdirSync(join(folder, '..'), { recursive: true, mode: 0o711 });
    mark(join(folder, '..'));
    writeFileSync(noteOf(dataFolder), `${folder}\n`);
    say(`  ${dataFolder} is closed to PostgreSQL's user "${account?.name}": the database lies in ${folder}`);
  }
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  giveTo(account, folder);
  return folder;
}

/**
 * Where PostgreSQL's Unix socket goes: beside the database, where no other PostgreSQL looks; nowhere ('') when that
 * path is too long for a socket. Millrace itself speaks to 127.0.0.1.
 *
 * @param {string} databaseFolder
 * @param {number} port
 */
export function chooseSocketFolder(databaseFolder, port) {
  const folder = join(databaseFolder, 'socket');
  return Buffer.byteLength(join(folder, `.s.PGSQL.${port}`)) <= LONGEST_SOCKET_PATH ? folder : '';
}
