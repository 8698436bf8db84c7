/** `npm run verify`: everything a change must pass, one line each at the end. Nothing is written to the sources. */
import { spawnSync } from 'node:child_process';
import { dirname, join } from 'node:path';
import { setImmediate } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { runToTheEnd } from './lifecycle.mjs';
import { prepareTests } from './prepare-tests.mjs';
import { refusal, say } from './say.mjs';

const project = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

/** What is checked, in words, and the command that does it. */
const STEPS = /** @type {const} */ ([
  ['format', 'npx biome check --linter-enabled=false .'],
  ['lint', 'npx biome lint .'],
  ['types', 'npm run --silent typecheck'],
  ['unused code', 'npm run --silent dead'],
  ['architecture', 'npx vitest run --project architecture'],
  ['tests', 'npm test --silent -- --project !architecture'],
]);

await runToTheEnd(async (life) => {
  await prepareTests(project, { withServices: true, signal: life.stopping });
  const failures = [];
  for (const [name, command] of STEPS) {
    // A Ctrl-C during the step before is heard only now.
    await setImmediate();
    life.leaveIfStopping();
    say(`\n${name}: ${command}`);
    const { status } = spawnSync(command, { cwd: project, stdio: 'inherit', shell: true });
    if (status !== 0) failures.push(name);
  }
  say('');
  for (const [name] of STEPS) say(`${failures.includes(name) ? 'FAILED' : 'passed'}  ${name}`);
  if (failures.length > 0) throw refusal(`${failures.length} of ${STEPS.length} checks failed.`);
});
