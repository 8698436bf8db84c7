import { createServer, type Server } from 'node:http';
import type { Express } from 'express';

/** Longer than any proxy in front keeps an idle connection, so that it is never us who hang up first. */
const KEEP_ALIVE_MS = 75_000;

/** Serves an app; a port that is taken is named with the variable that moves it. */
export function listenForPeople(
  app: Express,
  { host, port }: { readonly host: string; readonly port: number },
): Promise<Server> {
  const server = createServer({ keepAliveTimeout: KEEP_ALIVE_MS }, app);
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      const isTaken = error.code === 'EADDRINUSE';
      reject(
        isTaken ? new Error(`Port ${port} on ${host} is taken by another program. Choose another one: PORT=…`) : error,
      );
    });
    server.listen(port, host, () => resolve(server));
  });
}

/** Stops taking requests, lets those under way end, and closes connections that only wait. */
export function stopListening(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve());
    server.closeIdleConnections();
    setTimeout(() => server.closeAllConnections(), 5_000).unref();
  });
}
