import { installByHand, installDebianPackages } from './debian-packages.mjs';
import { choosePostgres, listPostgres, OLDEST_MAJOR } from './find-postgres.mjs';
import { refusal, say } from './say.mjs';

/** Debian's package of the newest PostgreSQL it has. */
const PACKAGE = 'postgresql';

/**
 * PostgreSQL's programs on this machine, installed where missing, in the major version that a data folder wants.
 *
 * @param {{ dataMajor: number | undefined, dataFolder: string }} wanted
 * @returns {Promise<import('./find-postgres.mjs').PostgresBinaries>}
 */
export async function obtainPostgres({ dataMajor, dataFolder }) {
  const choice = choosePostgres(await listPostgres(), dataMajor);
  if (choice.tag === 'use') return choice.postgres;
  if (choice.tag === 'other-major') throw refusal(otherMajor(dataFolder, dataMajor, choice.majors));
  say('Installing PostgreSQL (Debian package "postgresql", without a cluster of its own)');
  const isInstalled = await installDebianPackages([PACKAGE], (line) => say(`  ${line}`));
  const second = choosePostgres(await listPostgres(), dataMajor);
  if (second.tag === 'use') return second.postgres;
  if (second.tag === 'other-major') throw refusal(otherMajor(dataFolder, dataMajor, second.majors));
  throw refusal(
    isInstalled
      ? `This machine's packages hold no PostgreSQL ${OLDEST_MAJOR} or later; see postgresql.org/download for one.`
      : `Millrace needs PostgreSQL ${OLDEST_MAJOR} or later. Type: ${installByHand([PACKAGE])}`,
  );
}

/**
 * @param {string} dataFolder
 * @param {number | undefined} dataMajor
 * @param {readonly number[]} majors
 */
export function otherMajor(dataFolder, dataMajor, majors) {
  return (
    `The database in ${dataFolder} was made by PostgreSQL ${dataMajor}; this machine has ${majors.join(' and ')}. ` +
    `Install it (${installByHand([`postgresql-${dataMajor}`])}), choose another folder (MILLRACE_DATA=… npm start), ` +
    'or start the demo afresh (npm run reset).'
  );
}
