import { type ChildProcess, spawn } from 'node:child_process';
import { chmodSync, cpSync, mkdirSync, rmSync, symlinkSync, utimesSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fingerprintClient } from '#server/bootstrap/build-client.mjs';
import { findFreePort } from '#tests/support/free-port.ts';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

/**
 * A project whose start program, database and packages are the real ones, and whose programs are small stand-ins that
 * keep the same promises: they say when they are ready, end on SIGTERM, and end when their parent is gone.
 */
export type StandInProject = {
  readonly folder: string;
  readonly dataFolder: string;
  readonly env: Record<string, string>;
  /** Replaces one of the programs. */
  readonly write: (file: string, source: string) => void;
  readonly run: (script: string, env?: Record<string, string>, args?: readonly string[]) => RunningScript;
  /** The same through npm, as a person types it. */
  readonly runByNpm: (script: string) => RunningScript;
};

export type RunningScript = {
  readonly process: ChildProcess;
  /** Everything it said, on both streams as they came. */
  readonly output: () => string;
  /** What it said on standard output alone. */
  readonly standardOutput: () => string;
  /** Resolves once the output holds the text; rejects when the program ends without it. */
  readonly says: (text: string) => Promise<void>;
  readonly ended: Promise<number | null>;
};

const PROGRAM_FILES = ['server/mail/catcher-main.ts', 'server/main.ts', 'server/worker.ts', 'simulator/main.ts'];

/** Listens on the port it is told of, so that a port taken is felt, and keeps the promises of a child. */
export function standInProgram({ port, onTerm = 'process.exit(0)' }: { port?: string; onTerm?: string } = {}): string {
  const listen = port
    ? `await new Promise((done) => createServer().listen(Number(process.env.${port}), '127.0.0.1', done));`
    : '';
  return `import { createServer } from 'node:net';
process.on('SIGTERM', () => { console.log('told to end', Date.now()); ${onTerm}; });
process.on('disconnect', () => process.exit(0));
process.send?.({ type: 'progress', text: 'getting up' });
${listen}
setInterval(() => undefined, 1_000_000);
console.log('works', Date.now());
process.send?.({ type: 'ready' });
export {};
`;
}

export async function makeStandInProject(): Promise<StandInProject> {
  const source = resolve(import.meta.dirname, '../..');
  const folder = makeTemporaryFolder('project');
  chmodSync(folder, 0o755);
  cpSync(join(source, 'server/bootstrap'), join(folder, 'server/bootstrap'), { recursive: true });
  for (const file of ['package.json', 'package-lock.json']) cpSync(join(source, file), join(folder, file));
  // Older than what is installed, as after a checkout that was followed by an install.
  utimesSync(join(folder, 'package-lock.json'), 0, 0);
  symlinkSync(join(source, 'node_modules'), join(folder, 'node_modules'));
  mkdirSync(join(folder, 'dist'));
  writeFileSync(join(folder, 'dist/.fingerprint'), fingerprintClient(folder));

  const write = (file: string, text: string) => {
    mkdirSync(join(folder, file, '..'), { recursive: true });
    writeFileSync(join(folder, file), text);
  };
  const ports = ['SMTP_PORT', 'PORT', undefined, undefined];
  PROGRAM_FILES.forEach((file, index) => {
    const port = ports[index];
    write(file, standInProgram(port ? { port } : {}));
  });

  const env: Record<string, string> = { MILLRACE_FLEET: '0' };
  for (const name of ['PORT', 'MQTT_PORT', 'SMTP_PORT', 'PG_PORT', 'MAIL_PAGE_PORT']) {
    env[name] = String(await findFreePort());
  }
  return {
    folder,
    dataFolder: join(folder, '.data'),
    env,
    write,
    run: (script, more = {}, args = []) =>
      runCommand(folder, [process.execPath, `server/bootstrap/${script}.mjs`, ...args], { ...env, ...more }),
    runByNpm: (script) => runCommand(folder, ['npm', 'run', script], env),
  };
}

export function removeStandInProject(project: StandInProject): void {
  rmSync(project.folder, { recursive: true, force: true });
}

function runCommand(folder: string, command: readonly string[], env: Record<string, string>): RunningScript {
  const [program = '', ...args] = command;
  const child = spawn(program, args, {
    cwd: folder,
    env: { ...process.env, DATABASE_URL: '', ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let [output, standardOutput] = ['', ''];
  const ended = new Promise<number | null>((done) => child.on('close', done));
  const says = (text: string) =>
    new Promise<void>((done, fail) => {
      const look = () => output.includes(text) && done();
      child.stdout.on('data', look);
      child.stderr.on('data', look);
      ended.then((code) => fail(new Error(`ended with ${code} without saying "${text}":\n${output}`)));
      look();
    });
  for (const stream of [child.stdout, child.stderr]) {
    stream.setEncoding('utf8').prependListener('data', (text: string) => {
      output += text;
      if (stream === child.stdout) standardOutput += text;
    });
  }
  return { process: child, output: () => output, standardOutput: () => standardOutput, says, ended };
}
