import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { listSources, listTopNames, type ProjectFile } from '#tests/architecture/project-files.ts';

const TOP_FOLDER = resolve(import.meta.dirname, '../..');
const files = listSources();
const paths = new Set(files.map(({ path }) => path));

/** Lines of a file; a table of data has none that count. */
const linesOf = ({ path, text }: ProjectFile) => (/\.data\.tsx?$/.test(path) ? 0 : text.trimEnd().split('\n').length);

const MOST_LINES = 250;
const MOST_LINES_OF_A_TEST = 400;

const listTooLong = (among: readonly ProjectFile[]) =>
  among
    .filter((file) => linesOf(file) > (file.path.startsWith('tests/') ? MOST_LINES_OF_A_TEST : MOST_LINES))
    .map((file) => `${file.path} has ${linesOf(file)} lines`);

const longFile = (path: string, lines: number) => ({ path, text: 'x\n'.repeat(lines) });

describe('sizes', () => {
  it('no source file has more than 250 lines, no test more than 400; tables of data excepted', () => {
    expect(listTooLong(files)).toEqual([]);
  });

  it('are counted', () => {
    expect(listTooLong([longFile('server/app.ts', 250), longFile('tests/server/app.test.ts', 400)])).toEqual([]);
    expect(listTooLong([longFile('server/app.ts', 251), longFile('tests/server/app.test.ts', 401)])).toHaveLength(2);
    expect(listTooLong([longFile('shared/domain/words.data.ts', 2_000)])).toEqual([]);
  });

  it('nine source files in ten have fewer than 180 lines', () => {
    const sources = files.filter(({ path }) => !path.startsWith('tests/'));
    const long = sources.filter((file) => linesOf(file) >= 180);
    expect(long.length / sources.length).toBeLessThan(0.1);
  });
});

const KEBAB = /^[a-z0-9]+(-[a-z0-9]+)*(\.(data|config)|(\.[a-z-]+)?\.test)?\.(ts|tsx|mjs)$/;
const VAGUE = /(^|[/-])(utils?|helpers?|common|misc|stuff)([./-]|$)/;

const isWellNamed = (path: string) => {
  const parts = path.split('/');
  const folders = parts.slice(0, -1);
  return (
    KEBAB.test(parts.at(-1) ?? '') &&
    folders.every((name) => /^[a-z0-9]+(-[a-z0-9]+)*$/.test(name)) &&
    !VAGUE.test(path)
  );
};

/** What a test says it is about: tests/server/db/migrate.property.test.ts → server/db/migrate. */
const subjectOf = (path: string) =>
  /^tests\/((?:shared|server|src|simulator)\/.+?)(\.[a-z-]+)*\.test\.tsx?$/.exec(path)?.[1];

/** Tests of what many files make together. */
const WHOLE = /^tests\/src\/(pages|fake-api)\//;

describe('names', () => {
  it('are in kebab case and say what is in the file', () => {
    expect(files.filter(({ path }) => !isWellNamed(path)).map(({ path }) => path)).toEqual([]);
  });

  it('are looked at', () => {
    for (const bad of [
      'server/utils.ts',
      'src/lib/DateHelpers.ts',
      'shared/common/a.ts',
      'src/Fleet.tsx',
      'a/b_c.ts',
    ]) {
      expect(isWellNamed(bad)).toBe(false);
    }
    for (const good of [
      'server/db/new-id.ts',
      'shared/domain/cause-chain.data.ts',
      'tests/shared/flow.property.test.ts',
    ]) {
      expect(isWellNamed(good)).toBe(true);
    }
  });

  it('of tests lie where the folder they are about lies', () => {
    const astray = [...paths].filter((path) => {
      const subject = subjectOf(path);
      return subject !== undefined && !existsSync(join(TOP_FOLDER, subject, '..')) && !WHOLE.test(path);
    });
    expect(astray).toEqual([]);
  });
});

const TOP = ['README.md', 'DEVELOPERS.md', 'package.json', 'package-lock.json', 'tsconfig.json', 'vite.config.ts']
  .concat([
    'tailwind.config.ts',
    'drizzle.config.ts',
    'index.html',
    'src',
    'server',
    'simulator',
    'shared',
    'drizzle',
    'tests',
  ])
  // Made, not written.
  .concat(['node_modules', 'dist']);

describe('the top', () => {
  it('holds what belongs there and nothing else', () => {
    expect(listTopNames().filter((name) => !TOP.includes(name))).toEqual([]);
  });
});
