import { readFileSync, renameSync, writeFileSync } from 'node:fs';

/**
 * Where the demo's story stands: the seed, beginning and end of the history that was generated, and up to when readings
 * have been made since, ms. The live fleet plays the same story from its beginning, unwatched, and goes on from there.
 */
export type StoryMark = {
  readonly seed: string;
  readonly from: number;
  readonly to: number;
  readonly until: number;
};

/** The file's name in the data folder. */
export const STORY_MARK_FILE = 'demo-story.json';

/** Reads a mark; undefined when there is none, or none that can be read. */
export function readStoryMark(path: string): StoryMark | undefined {
  try {
    return parseStoryMark(JSON.parse(readFileSync(path, 'utf8')));
  } catch {
    return undefined;
  }
}

/** Writes a mark so that a crash leaves the old one or the new one. */
export function writeStoryMark(path: string, mark: StoryMark): void {
  writeFileSync(`${path}.new`, `${JSON.stringify(mark)}\n`);
  renameSync(`${path}.new`, path);
}

function parseStoryMark(value: unknown): StoryMark | undefined {
  if (typeof value !== 'object' || value === null) return undefined;
  const { seed, from, to, until } = value as Partial<Record<keyof StoryMark, unknown>>;
  if (typeof seed !== 'string' || !isInstant(from) || !isInstant(to) || !isInstant(until)) return undefined;
  return { seed, from, to, until };
}

function isInstant(value: unknown): value is number {
  return typeof value === 'number' && Number.isSafeInteger(value);
}
