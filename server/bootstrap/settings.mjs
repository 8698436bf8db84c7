import { resolve } from 'node:path';
import { refusal } from './say.mjs';

/**
 * @typedef {object} Settings
 * @property {number} port
 * @property {number} mqttPort
 * @property {number} smtpPort
 * @property {number} mailPagePort
 * @property {number} pgPort
 * @property {string} dataFolder absolute
 * @property {string | undefined} databaseUrl a database somebody else runs; undefined for one of our own
 * @property {Record<string, string>} shown what was read, for the children's environment
 */

/** Every port the demo opens, with the variable that moves it. */
export const PORTS = /** @type {const} */ ({
  PORT: 4310,
  MQTT_PORT: 4311,
  SMTP_PORT: 4312,
  PG_PORT: 4313,
  MAIL_PAGE_PORT: 4314,
});

/** Simulated pumps of the demo company: Larkmoor's 36 (the seed makes no more). */
const DEFAULT_FLEET = '36';

/**
 * @param {string} name
 * @param {string} text
 * @param {number} highest
 * @returns {string | undefined} what is wrong with a whole number
 */
function faultOfNumber(name, text, highest) {
  const isWhole = /^\d{1,6}$/.test(text) && Number(text) <= highest;
  return isWhole ? undefined : `${name} is "${text}", it takes a whole number up to ${highest}`;
}

/** @param {Record<string, string>} ports @returns {string[]} */
function faultsOfPorts(ports) {
  const faults = Object.entries(ports).flatMap(([name, text]) => {
    const fault = text === '0' ? `${name} is 0, it takes a port from 1 to 65535` : faultOfNumber(name, text, 65_535);
    return fault ?? [];
  });
  const names = Object.keys(ports);
  const twice = names.filter((name, index) => names.findIndex((other) => ports[other] === ports[name]) !== index);
  return [...faults, ...twice.map((name) => `${name} is ${ports[name]}, which another of these ports has already`)];
}

/**
 * What the environment asks for. Every fault is named at once, so that nobody corrects them one start at a time.
 *
 * @param {NodeJS.ProcessEnv} environment
 * @returns {Settings}
 */
export function readSettings(environment) {
  /** @type {Record<string, string>} */
  const ports = {};
  for (const [name, standard] of Object.entries(PORTS)) ports[name] = environment[name] || String(standard);
  const fleet = environment.MILLRACE_FLEET || DEFAULT_FLEET;
  const faults = [...faultsOfPorts(ports), faultOfNumber('MILLRACE_FLEET', fleet, 100_000)].filter(Boolean);
  if (faults.length > 0) throw refusal(`These settings cannot work:\n  ${faults.join('\n  ')}`);
  const dataFolder = resolve(environment.MILLRACE_DATA || '.data');
  return {
    port: Number(ports.PORT),
    mqttPort: Number(ports.MQTT_PORT),
    smtpPort: Number(ports.SMTP_PORT),
    mailPagePort: Number(ports.MAIL_PAGE_PORT),
    pgPort: Number(ports.PG_PORT),
    dataFolder,
    databaseUrl: environment.DATABASE_URL || undefined,
    shown: { ...ports, MILLRACE_DATA: dataFolder, MILLRACE_FLEET: fleet },
  };
}
