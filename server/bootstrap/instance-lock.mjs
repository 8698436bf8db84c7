import { connect, createServer } from 'node:net';
import { shortNameOf } from './data-folder.mjs';

/**
 * One start program a data folder. The lock is a Linux abstract socket (unix(7)): it has no file, and the kernel drops
 * it with the process that holds it, however that ends. Whoever connects is told the holder's process number.
 *
 * @param {string} dataFolder
 */
const addressOf = (dataFolder) => `\0millrace-${shortNameOf(dataFolder)}`;

/**
 * Takes the lock of a data folder; false when another process has it.
 *
 * @param {string} dataFolder
 * @returns {Promise<boolean>}
 */
export function takeInstanceLock(dataFolder) {
  return new Promise((resolve, reject) => {
    const server = createServer((socket) => socket.on('error', () => undefined).end(String(process.pid)));
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) =>
      error.code === 'EADDRINUSE' ? resolve(false) : reject(error),
    );
    server.listen(addressOf(dataFolder), () => resolve(true));
    server.unref();
  });
}

/**
 * The process that holds a data folder's lock, undefined when nobody does.
 *
 * @param {string} dataFolder
 * @returns {Promise<number | undefined>}
 */
export function findLockHolder(dataFolder) {
  return new Promise((resolve) => {
    let text = '';
    connect(addressOf(dataFolder))
      .setEncoding('utf8')
      .on('data', (part) => {
        text += part;
      })
      .on('error', () => resolve(undefined))
      .on('close', () => resolve(Number(text) || undefined));
  });
}
