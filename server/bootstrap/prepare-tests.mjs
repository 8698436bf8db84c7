import { existsSync } from 'node:fs';
import { buildClient, isClientBuilt } from './build-client.mjs';
import { installByHand, installDebianPackages, isOnPath } from './debian-packages.mjs';
import { listPostgres } from './find-postgres.mjs';
import { installNpmPackages, mustInstallNpmPackages } from './npm-packages.mjs';
import { refusal, say } from './say.mjs';

/** Debian packages that the tests need and this machine lacks. */
async function listMissingPackages() {
  const hasPostgres = (await listPostgres()).length > 0;
  return [
    ...(hasPostgres ? [] : ['postgresql']),
    ...(existsSync('/usr/bin/chromium') ? [] : ['chromium']),
    ...(isOnPath('mosquitto_pub') ? [] : ['mosquitto-clients']),
  ];
}

/**
 * Installs what the tests need: npm's packages always, the rest when services are wanted; then builds the client.
 *
 * @param {string} project
 * @param {{ withServices: boolean, signal: AbortSignal }} options
 */
export async function prepareTests(project, { withServices, signal }) {
  const onLine = (/** @type {string} */ line) => say(`  ${line}`);
  if (mustInstallNpmPackages(project, ['vitest', 'typescript', '@biomejs/biome', 'knip'])) {
    say('Installing npm packages');
    await installNpmPackages(project, { withTests: true, onLine, signal });
  }
  if (!withServices) return;
  const missing = await listMissingPackages();
  if (missing.length > 0) {
    say(`Installing ${missing.join(', ')}`);
    await installDebianPackages(missing, onLine);
    const still = await listMissingPackages();
    if (still.length > 0) throw refusal(`The tests need ${still.join(', ')}. Type: ${installByHand(still)}`);
  }
  if (signal.aborted || isClientBuilt(project)) return;
  say('Building the client');
  await buildClient(project, { signal });
}
