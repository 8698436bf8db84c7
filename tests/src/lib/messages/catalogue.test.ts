import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { parseSync } from 'vite';
import { describe, expect, it } from 'vitest';
import type { Messages } from '#src/lib/messages/create-words.ts';
import { fillMessage } from '#src/lib/messages/fill-message.ts';

const ROOT = join(import.meta.dirname, '../../../..');

const listFiles = (folder: string): string[] =>
  readdirSync(join(ROOT, folder), { withFileTypes: true }).flatMap((entry) =>
    entry.isDirectory() ? listFiles(`${folder}/${entry.name}`) : [`${folder}/${entry.name}`],
  );

const MESSAGES = join(ROOT, 'src/lib/messages');

/** Every catalogue file: those of the first load and those that come with their pages. */
const catalogues: readonly Messages[] = await Promise.all(
  readdirSync(MESSAGES)
    .filter((file) => file.endsWith('.data.ts'))
    .map(async (file) => Object.assign({}, ...Object.values(await import(join(MESSAGES, file))))),
);

const sources = listFiles('src')
  .filter((file) => /\.tsx?$/.test(file) && !/\/messages\/.*\.data\.ts$/.test(file))
  .map((file) => ({
    file,
    text: readFileSync(join(ROOT, file), 'utf8').replaceAll(/\/\*[\s\S]*?\*\/|^\s*\/\/.*$/gm, ''),
  }));
const everything = sources.map(({ text }) => text).join('\n');

/** Keys that are put together at run time, by what stands before the first `${`. */
const prefixes = [...everything.matchAll(/`([\w.-]+)\$\{/g)]
  .map((match) => match[1] ?? '')
  .filter((prefix) => prefix.includes('.'));

const SPOKEN_ATTRIBUTES = ['aria-label', 'aria-description', 'title', 'placeholder', 'alt', 'label', 'legend', 'hint'];

type Node = Readonly<Record<string, unknown>> & { readonly type: string };
const isNode = (value: unknown): value is Node => typeof value === 'object' && value !== null && 'type' in value;

/** Words written into JSX itself: text between tags, and attributes that are read or heard. */
function listSpoken(file: string, text: string): string[] {
  const found: string[] = [];
  const say = (words: string) => {
    if (/[A-Za-z]{2,}/.test(words)) found.push(words.trim());
  };
  const visit = (node: unknown): void => {
    if (Array.isArray(node)) for (const each of node) visit(each);
    if (!isNode(node)) return;
    if (node.type === 'JSXText') say(String(node.value));
    const attribute = node.type === 'JSXAttribute' && isNode(node.name) ? String(node.name.name) : '';
    if (SPOKEN_ATTRIBUTES.includes(attribute) && isNode(node.value) && typeof node.value.value === 'string')
      say(node.value.value);
    Object.values(node).forEach(visit);
  };
  visit(parseSync(file, text).program);
  return found;
}

describe('the catalogue', () => {
  it('has each key once', () => {
    const keys = catalogues.flatMap((catalogue) => Object.keys(catalogue));
    expect(keys.length).toBeGreaterThan(300);
    expect(keys.filter((key, index) => keys.indexOf(key) !== index)).toEqual([]);
  });

  it('has no message that nothing says', () => {
    const unsaid = catalogues
      .flatMap(Object.keys)
      .filter((key) => !everything.includes(`'${key}'`) && !prefixes.some((prefix) => key.startsWith(prefix)));
    expect(unsaid).toEqual([]);
  });

  it('has no empty message, and the same places in both plural forms', () => {
    for (const [key, message] of catalogues.flatMap((catalogue) => Object.entries(catalogue))) {
      const forms: string[] = typeof message === 'string' ? [message] : [message.one, message.other];
      expect(
        forms.every((form) => form.trim() !== ''),
        key,
      ).toBe(true);
      const places = forms.map((form) => [...form.matchAll(/\{\w+\}/g)].map(String).sort().join());
      expect(new Set(places).size, key).toBe(1);
    }
  });

  it('holds every word of the components: none has words of its own', () => {
    const spoken = sources
      .filter(({ file }) => file.endsWith('.tsx'))
      .flatMap(({ file, text }) => listSpoken(file, text).map((words) => `${file}: ${words}`));
    expect(listSpoken('canary.tsx', '<p title="Hello there">Good morning</p>')).toEqual([
      'Hello there',
      'Good morning',
    ]);
    expect(spoken).toEqual([]);
  });
});

describe('a message', () => {
  it('is filled, with thousands separators and the right plural', () => {
    const message = { one: '{count} pump', other: '{count} pumps' };
    expect(fillMessage(message, { count: 1 })).toBe('1 pump');
    expect(fillMessage(message, { count: 1200 })).toBe('1,200 pumps');
  });

  it('keeps a place that nobody filled in sight rather than hide it', () => {
    expect(fillMessage('since {time}', {})).toBe('since {time}');
  });

  it('does not fill places inside what it was filled with', () => {
    expect(fillMessage('{name} at {pad}', { name: '{pad}', pad: 'Weir House' })).toBe('{pad} at Weir House');
  });
});
