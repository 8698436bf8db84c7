import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readDeviceSecrets } from '#simulator/device-secrets.ts';
import { readStoryMark, writeStoryMark } from '#simulator/story-mark.ts';

const path = join(mkdtempSync(join(tmpdir(), 'story-')), 'mark.json');

describe('a story mark', () => {
  it('is read back as it was written', () => {
    const mark = { seed: 'larkmoor', from: 1, to: 2, until: 3 };
    writeStoryMark(path, mark);

    expect(readStoryMark(path)).toEqual(mark);
  });

  it.each(['', 'null', '{}', '{"seed":"a","from":1,"to":2,"until":"3"}'])('is none when the file says %j', (text) => {
    writeFileSync(path, text);

    expect(readStoryMark(path)).toBeUndefined();
  });

  it('is none when there is no file', () => {
    expect(readStoryMark('/nowhere/mark.json')).toBeUndefined();
  });
});

describe('readDeviceSecrets', () => {
  it('reads the file that the seeded company leaves', () => {
    writeFileSync(path, '{"devices":[{"serial":"MR-000101","secret":"abc"},{"serial":7}]}');

    expect(readDeviceSecrets(path)).toEqual(new Map([['MR-000101', 'abc']]));
  });

  it.each(['', '[]', '{"devices":{}}', '{"devices":[]}'])('finds none in %j', (text) => {
    writeFileSync(path, text);

    expect(readDeviceSecrets(path)).toBeUndefined();
  });
});
