import { spawn } from 'node:child_process';
import { closeSync, existsSync, openSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { listMarkedProcesses } from '#server/bootstrap/marked-processes.mjs';
import { listPortTroubles } from '#server/bootstrap/ports.mjs';
import { findProcess, listProcessesIn, sendSignal, waitUntil } from '#server/bootstrap/process-table.mjs';
import type { ProductPlace } from './product-place.ts';

/** The product as a user starts it: `server/bootstrap/start.mjs` and whatever that starts. */
export type Product = {
  readonly url: string;
  readonly mailUrl: string;
  readonly mqttPort: number;
  readonly smtpPort: number;
  readonly dataFolder: string;
  /** Starts it unless it runs, and resolves when it says that it does. */
  readonly start: () => Promise<void>;
  /** TERM, and the end of the start program. */
  readonly stop: () => Promise<void>;
  readonly startPid: () => number | undefined;
  /** A child of the start program by its name: `mail catcher`, `node`, `worker`, `fleet`. */
  readonly findChildPid: (name: string) => number | undefined;
  /** What the start program said. */
  readonly output: () => string;
  /** Processes and busy ports; empty when nothing is left of it. */
  readonly listRemains: () => Promise<string[]>;
};

const PROJECT = fileURLToPath(new URL('../../', import.meta.url));
/** A machine that other work keeps busy takes its time. */
const STARTS_WITHIN_MS = 240_000;
const STOPS_WITHIN_MS = 60_000;
/** The first pumps of the demo company; the tests play others themselves. */
const SIMULATED_PUMPS = '16';

/** The product of a place: what is known of it lies in the place's folder. */
export function openProduct({ folder, mark, ports }: ProductPlace): Product {
  const [outputFile, pidFile] = [join(folder, 'start.log'), join(folder, 'start.pid')];
  const dataFolder = join(folder, 'data');
  const output = () => (existsSync(outputFile) ? readFileSync(outputFile, 'utf8') : '');
  const startPid = () => {
    const pid = existsSync(pidFile) ? Number(readFileSync(pidFile, 'utf8')) : 0;
    return pid > 0 && findProcess(pid) ? pid : undefined;
  };
  const children = () => {
    const file = join(dataFolder, 'children.json');
    return existsSync(file) ? (JSON.parse(readFileSync(file, 'utf8')) as { name: string; pid: number }[]) : [];
  };

  const launch = () => {
    const log = openSync(outputFile, 'w');
    const child = spawn(process.execPath, ['server/bootstrap/start.mjs'], {
      cwd: PROJECT,
      env: environmentOf(dataFolder, mark, ports),
      detached: true,
      stdio: ['ignore', log, log],
    });
    closeSync(log);
    child.unref();
    writeFileSync(pidFile, String(child.pid));
  };

  return {
    url: `http://localhost:${ports.PORT}`,
    mailUrl: `http://localhost:${ports.MAIL_PAGE_PORT}`,
    mqttPort: ports.MQTT_PORT,
    smtpPort: ports.SMTP_PORT,
    dataFolder,
    output,
    startPid,
    findChildPid: (name) => children().find((child) => child.name === name && findProcess(child.pid))?.pid,
    start: async () => {
      if (startPid() === undefined) launch();
      const isUp = () => output().includes('Millrace is running.');
      await waitUntil(() => isUp() || startPid() === undefined, STARTS_WITHIN_MS);
      if (!isUp() || startPid() === undefined) throw new Error(`The product does not start:\n${output()}`);
    },
    stop: async () => {
      const pid = startPid();
      if (pid === undefined) return;
      sendSignal(pid, 'SIGCONT');
      sendSignal(pid, 'SIGTERM');
      const ended = await waitUntil(() => startPid() === undefined, STOPS_WITHIN_MS);
      if (!ended) throw new Error(`The product does not stop:\n${output()}`);
    },
    listRemains: async () => [
      ...listMarkedProcesses(mark).map((pid) => `process ${pid}`),
      ...listProcessesIn(join(dataFolder, 'postgres', 'data')).map((pid) => `database process ${pid}`),
      ...(await listPortTroubles(ports)),
    ],
  };
}

/** What a user's shell would hold: nothing of the test run, npm or a database that somebody else runs. */
function environmentOf(dataFolder: string, mark: string, ports: ProductPlace['ports']): Record<string, string> {
  const [markName = '', markValue = ''] = mark.split('=');
  const run = process.env.MILLRACE_TEST_RUN;
  return {
    PATH: process.env.PATH ?? '',
    HOME: process.env.HOME ?? '',
    LANG: process.env.LANG ?? 'C.UTF-8',
    ...(run === undefined ? {} : { MILLRACE_TEST_RUN: run }),
    [markName]: markValue,
    MILLRACE_DATA: dataFolder,
    MILLRACE_FLEET: SIMULATED_PUMPS,
    MILLRACE_HISTORY_DAYS: '0',
    ...Object.fromEntries(Object.entries(ports).map(([name, port]) => [name, String(port)])),
  };
}
