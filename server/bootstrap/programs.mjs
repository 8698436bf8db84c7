import { existsSync, renameSync, statSync } from 'node:fs';
import { join } from 'node:path';

/** A log longer than this is put aside at the next start, in bytes. */
const LONGEST_LOG = 20 * 2 ** 20;

/** What is started, in this order, and stopped in the opposite one: no reading goes to a server that is gone. */
const PROGRAMS = /** @type {const} */ ([
  {
    name: 'mail catcher',
    file: 'server/mail/catcher-main.ts',
    log: 'mail-catcher',
    doing: 'Starting the mail catcher',
  },
  { name: 'node', file: 'server/main.ts', log: 'node', doing: 'Starting the server' },
  { name: 'page', file: 'server/bootstrap/development-page.mjs', log: 'page', doing: 'Starting the development page' },
  { name: 'worker', file: 'server/worker.ts', log: 'worker', doing: 'Starting the worker' },
  { name: 'fleet', file: 'simulator/main.ts', log: 'fleet', doing: 'Starting the simulated pumps' },
]);

/**
 * The programs of this start as plans for children. Where somebody else runs the database, it is a company at work: no
 * simulated pumps, no mail catcher, and logs go where our own output goes.
 *
 * @param {{ project: string, env: NodeJS.ProcessEnv, settings: import('./settings.mjs').Settings,
 *   isDevelopment?: boolean }} options
 * @returns {(import('./child.mjs').ChildPlan & { doing: string })[]}
 */
export function planPrograms({ project, env, settings, isDevelopment = false }) {
  const isDemo = settings.databaseUrl === undefined;
  const wanted = PROGRAMS.filter(({ name }) => {
    if (name === 'page') return isDevelopment;
    if (name === 'fleet') return isDemo && settings.shown.MILLRACE_FLEET !== '0';
    return name !== 'mail catcher' || isDemo;
  });
  return wanted.map(({ name, file, log, doing }) => ({
    name,
    doing,
    args: ['--import', 'tsx', file],
    cwd: project,
    env,
    logFile: isDemo ? join(settings.dataFolder, 'logs', `${log}.log`) : undefined,
  }));
}

/** Puts a log aside that has grown too long; one old one is kept. @param {string} file */
export function rotateLog(file) {
  if (existsSync(file) && statSync(file).size > LONGEST_LOG) renameSync(file, `${file}.1`);
}

/**
 * What the children of a demo are told. Settings of a PostgreSQL client that the person happens to have set are for
 * another database and left out.
 *
 * @param {import('./settings.mjs').Settings} settings
 * @param {import('./secrets.mjs').Secrets} secrets
 * @param {{ databaseUrl: string, publicUrl: string }} addresses
 * @param {NodeJS.ProcessEnv} [environment]
 * @returns {NodeJS.ProcessEnv}
 */
export function demoEnvironment(settings, secrets, { databaseUrl, publicUrl }, environment = process.env) {
  const kept = Object.entries(environment).filter(([name]) => !/^PG[A-Z]+$/.test(name));
  return {
    ...Object.fromEntries(kept),
    ...settings.shown,
    DATABASE_URL: databaseUrl,
    SMTP_URL: `smtp://127.0.0.1:${settings.smtpPort}`,
    PUBLIC_URL: publicUrl,
    MILLRACE_DEMO: '1',
    TOKEN_KEY: secrets.tokenKey,
    DEVICE_KEY: secrets.deviceKey,
  };
}
