import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import pg from 'pg';
import { afterEach, beforeEach, expect } from 'vitest';
import { findRunningServer } from '#server/bootstrap/cluster.mjs';
import {
  makeStandInProject,
  type RunningScript,
  removeStandInProject,
  type StandInProject,
} from '#tests/support/stand-in-project.ts';

/** What `npm start` does, on a project of stand-ins that each test has to itself. */
export type StartedDemo = {
  readonly project: () => StandInProject;
  readonly databaseFolder: () => string;
  readonly run: (script: string, env?: Record<string, string>) => RunningScript;
  readonly runByNpm: (script: string) => RunningScript;
  /** Starts and waits for the words that it is running. */
  readonly start: (env?: Record<string, string>) => Promise<RunningScript>;
  readonly stop: (running: RunningScript, signal?: NodeJS.Signals) => Promise<number | null>;
  readonly listChildren: () => { name: string; pid: number; started: string }[];
  readonly query: (role: 'owner' | 'superuser', statement: string) => Promise<Record<string, unknown>[]>;
};

export const RUNNING = 'Millrace is running.';

/** Registers the set-up and the end of each test; after every one, nothing of it may run. */
export function prepareStartedDemo(): StartedDemo {
  let project: StandInProject;
  let started: RunningScript[] = [];
  beforeEach(async () => {
    project = await makeStandInProject();
    started = [];
  });
  afterEach(async () => {
    for (const { process } of started) if (process.exitCode === null) process.kill('SIGTERM');
    await Promise.all(started.map(({ ended }) => ended));
    expect(findRunningServer(databaseFolder())).toBeUndefined();
    removeStandInProject(project);
  });

  const databaseFolder = () => join(project.dataFolder, 'postgres', 'data');
  const read = (file: string) => JSON.parse(readFileSync(join(project.dataFolder, file), 'utf8'));
  const remember = (running: RunningScript) => {
    started.push(running);
    return running;
  };
  const run = (script: string, env?: Record<string, string>) => remember(project.run(script, env));
  return {
    project: () => project,
    databaseFolder,
    run,
    runByNpm: (script) => remember(project.runByNpm(script)),
    start: async (env) => {
      const running = run('start', env);
      await running.says(RUNNING);
      return running;
    },
    stop: (running, signal = 'SIGTERM') => {
      running.process.kill(signal);
      return running.ended;
    },
    listChildren: () => read('children.json'),
    query: (role, statement) => query(Number(project.env.PG_PORT), role, read('secrets.json'), statement),
  };
}

async function query(
  port: number,
  role: 'owner' | 'superuser',
  secrets: { readonly ownerPassword: string; readonly superuserPassword: string },
  statement: string,
): Promise<Record<string, unknown>[]> {
  const who =
    role === 'owner'
      ? { user: 'millrace_owner', password: secrets.ownerPassword, database: 'millrace' }
      : { user: 'postgres', password: secrets.superuserPassword, database: 'postgres' };
  const client = new pg.Client({ host: '127.0.0.1', port, ...who });
  await client.connect();
  try {
    return (await client.query(statement)).rows;
  } finally {
    await client.end();
  }
}
