/**
 * `npm start`: from a fresh machine to a running watch desk. Plain JavaScript on Node's own modules, since it runs
 * before anything is installed.
 */
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildClient, isClientBuilt } from './build-client.mjs';
import { openDataFolder } from './data-folder.mjs';
import { findLockHolder, takeInstanceLock } from './instance-lock.mjs';
import { runToTheEnd } from './lifecycle.mjs';
import { refuseOldNode } from './node-version.mjs';
import { installNpmPackages, mustInstallNpmPackages } from './npm-packages.mjs';
import { endOrphans } from './orphans.mjs';
import { startOwnDatabase } from './own-database.mjs';
import { listPortTroubles } from './ports.mjs';
import { demoEnvironment, planPrograms } from './programs.mjs';
import { restartOnChange } from './restart-on-change.mjs';
import { runPrograms } from './run-programs.mjs';
import { refusal, say } from './say.mjs';
import { getSecrets } from './secrets.mjs';
import { readSettings } from './settings.mjs';

/** @typedef {import('./settings.mjs').Settings} Settings */
/** @typedef {import('./lifecycle.mjs').Lifecycle} Lifecycle */

const project = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
const isDevelopment = process.argv.includes('--dev');

/** The development page, rebuilt at every keystroke; it passes /api on to the server. */
const DEVELOPMENT_URL = 'http://localhost:4320';

/** @param {Lifecycle} life */
async function installAndBuild(life) {
  if (mustInstallNpmPackages(project)) {
    say('Installing npm packages');
    await installNpmPackages(project, { onLine: (line) => say(`  ${line}`), signal: life.stopping });
    life.leaveIfStopping();
  }
  if (isDevelopment || isClientBuilt(project)) return;
  say('Building the client');
  await buildClient(project, { signal: life.stopping });
  life.leaveIfStopping();
}

/** A company at work: the database and the mail server are somebody else's. @param {Settings} settings @param {Lifecycle} life */
async function startAtWork(settings, life) {
  await installAndBuild(life);
  await runPrograms(planPrograms({ project, env: process.env, settings }), life);
  say(`\nMillrace is running on port ${settings.port}.`);
}

/** @param {Settings} settings */
async function claim(settings) {
  if (process.platform !== 'linux') {
    throw refusal('The demo starts PostgreSQL itself and knows how to on Debian and its kin only (Linux).');
  }
  const dataFolder = openDataFolder(settings.dataFolder);
  if (!(await takeInstanceLock(dataFolder))) {
    const holder = await findLockHolder(dataFolder);
    throw refusal(
      `Millrace runs already in ${dataFolder} (process ${holder ?? 'unknown'}). Stop that one with Ctrl-C, ` +
        'or start a second one beside it with other ports and another folder: MILLRACE_DATA=…',
    );
  }
  const orphans = await endOrphans(dataFolder);
  if (orphans.length > 0) say(`Ended what an earlier start left running: ${orphans.join(', ')}`);
  return dataFolder;
}

/** @param {Settings} asked @param {Lifecycle} life */
async function startDemo(asked, life) {
  const settings = { ...asked, dataFolder: await claim(asked) };
  const { port, mqttPort, smtpPort, mailPagePort } = settings;
  const ports = { PORT: port, MQTT_PORT: mqttPort, SMTP_PORT: smtpPort, MAIL_PAGE_PORT: mailPagePort };
  const troubles = await listPortTroubles(ports);
  if (troubles.length > 0) throw refusal(troubles.join('\n'));
  await installAndBuild(life);
  const secrets = getSecrets(settings.dataFolder);
  const databaseUrl = await startOwnDatabase(settings, secrets, life);
  const publicUrl = isDevelopment ? DEVELOPMENT_URL : `http://localhost:${port}`;
  const env = demoEnvironment(settings, secrets, { databaseUrl, publicUrl });
  const plans = planPrograms({ project, env, settings, isDevelopment });
  const kept = await runPrograms(plans, life, { dataFolder: settings.dataFolder });
  if (isDevelopment) restartOnChange(project, kept, life);
  say(welcome(settings, publicUrl));
}

/** @param {Settings} settings @param {string} publicUrl */
const welcome = ({ mailPagePort, mqttPort, dataFolder }, publicUrl) => `
Millrace is running.

  The watch desk      ${publicUrl}
  Mail it has sent    http://localhost:${mailPagePort}
  Pumps report to     mqtt://127.0.0.1:${mqttPort}
  Logs                ${join(dataFolder, 'logs')}

  Sign in as          manager@larkmoor.example
                      tech@larkmoor.example
                      home@larkmoor.example
  Password            millrace-demo

Ctrl-C stops everything. "npm run reset" starts the demo afresh.
`;

await runToTheEnd(async (life) => {
  refuseOldNode();
  const settings = readSettings(process.env);
  await (settings.databaseUrl ? startAtWork(settings, life) : startDemo(settings, life));
  await life.stopped;
});
