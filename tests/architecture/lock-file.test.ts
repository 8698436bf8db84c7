import { describe, expect, it } from 'vitest';
import { readProjectFile } from '#tests/architecture/project-files.ts';

type Entry = { readonly dependencies?: object; readonly optionalDependencies?: object };

/**
 * What a lock file's packages need and it does not hold: `npm ci` refuses it then, on every fresh machine, although an
 * `npm install` that left out an optional package went well.
 */
function listGaps(packages: Readonly<Record<string, Entry>>): string[] {
  return Object.entries(packages).flatMap(([place, { dependencies, optionalDependencies }]) =>
    Object.keys({ ...dependencies, ...optionalDependencies })
      .filter((name) => !isHeld(packages, place, name))
      .map((name) => `${place || 'package.json'} needs ${name}`),
  );
}

/** Whether a package is found from a place: in its own node_modules, or in those of a folder above it. */
function isHeld(packages: object, place: string, name: string): boolean {
  const inside = `${place}${place && '/'}node_modules/${name}`;
  if (inside in packages) return true;
  return place !== '' && isHeld(packages, place.slice(0, Math.max(place.lastIndexOf('node_modules/') - 1, 0)), name);
}

describe('the lock file', () => {
  it('holds everything that its packages need', () => {
    expect(listGaps(JSON.parse(readProjectFile('package-lock.json').text).packages)).toEqual([]);
  });

  it('is looked through', () => {
    const one = { 'node_modules/one': { optionalDependencies: { two: '1' } } };
    expect(listGaps({ '': { dependencies: { one: '1' } }, ...one })).toEqual(['node_modules/one needs two']);
    expect(listGaps({ ...one, 'node_modules/one/node_modules/two': {} })).toEqual([]);
    expect(listGaps({ ...one, 'node_modules/two': {} })).toEqual([]);
  });
});
