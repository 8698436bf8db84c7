import { existsSync, readdirSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { runCommand } from './run-command.mjs';

/** The oldest PostgreSQL whose row-level security and partitioning Millrace is tested with. */
export const OLDEST_MAJOR = 15;

/** @typedef {{ readonly folder: string, readonly major: number }} PostgresBinaries */

/**
 * Folders that may hold PostgreSQL's programs: Debian keeps one a major version outside the PATH.
 *
 * @param {{ debianRoot?: string, path?: string }} [machine]
 */
export function listCandidateFolders({ debianRoot = '/usr/lib/postgresql', path = process.env.PATH ?? '' } = {}) {
  const versions = existsSync(debianRoot) ? readdirSync(debianRoot) : [];
  return [...versions.map((version) => join(debianRoot, version, 'bin')), ...path.split(delimiter).filter(Boolean)];
}

/**
 * The major version in `postgres --version`, for example "postgres (PostgreSQL) 15.18 (Debian 15.18-0+deb12u1)" → 15.
 *
 * @param {string} text
 */
export function parseMajor(text) {
  const major = /\(PostgreSQL\) (\d+)/.exec(text)?.[1];
  return major === undefined ? undefined : Number(major);
}

/**
 * Every usable PostgreSQL server on this machine (server, initdb and psql side by side), newest first.
 *
 * @param {readonly string[]} [candidates]
 * @returns {Promise<PostgresBinaries[]>}
 */
export async function listPostgres(candidates = listCandidateFolders()) {
  const complete = [...new Set(candidates)].filter((folder) =>
    ['postgres', 'initdb', 'psql'].every((program) => existsSync(join(folder, program))),
  );
  const found = await Promise.all(
    complete.map(async (folder) => {
      const { stdout } = await runCommand(join(folder, 'postgres'), ['--version'], { cwd: '/' });
      return { folder, major: parseMajor(stdout) ?? 0 };
    }),
  );
  return found.filter(({ major }) => major >= OLDEST_MAJOR).sort((one, other) => other.major - one.major);
}

/**
 * Which of the PostgreSQL found to use: a data folder that exists decides the major version, otherwise the newest.
 *
 * @param {readonly PostgresBinaries[]} found newest first
 * @param {number | undefined} dataMajor major version of the data folder, undefined when there is none yet
 * @returns {{ tag: 'use', postgres: PostgresBinaries } | { tag: 'missing' } | { tag: 'other-major', majors: number[] }}
 */
export function choosePostgres(found, dataMajor) {
  const postgres = dataMajor === undefined ? found[0] : found.find(({ major }) => major === dataMajor);
  if (postgres) return { tag: 'use', postgres };
  return found.length === 0 ? { tag: 'missing' } : { tag: 'other-major', majors: found.map(({ major }) => major) };
}
