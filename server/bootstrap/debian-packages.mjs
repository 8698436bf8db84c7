import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { runCommand } from './run-command.mjs';

/**
 * How this machine lets us install packages: as root at once; through sudo without a question; through sudo with a
 * question at the terminal; not at all.
 *
 * @typedef {'root' | 'sudo' | 'sudo-asks' | 'none'} Installer
 */

/**
 * @param {{ isRoot: boolean, hasApt: boolean, hasSudo: boolean, sudoIsSilent: boolean, hasTerminal: boolean }} machine
 * @returns {Installer}
 */
export function chooseInstaller({ isRoot, hasApt, hasSudo, sudoIsSilent, hasTerminal }) {
  if (!hasApt) return 'none';
  if (isRoot) return 'root';
  if (!hasSudo) return 'none';
  if (sudoIsSilent) return 'sudo';
  return hasTerminal ? 'sudo-asks' : 'none';
}

/** @param {string} program @param {string} [path] */
export function isOnPath(program, path = process.env.PATH ?? '') {
  return path.split(delimiter).some((folder) => folder !== '' && existsSync(join(folder, program)));
}

/** @returns {Promise<Installer>} */
export async function findInstaller() {
  const hasSudo = isOnPath('sudo');
  return chooseInstaller({
    isRoot: process.getuid?.() === 0,
    hasApt: isOnPath('apt-get'),
    hasSudo,
    sudoIsSilent: hasSudo && (await runCommand('sudo', ['-n', 'true'])).code === 0,
    hasTerminal: process.stdin.isTTY === true,
  });
}

/**
 * What root runs. Debian's PostgreSQL package makes and starts a cluster of its own on port 5432 unless
 * createcluster.d says no (pg_createcluster(1)); the file that says so is taken away again, whatever happens. An update
 * of the lists that fails is no reason to stop: they may be good enough.
 *
 * @param {readonly string[]} packages
 * @param {string} [folder] where pg_createcluster(1) looks
 */
export function installScript(packages, folder = '/etc/postgresql-common/createcluster.d') {
  return `set -e
export DEBIAN_FRONTEND=noninteractive
folder=${folder}
mkdir -p $folder
trap 'rm -f $folder/millrace.conf' EXIT
echo 'create_main_cluster = false' > $folder/millrace.conf
apt-get update || true
apt-get install -y --no-install-recommends ${packages.join(' ')}
`;
}

/** The line a person can type when we cannot. @param {readonly string[]} packages */
export function installByHand(packages) {
  const apt = `apt-get update && apt-get install -y ${packages.join(' ')}`;
  return process.getuid?.() === 0 ? apt : `sudo sh -c "${apt}"`;
}

/**
 * Installs Debian packages. False when that was not possible; what apt said has been passed on by then.
 *
 * @param {readonly string[]} packages
 * @param {(line: string) => void} onLine
 */
export async function installDebianPackages(packages, onLine) {
  const installer = await findInstaller();
  if (installer === 'none') return false;
  const script = installScript(packages);
  // With a question at the terminal it must keep the terminal. Otherwise it gets a session of its own, so that Ctrl-C
  // does not leave a package half installed.
  if (installer === 'sudo-asks') return (await runAtTerminal('sudo', ['sh', '-c', script])) === 0;
  const [command = 'sh', ...args] = [...(installer === 'sudo' ? ['sudo', '-n'] : []), 'sh', '-c', script];
  const { code } = await runCommand(command, args, { onLine, detached: true });
  return code === 0;
}

/** @param {string} command @param {readonly string[]} args @returns {Promise<number | null>} */
function runAtTerminal(command, args) {
  return new Promise((resolve) => {
    spawn(command, args, { stdio: 'inherit' })
      .on('error', () => resolve(null))
      .on('close', resolve);
  });
}
