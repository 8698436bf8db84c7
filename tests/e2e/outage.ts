import { createServer, type Server } from 'node:net';
import { join } from 'node:path';
import { findRunningServer } from '#server/bootstrap/cluster.mjs';
import { findProcess, listProcessesIn, sendSignal, waitUntil } from '#server/bootstrap/process-table.mjs';
import type { Product } from './product.ts';

/** Something that was taken away, and the way to give it back. */
export type Outage = { readonly end: () => Promise<void> };

/** A port that answers and does nothing for anybody, as a mail server does that is being repaired. */
export type DeadPort = Outage & { readonly tries: () => number };

const GONE_WITHIN_MS = 15_000;

/** Kills a child of the start program, which starts it again. Answers its process number once it is gone. */
export async function killChild(product: Product, name: string): Promise<number> {
  const pid = product.findChildPid(name);
  if (pid === undefined) throw new Error(`${name} does not run:\n${product.output()}`);
  sendSignal(pid, 'SIGKILL');
  await waitUntil(() => findProcess(pid) === undefined, GONE_WITHIN_MS);
  return pid;
}

/** Kills the mail catcher and takes its port, so that it stays away until the outage ends. */
export async function takeMailServerAway(product: Product): Promise<DeadPort> {
  let tries = 0;
  const server = createServer((socket) => {
    tries += 1;
    socket.destroy();
  });
  const supervisor = product.startPid() ?? 0;
  sendSignal(supervisor, 'SIGSTOP');
  await killChild(product, 'mail catcher');
  // A process is seen to be gone a little before its last thread has let go of the port.
  const isTaken = await waitUntil(() => tryToListen(server, product.smtpPort), GONE_WITHIN_MS);
  sendSignal(supervisor, 'SIGCONT');
  if (!isTaken) throw new Error(`Port ${product.smtpPort} stays busy.`);
  return { tries: () => tries, end: () => new Promise((resolve) => void server.close(() => resolve())) };
}

const tryToListen = (server: Server, port: number): Promise<boolean> =>
  new Promise((resolve) => {
    server.removeAllListeners('error').once('error', () => resolve(false));
    server.listen(port, '127.0.0.1', () => resolve(true));
  });

/**
 * Kills every process of PostgreSQL at once, as when the power goes, and holds up the start program, which would start
 * it again within moments.
 */
export async function takeDatabaseAway(product: Product): Promise<Outage> {
  const [supervisor, folder] = [product.startPid(), join(product.dataFolder, 'postgres', 'data')];
  const postmaster = findRunningServer(folder)?.pid;
  if (supervisor === undefined || postmaster === undefined) throw new Error('The product does not run.');
  sendSignal(supervisor, 'SIGSTOP');
  sendSignal(postmaster, 'SIGKILL');
  for (const pid of listProcessesIn(folder)) sendSignal(pid, 'SIGKILL');
  await waitUntil(() => listProcessesIn(folder).length === 0, GONE_WITHIN_MS);
  return { end: async () => void sendSignal(supervisor, 'SIGCONT') };
}
