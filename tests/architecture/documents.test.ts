import { existsSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { listSources, readProjectFile } from '#tests/architecture/project-files.ts';

const TOP = resolve(import.meta.dirname, '../..');
const DOCUMENTS = [
  { name: 'README.md', mostLines: 120 },
  { name: 'DEVELOPERS.md', mostLines: 400 },
];

const scripts = Object.keys(JSON.parse(readFileSync(join(TOP, 'package.json'), 'utf8')).scripts);
const programs = listSources()
  .filter(({ path }) => /^(server|simulator)\//.test(path))
  .map(({ text }) => text)
  .join('\n');

/** What stands between single backticks or in a fenced block, word by word. */
function wordsOfCode(text: string): string[] {
  const fenced = [...text.matchAll(/^```\w*\n([\s\S]*?)^```/gm)].map((match) => match[1] ?? '');
  const spans = [...text.replace(/^```[\s\S]*?^```/gm, '').matchAll(/`([^`\n]+)`/g)].map((match) => match[1] ?? '');
  return [...fenced, ...spans].flatMap((code) => code.split(/\s+/)).filter(Boolean);
}

/** Paths: words with a slash that begin at one of our folders, patterns and placeholders left out. */
const pathsIn = (text: string) =>
  wordsOfCode(text).filter((word) => /^(src|server|shared|simulator|tests|drizzle|\.ci)\/[\w./-]*$/.test(word));

/** Scripts: what follows `npm run`, and the two that need no `run`. */
const scriptsIn = (text: string) =>
  [...text.matchAll(/\bnpm (?:run ([\w:-]+)|(start|test)\b)/g)].map((match) => match[1] ?? match[2] ?? '');

/** Variables: capitals with an underscore, and those named by a table whose heading says so. */
const variablesIn = (text: string) => wordsOfCode(text).filter((word) => /^([A-Z]+_[A-Z_]+|PORT)(=.*)?$/.test(word));

const isKnownVariable = (word: string) => new RegExp(`\\b${word.split('=')[0]}\\b`).test(programs);

describe.each(DOCUMENTS)('$name', ({ name, mostLines }) => {
  const { text } = readProjectFile(name);

  it(`has at most ${mostLines} lines`, () => {
    expect(text.trimEnd().split('\n').length).toBeLessThanOrEqual(mostLines);
  });

  it('names only paths that exist', () => {
    expect(pathsIn(text).filter((path) => !existsSync(join(TOP, path)))).toEqual([]);
  });

  it('names only scripts that exist', () => {
    expect(scriptsIn(text).filter((script) => !scripts.includes(script))).toEqual([]);
  });

  it('names only variables that a program reads', () => {
    expect(variablesIn(text).filter((word) => !isKnownVariable(word))).toEqual([]);
  });
});

describe('the two documents together', () => {
  const text = DOCUMENTS.map(({ name }) => readProjectFile(name).text).join('\n');

  it('name every variable that the start program and the server take', () => {
    const taken = [...programs.matchAll(/\benvironment\.([A-Z][A-Z_]+)/g)].map((match) => match[1] ?? '');
    // Not ours: the system's own.
    const ofTheSystem = ['TMPDIR', 'PATH'];
    const ports = ['PORT', 'MQTT_PORT', 'SMTP_PORT', 'PG_PORT', 'MAIL_PAGE_PORT'];
    const known = variablesIn(text).map((word) => word.split('=')[0]);
    const ours = [...new Set([...taken, ...ports])].filter((variable) => !ofTheSystem.includes(variable));
    expect(ours.filter((variable) => !known.includes(variable))).toEqual([]);
  });

  it('name paths', () => {
    expect(pathsIn(text).length).toBeGreaterThan(10);
  });

  it('name every script', () => {
    expect(scripts.filter((script) => !scriptsIn(text).includes(script))).toEqual([]);
  });
});

describe('the checks of documents', () => {
  it('see a path, a script and a variable that are made up', () => {
    const text = 'See `server/no-such.ts`, type `npm run no-such`, set `NO_SUCH=1`.\n```\nserver/nor-this.ts\n```\n';
    expect(pathsIn(text)).toEqual(['server/nor-this.ts', 'server/no-such.ts']);
    expect(scriptsIn(text)).toEqual(['no-such']);
    expect(variablesIn(text).filter((word) => !isKnownVariable(word))).toEqual(['NO_SUCH=1']);
  });
});
