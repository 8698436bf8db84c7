import { createServer } from 'node:net';

/** Codes of a machine without the address family, where nobody can be listening either. */
const NO_SUCH_FAMILY = ['EAFNOSUPPORT', 'EADDRNOTAVAIL'];

/**
 * @param {number} port
 * @param {string} host
 * @returns {Promise<string | undefined>} why the port cannot be opened, as an error code; undefined when it can
 */
function tryToListen(port, host) {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) => resolve(error.code ?? 'unknown'));
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(undefined)));
  });
}

/**
 * Why a port cannot be used, or undefined. Every address is tried: a program that listens on one of them is enough to
 * keep us out.
 *
 * @param {number} port
 */
export async function findPortTrouble(port) {
  for (const host of ['127.0.0.1', '::']) {
    const code = await tryToListen(port, host);
    if (code && !NO_SUCH_FAMILY.includes(code)) return code;
  }
  return undefined;
}

/**
 * One line for each port that cannot be used, naming the variable that moves it.
 *
 * @param {Readonly<Record<string, number>>} ports by variable
 * @returns {Promise<string[]>}
 */
export async function listPortTroubles(ports) {
  const lines = [];
  for (const [variable, port] of Object.entries(ports)) {
    const code = await findPortTrouble(port);
    if (!code) continue;
    const why = code === 'EADDRINUSE' ? 'another program uses it' : code === 'EACCES' ? 'it is not allowed' : code;
    const other = port < 55_000 ? port + 10_000 : port - 10_000;
    lines.push(`Port ${port} cannot be opened (${why}). Choose another: ${variable}=${other} npm start`);
  }
  return lines;
}
