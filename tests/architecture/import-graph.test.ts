import { describe, expect, it } from 'vitest';
import { findTarget, listCircles, listEdges, listImports } from '#tests/architecture/import-graph.ts';

const specifiersIn = (source: string) => listImports(source).map(({ specifier }) => specifier);

describe('listImports', () => {
  it.each([
    ['a plain import', "import { one } from './one.ts';"],
    ['a type', "import type { One } from './one.ts';"],
    ['a default beside names', "import one, { two } from './one.ts';"],
    ['everything', "import * as one from './one.ts';"],
    ['names over several lines', "import {\n  one,\n  type Two,\n} from './one.ts';"],
    ['an import for its effect', "import './one.ts';"],
    ['a re-export', "export { one } from './one.ts';"],
    ['a re-export of everything', "export * from './one.ts';"],
    ['a re-exported type', "export type { One } from './one.ts';"],
    ['a dynamic import', "const one = await import('./one.ts');"],
    ['a type in place', "const one: import('./one.ts').One = 1;"],
    ['a dynamic import with a note', "lazy(() => import(/* @vite-ignore */ './one.ts'));"],
    ['double quotes', 'import { one } from "./one.ts";'],
    ['a second import on a line', "'use strict'; import { one } from './one.ts';"],
  ])('finds %s', (_what, source) => {
    expect(specifiersIn(source)).toEqual(['./one.ts']);
  });

  it.each([
    ['a comment', "// import { one } from './one.ts';"],
    ['a comment over several lines', "/**\n * import { one } from './one.ts';\n */"],
    ['an export of its own', "export const from = 'one.ts';"],
    ['words', "say('we import from', './one.ts');"],
  ])('is not misled by %s', (_what, source) => {
    expect(specifiersIn(source)).toEqual([]);
  });

  it('finds every one of several', () => {
    const source = "import a from 'a';\nimport type { B } from 'b';\nexport { c } from 'c';\n\nconst d = 1;\n";
    expect(listImports(source)).toEqual([
      { specifier: 'a', isTypeOnly: false },
      { specifier: 'b', isTypeOnly: true },
      { specifier: 'c', isTypeOnly: false },
    ]);
  });
});

describe('findTarget', () => {
  it.each([
    ['./one.ts', 'server/db/one.ts'],
    ['../live/one.ts', 'server/live/one.ts'],
    ['#shared/units/flow.ts', 'shared/units/flow.ts'],
    ['node:fs/promises', 'node:fs/promises'],
    ['drizzle-orm/pg-core', 'drizzle-orm'],
    ['@date-fns/tz/tz', '@date-fns/tz'],
    ['zod', 'zod'],
  ])('takes %s to %s', (specifier, target) => {
    expect(findTarget('server/db/pools.ts', specifier)).toBe(target);
  });
});

describe('listCircles', () => {
  const circlesOf = (imports: Record<string, string>) => {
    const files = Object.entries(imports).map(([path, to]) => ({ path, text: `import '#${to}';` }));
    return listCircles(listEdges(files), (path) => path.split('/')[0]);
  };

  it('finds a circle through several groups', () => {
    expect(circlesOf({ 'a/1.ts': 'b/1.ts', 'b/2.ts': 'c/1.ts', 'c/3.ts': 'a/9.ts' })).toEqual([['a', 'b', 'c']]);
  });

  it('finds none where everything points one way', () => {
    expect(circlesOf({ 'a/1.ts': 'b/1.ts', 'b/2.ts': 'c/1.ts', 'a/3.ts': 'c/1.ts' })).toEqual([]);
  });
});
