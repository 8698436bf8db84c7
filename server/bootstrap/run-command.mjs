import { spawn } from 'node:child_process';

/**
 * @typedef {object} CommandOptions
 * @property {string} [cwd]
 * @property {NodeJS.ProcessEnv} [env] the whole environment; ours when left out
 * @property {string} [input] what the command reads on standard input; nothing when left out
 * @property {import('./account.mjs').Account | undefined} [account] who runs it; ourselves when left out
 * @property {(line: string) => void} [onLine] every line of output as it comes
 * @property {boolean} [detached] in a session of its own, out of reach of Ctrl-C at the terminal
 * @property {AbortSignal} [signal] ends the command (SIGTERM)
 *
 * @typedef {object} CommandResult
 * @property {number | null} code null when it could not start or a signal ended it
 * @property {string} stdout
 * @property {string} stderr
 */

/**
 * Runs one command to its end and returns what it said. It never throws: a command that is not there has code null.
 *
 * @param {string} command
 * @param {readonly string[]} args
 * @param {CommandOptions} [options]
 * @returns {Promise<CommandResult>}
 */
export function runCommand(command, args, { input, account, onLine, ...options } = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, {
      ...options,
      stdio: [input === undefined ? 'ignore' : 'pipe', 'pipe', 'pipe'],
      ...(account ? { uid: account.uid, gid: account.gid } : {}),
    });
    const output = { stdout: '', stderr: '' };
    for (const name of /** @type {const} */ (['stdout', 'stderr'])) {
      child[name]?.setEncoding('utf8').on('data', (text) => {
        output[name] += text;
        for (const line of onLine ? text.split('\n').filter(Boolean) : []) onLine?.(line);
      });
    }
    child.on('error', (error) => resolve({ code: null, ...output, stderr: output.stderr + error.message }));
    child.on('close', (code) => resolve({ code, ...output }));
    child.stdin?.on('error', () => undefined);
    child.stdin?.end(input);
  });
}
