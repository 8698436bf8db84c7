import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { runCommand } from './run-command.mjs';
import { refusal } from './say.mjs';

/** Everything that a change of can change the built client. */
const SOURCES = ['index.html', 'src', 'shared', 'vite.config.ts', 'tailwind.config.ts', 'package-lock.json'];

/** @param {string} place @returns {string[]} files below a place, the place itself when it is one */
function listFiles(place) {
  if (!existsSync(place)) return [];
  if (statSync(place).isFile()) return [place];
  return readdirSync(place)
    .sort()
    .flatMap((name) => listFiles(join(place, name)));
}

/**
 * A fingerprint of the client's sources: by content, since a checkout changes times and a revert changes nothing.
 *
 * @param {string} project
 */
export function fingerprintClient(project) {
  const hash = createHash('sha256');
  for (const file of SOURCES.flatMap((source) => listFiles(join(project, source)))) {
    hash
      .update(`${file.slice(project.length)}\0`)
      .update(readFileSync(file))
      .update('\0');
  }
  return hash.digest('hex');
}

/** @param {string} project */
export function isClientBuilt(project) {
  const stamp = join(project, 'dist', '.fingerprint');
  return existsSync(stamp) && readFileSync(stamp, 'utf8') === fingerprintClient(project);
}

/**
 * Builds the client into dist/. It is built beside its place and moved there when complete: a build that fails, or two
 * at a time, never leave half a client to be served.
 *
 * @param {string} project
 * @param {{ signal?: AbortSignal }} [options]
 */
export async function buildClient(project, { signal } = {}) {
  const place = join(project, 'dist');
  const [built, old] = [workFolder(project, 'new'), workFolder(project, 'old')];
  const fingerprint = fingerprintClient(project);
  const vite = join(project, 'node_modules', 'vite', 'bin', 'vite.js');
  const args = [vite, 'build', '--logLevel', 'warn', '--outDir', built, '--emptyOutDir'];
  const { code, stdout, stderr } = await runCommand(process.execPath, args, {
    cwd: project,
    env: { ...process.env, NODE_ENV: 'production' },
    ...(signal ? { signal } : {}),
  });
  try {
    if (signal?.aborted) return;
    if (code !== 0) throw refusal(`The client could not be built:\n${stdout}${stderr}`.trim());
    writeFileSync(join(built, '.fingerprint'), fingerprint);
    if (existsSync(place)) renameSync(place, old);
    renameSync(built, place);
  } finally {
    for (const folder of [built, old]) rmSync(folder, { recursive: true, force: true });
  }
}

/** @param {string} project @param {string} what */
function workFolder(project, what) {
  mkdirSync(join(project, '.cache'), { recursive: true });
  return join(project, '.cache', `client-${what}-${process.pid}`);
}
