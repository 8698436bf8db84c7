import { spawnSync } from 'node:child_process';
import { chmodSync, existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { chooseInstaller, installScript, isOnPath } from '#server/bootstrap/debian-packages.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

const DESKTOP = { isRoot: false, hasApt: true, hasSudo: true, sudoIsSilent: false, hasTerminal: true };

describe('chooseInstaller', () => {
  it.each([
    ['root needs nobody', { ...DESKTOP, isRoot: true, hasSudo: false }, 'root'],
    ['sudo that asks nothing', { ...DESKTOP, sudoIsSilent: true, hasTerminal: false }, 'sudo'],
    ['sudo that asks at a terminal', DESKTOP, 'sudo-asks'],
    ['sudo that asks where nobody answers', { ...DESKTOP, hasTerminal: false }, 'none'],
    ['no sudo', { ...DESKTOP, hasSudo: false }, 'none'],
    ['no apt', { ...DESKTOP, hasApt: false, isRoot: true }, 'none'],
  ])('%s', (_words, machine, installer) => {
    expect(chooseInstaller(machine)).toBe(installer);
  });
});

describe('installScript', () => {
  /** Runs the script with an apt-get that writes down what it was asked and whether the cluster guard was there. */
  function runScript({ installFails = false, updateFails = false } = {}) {
    const root = makeTemporaryFolder('apt');
    const guard = join(root, 'createcluster.d', 'millrace.conf');
    const fails = [...(installFails ? ['install'] : []), ...(updateFails ? ['update'] : [])];
    writeFileSync(
      join(root, 'apt-get'),
      `#!/bin/sh\necho "$* / $DEBIAN_FRONTEND / $(cat ${guard})" >> ${root}/log\n` +
        `for bad in ${fails.join(' ')}; do test "$1" = "$bad" && exit 100; done; exit 0\n`,
    );
    chmodSync(join(root, 'apt-get'), 0o755);
    const { status } = spawnSync('sh', ['-c', installScript(['postgresql'], join(root, 'createcluster.d'))], {
      env: { PATH: `${root}:${process.env.PATH}` },
    });
    return { status, guard, asked: readFileSync(join(root, 'log'), 'utf8').trim().split('\n') };
  }

  const GUARDED = 'noninteractive / create_main_cluster = false';

  it('updates, then installs without a question and without a cluster of Debian’s own', () => {
    const { status, asked } = runScript();
    expect(status).toBe(0);
    expect(asked).toEqual([`update / ${GUARDED}`, `install -y --no-install-recommends postgresql / ${GUARDED}`]);
  });

  it('leaves no guard behind, whether it worked or not', () => {
    expect(existsSync(runScript().guard)).toBe(false);
    const failed = runScript({ installFails: true });
    expect(failed.status).not.toBe(0);
    expect(existsSync(failed.guard)).toBe(false);
  });

  it('goes on with the lists it has when they cannot be updated', () => {
    expect(runScript({ updateFails: true }).status).toBe(0);
  });
});

describe('isOnPath', () => {
  it('looks in every folder of the PATH', () => {
    expect(isOnPath('sh', '/nowhere:/bin')).toBe(true);
    expect(isOnPath('sh', '/nowhere:')).toBe(false);
  });
});
