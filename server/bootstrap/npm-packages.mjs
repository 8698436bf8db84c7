import { existsSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { runCommand } from './run-command.mjs';
import { refusal } from './say.mjs';

/**
 * Whether npm's packages must be installed: there are none, an earlier attempt was interrupted (npm writes its own
 * lock file into node_modules last), the lock file is newer than they are, or one that is needed was left out.
 *
 * @param {string} project
 * @param {readonly string[]} [needed] packages that must be there, for example those of the tests
 */
export function mustInstallNpmPackages(project, needed = []) {
  const installed = join(project, 'node_modules', '.package-lock.json');
  if (!existsSync(installed)) return true;
  if (statSync(join(project, 'package-lock.json')).mtimeMs > statSync(installed).mtimeMs) return true;
  return needed.some((name) => !existsSync(join(project, 'node_modules', name)));
}

/** npm tells how to use it at length; what went wrong comes first. */
const MOST_LINES = 12;

/**
 * Installs exactly what the lock file says.
 *
 * @param {string} project
 * @param {{ withTests?: boolean, onLine: (line: string) => void, signal?: AbortSignal }} options
 */
export async function installNpmPackages(project, { withTests = false, onLine, signal }) {
  // npm tells its scripts where it is; without that, the one on the PATH.
  const npm = process.env.npm_execpath;
  const [command, first] = npm?.endsWith('.js') ? [process.execPath, [npm]] : ['npm', []];
  const args = [...first, 'ci', '--no-audit', '--no-fund', '--loglevel=error', ...(withTests ? ['--include=dev'] : [])];
  const { code, stderr } = await runCommand(command, args, { cwd: project, onLine, ...(signal ? { signal } : {}) });
  if (code === 0 || signal?.aborted) return;
  const words = stderr.trim().split('\n').slice(0, MOST_LINES).join('\n');
  throw refusal(`npm could not install the packages. It said:\n${words}`);
}
