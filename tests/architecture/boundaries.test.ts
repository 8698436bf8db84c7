import { describe, expect, it } from 'vitest';
import { BOUNDARY_RULES, type BoundaryRule, findFeature, PACKAGE_HOMES } from '#tests/architecture/boundaries.ts';
import { type Edge, findTarget, listCircles, listEdges } from '#tests/architecture/import-graph.ts';
import { listSources } from '#tests/architecture/project-files.ts';

const edges = listEdges(listSources());
const ownEdges = edges.filter(({ from }) => !from.startsWith('tests/'));

const inWords = ({ from, specifier }: Edge) => `${from} imports ${specifier}`;

function listViolations(rule: BoundaryRule, among: readonly Edge[]): string[] {
  return among.filter((edge) => rule.from.test(edge.from) && !rule.allows(edge)).map(inWords);
}

const madeUp = ([from, specifier]: readonly [string, string]): Edge[] => [
  { from, specifier, to: findTarget(from, specifier), isTypeOnly: false },
];

describe('the import graph', () => {
  it('sees the whole project', () => {
    expect(edges.length).toBeGreaterThan(500);
    expect(edges).toContainEqual({
      from: 'tests/architecture/boundaries.test.ts',
      specifier: '#tests/architecture/import-graph.ts',
      to: 'tests/architecture/import-graph.ts',
      isTypeOnly: false,
    });
  });
});

describe.each(BOUNDARY_RULES)('$sentence', (rule) => {
  it('holds', () => {
    expect(listViolations(rule, edges)).toEqual([]);
  });

  it('refuses a made-up import against it and allows one that keeps it', () => {
    expect(listViolations(rule, madeUp(rule.refused))).toHaveLength(1);
    expect(listViolations(rule, madeUp(rule.allowed))).toEqual([]);
    expect(rule.from.test(rule.allowed[0])).toBe(true);
  });
});

describe.each(PACKAGE_HOMES)('$names have one home', ({ names, home }) => {
  const strays = (among: readonly Edge[]) =>
    among.filter(({ from, to, isTypeOnly }) => names.includes(to) && !isTypeOnly && !home.test(from)).map(inWords);

  it('holds', () => {
    expect(strays(ownEdges)).toEqual([]);
  });

  it('refuses a made-up import elsewhere', () => {
    for (const name of names) expect(strays(madeUp(['shared/domain/stray.ts', name]))).toHaveLength(1);
  });
});

describe('server features', () => {
  it('never need one another in a circle', () => {
    const isServer = (path: string) => (path.startsWith('server/') ? findFeature(path) : undefined);
    expect(listCircles(edges, isServer)).toEqual([]);
  });
});
