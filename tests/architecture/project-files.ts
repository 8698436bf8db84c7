import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';

/** A file of the project: its path from the top, with slashes, and what is in it. */
export type ProjectFile = { readonly path: string; readonly text: string };

const TOP = resolve(import.meta.dirname, '../..');

/** Folders with sources, everything that is written by hand. */
const FLOORS = ['shared', 'server', 'src', 'simulator', 'tests'];

/** Files that lie at the top by right. */
const TOP_FILES = ['vite.config.ts', 'tailwind.config.ts', 'drizzle.config.ts'];

function listPaths(folder: string): string[] {
  return readdirSync(join(TOP, folder), { withFileTypes: true }).flatMap((entry) => {
    const path = `${folder}/${entry.name}`;
    return entry.isDirectory() ? listPaths(path) : [path];
  });
}

export function readProjectFile(path: string): ProjectFile {
  return { path, text: readFileSync(join(TOP, path), 'utf8') };
}

/** What lies at the top, folders and files, hidden ones left out. */
export function listTopNames(): string[] {
  return readdirSync(TOP).filter((name) => !name.startsWith('.'));
}

/** Every TypeScript and JavaScript file of the project. */
export function listSources(): ProjectFile[] {
  return [...FLOORS.flatMap(listPaths), ...TOP_FILES]
    .filter((path) => /\.(ts|tsx|mjs)$/.test(path))
    .map(readProjectFile);
}
