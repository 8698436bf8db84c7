import { posix } from 'node:path';
import type { ProjectFile } from '#tests/architecture/project-files.ts';

/** One import: who, what is named, where that lands, and whether only types cross. */
export type Edge = {
  readonly from: string;
  readonly specifier: string;
  /** A path from the top for our own files; the package's or Node module's name for others. */
  readonly to: string;
  readonly isTypeOnly: boolean;
};

const STATIC = /(?:^|[;}\n])[ \t]*(?:import|export)\s+(type\s+)?(?:[^'"`;()]*?\sfrom\s*)?['"]([^'"]+)['"]/g;
const CALLED = /\b(?:import|require|vi\.mock)\(\s*(?:\/\*.*?\*\/\s*)?['"]([^'"]+)['"]/g;

/** Code without its comments. Only whole lines of `//`, since the two strokes also stand in addresses. */
export function withoutComments(source: string): string {
  return source.replace(/\/\*[\s\S]*?\*\//g, '').replace(/^\s*\/\/.*$/gm, '');
}

/** Every module that a file names: static, type-only, re-exported, for its effect, or dynamic. */
export function listImports(source: string): { specifier: string; isTypeOnly: boolean }[] {
  const code = withoutComments(source);
  return [
    ...[...code.matchAll(STATIC)].map(([, type, specifier]) => ({
      specifier: specifier ?? '',
      isTypeOnly: Boolean(type),
    })),
    ...[...code.matchAll(CALLED)].map(([, specifier]) => ({ specifier: specifier ?? '', isTypeOnly: false })),
  ];
}

/** Where a specifier lands. A package's inner path is cut to the package, so that each has one name. */
export function findTarget(from: string, specifier: string): string {
  if (specifier.startsWith('.')) return posix.join(posix.dirname(from), specifier);
  if (specifier.startsWith('#')) return specifier.slice(1);
  if (specifier.startsWith('node:')) return specifier;
  return specifier
    .split('/')
    .slice(0, specifier.startsWith('@') ? 2 : 1)
    .join('/');
}

export function listEdges(files: readonly ProjectFile[]): Edge[] {
  return files.flatMap(({ path, text }) =>
    listImports(text).map((found) => ({ from: path, ...found, to: findTarget(path, found.specifier) })),
  );
}

/** Ways round in a circle between groups of files; each is listed once, as the groups it runs through. */
export function listCircles(edges: readonly Edge[], groupOf: (path: string) => string | undefined): string[][] {
  const next = new Map<string, Set<string>>();
  for (const { from, to } of edges) {
    const [source, target] = [groupOf(from), groupOf(to)];
    if (source === undefined || target === undefined || source === target) continue;
    next.set(source, (next.get(source) ?? new Set()).add(target));
  }
  const circles: string[][] = [];
  const done = new Set<string>();
  const visit = (group: string, trail: readonly string[]): void => {
    if (trail.includes(group)) circles.push(trail.slice(trail.indexOf(group)));
    if (trail.includes(group) || done.has(group)) return;
    for (const target of next.get(group) ?? []) visit(target, [...trail, group]);
    done.add(group);
  };
  for (const group of next.keys()) visit(group, []);
  return circles;
}
