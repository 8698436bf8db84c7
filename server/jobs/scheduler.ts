import type { Job, JobContext } from './job.ts';
import type { Leadership } from './leadership.ts';

export type SchedulerOptions = {
  readonly jobs: readonly Job[];
  readonly context: JobContext;
  readonly leadership: Leadership;
  readonly tickMs?: number;
};

export type Scheduler = { readonly start: () => void; readonly stop: () => Promise<void> };

const TICK_MS = 1000;

/** Runs each job when it is due, one after another, in the process that leads. A job that fails is tried next time. */
export function createScheduler({ jobs, context, leadership, tickMs }: SchedulerOptions): Scheduler {
  const dueAt = new Map(jobs.map(({ name }) => [name, 0]));
  let working: Promise<void> | undefined;
  let timer: NodeJS.Timeout | undefined;

  const work = async (): Promise<void> => {
    try {
      if (await leadership.isOurs()) for (const job of jobs) await runIfDue(job, context, dueAt);
    } catch (err) {
      context.log.warn({ err }, 'jobs cannot run now');
    }
    working = undefined;
  };
  return {
    start: () => {
      timer = setInterval(() => {
        working ??= work();
      }, tickMs ?? TICK_MS);
    },
    stop: async () => {
      clearInterval(timer);
      await working;
      await leadership.end();
    },
  };
}

async function runIfDue(job: Job, context: JobContext, dueAt: Map<string, number>): Promise<void> {
  const now = context.now();
  if (now < (dueAt.get(job.name) ?? 0)) return;
  dueAt.set(job.name, now + job.everyMs);
  try {
    await job.run(context);
  } catch (err) {
    context.log.warn({ err, job: job.name }, 'a job failed');
  }
}
