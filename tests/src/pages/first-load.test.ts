import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { beforeAll, describe, expect, it } from 'vitest';
import { builtClient } from './built-client.ts';

/** What signing in and opening the fleet may cost in all, JavaScript and CSS, gzip. Source: the product's own limit. */
const MOST_BYTES = 190_000;

let assets = '';
beforeAll(async () => {
  assets = join(await builtClient(), 'assets');
}, 120_000);

const read = (name: string) => readFileSync(join(assets, name), 'utf8');
const find = (start: string) => {
  const name = readdirSync(assets).find((file) => file.startsWith(start) && file.endsWith('.js'));
  if (name === undefined) throw new Error(`no ${start} among the assets`);
  return name;
};

/** A file and everything that it imports without being asked to. */
function reach(name: string, reached = new Set<string>()): Set<string> {
  if (reached.has(name)) return reached;
  reached.add(name);
  for (const match of read(name).matchAll(/(?:from|import)\s*["']\.\/([\w.-]+\.js)["']/g))
    reach(match[1] ?? '', reached);
  return reached;
}

const page = () => readFileSync(join(assets, '../index.html'), 'utf8');
const named = (extension: string) =>
  [...page().matchAll(new RegExp(`/assets/([\\w.-]+\\.${extension})`, 'g'))].map((match) => match[1] ?? '');

describe('the first load', () => {
  it('of sign-in and fleet stays under 190 kB', () => {
    const scripts = new Set(named('js'));
    for (const start of [...named('js'), find('sign-in-page'), find('fleet-page')]) reach(start, scripts);
    for (const start of [...named('js'), find('sign-in-page'), find('fleet-page')])
      for (const each of reach(start)) scripts.add(each);
    const bytes = [...scripts, ...named('css')].reduce((sum, name) => sum + gzipSync(read(name)).length, 0);
    expect(bytes).toBeLessThan(MOST_BYTES);
    expect(bytes).toBeGreaterThan(100_000);
  });

  it('brings no chart library', () => {
    const scripts = [...reach(find('fleet-page')), ...named('js').flatMap((name) => [...reach(name)])];
    expect(scripts.filter((name) => name.startsWith('time-chart'))).toEqual([]);
  });

  it('brings no words that only later pages say', () => {
    const scripts = [...reach(find('fleet-page')), ...named('js').flatMap((name) => [...reach(name)])];
    expect(scripts.filter((name) => read(name).includes('pump.wiring.none'))).toEqual([]);
    const all = readdirSync(assets).filter((name) => name.endsWith('.js'));
    expect(all.some((name) => read(name).includes('pump.wiring.none'))).toBe(true);
  });

  it('has no script of its own in the page, so that the strictest policy holds', () => {
    expect(page()).not.toMatch(/<script(?![^>]*\bsrc=)/);
    expect(page()).not.toMatch(/\son\w+=|style=/);
  });
});
