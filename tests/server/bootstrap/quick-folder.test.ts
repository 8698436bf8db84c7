import { tmpdir } from 'node:os';
import { describe, expect, it } from 'vitest';
import { findQuickFolder } from '#server/bootstrap/quick-folder.mjs';
import { makeTemporaryFolder } from '#tests/support/temporary-folder.ts';

describe('findQuickFolder', () => {
  const folder = makeTemporaryFolder('memory');

  it('is in memory where there is room', () => {
    expect(findQuickFolder({ environment: {}, folder, room: 1 })).toBe(folder);
  });

  it.each([
    ['there is little room', { environment: {}, folder, room: Number.MAX_SAFE_INTEGER }],
    ['there is no such folder', { environment: {}, folder: '/nowhere' }],
    ['TMPDIR says where to go', { environment: { TMPDIR: tmpdir() }, folder, room: 1 }],
  ])('is where temporary files go when %s', (_when, machine) => {
    expect(findQuickFolder(machine)).toBe(tmpdir());
  });
});
