import { chownSync, readFileSync } from 'node:fs';
import { runCommand } from './run-command.mjs';
import { refusal } from './say.mjs';

/** @typedef {{ readonly name: string, readonly uid: number, readonly gid: number }} Account */

/**
 * The account that runs PostgreSQL, which refuses to run as root: Debian's own `postgres` when we are root,
 * undefined (ourselves) when we are not.
 *
 * @param {{ isRoot?: boolean, passwd?: string }} [machine]
 * @returns {Account | undefined}
 */
export function findDatabaseAccount({ isRoot = process.getuid?.() === 0, passwd } = {}) {
  if (!isRoot) return undefined;
  const lines = (passwd ?? readFileSync('/etc/passwd', 'utf8')).split('\n');
  const [name, , uid, gid] = lines.map((line) => line.split(':')).find((fields) => fields[0] === 'postgres') ?? [];
  if (name) return { name, uid: Number(uid), gid: Number(gid) };
  throw refusal(
    'PostgreSQL never runs as root and this machine has no user "postgres" to run it as.\n' +
      'Type: adduser --system --group postgres   (or start Millrace as an ordinary user)',
  );
}

/**
 * Whether the account may pass through a folder and everything above it. The kernel is asked, not the mode bits.
 *
 * @param {Account | undefined} account
 * @param {string} folder
 */
export async function canReach(account, folder) {
  const { code } = await runCommand('test', ['-x', folder], { account, cwd: '/' });
  return code === 0;
}

/** @param {Account | undefined} account @param {string} path */
export function giveTo(account, path) {
  if (account) chownSync(path, account.uid, account.gid);
}
