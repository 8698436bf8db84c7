import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { refusal } from './say.mjs';

/** Random, made once for a data folder, known to nobody else. Hexadecimal, so that they need no quoting anywhere. */
const NAMES = /** @type {const} */ (['superuserPassword', 'ownerPassword', 'tokenKey', 'deviceKey']);

/** @typedef {Record<typeof NAMES[number], string>} Secrets */

/** @param {string} file @returns {Partial<Secrets>} */
function readSecrets(file) {
  if (!existsSync(file)) return {};
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    throw refusal(
      `${file} cannot be read (${error instanceof Error ? error.message : error}). It holds the database's passwords: ` +
        'restore it from a copy, or start the demo afresh with: npm run reset',
    );
  }
}

/**
 * The secrets of a data folder; those it lacks are made and kept, readable by its owner only.
 *
 * @param {string} dataFolder
 * @returns {Secrets}
 */
export function getSecrets(dataFolder) {
  const file = join(dataFolder, 'secrets.json');
  const known = readSecrets(file);
  const made = NAMES.map((name) => [name, known[name] ?? randomBytes(32).toString('hex')]);
  const secrets = /** @type {Secrets} */ (Object.fromEntries(made));
  if (NAMES.some((name) => known[name] === undefined)) {
    writeFileSync(`${file}.new`, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
    renameSync(`${file}.new`, file);
  }
  return secrets;
}
