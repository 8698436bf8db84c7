import type { Changes } from '#shared/contract/http/changes.ts';
import type { ServerFrame } from '#shared/contract/socket/frames.ts';
import { compareCursors } from './compare-cursors.ts';
import { gatherNews, type News } from './gather-news.ts';

type NewsFrame = Extract<ServerFrame, { type: 'news' }>;

export type LiveNewsDependencies = {
  readonly listChanges: (since: string) => Promise<Changes>;
  readonly apply: (news: News) => void;
  /** Everything on screen may be out of date: ask for it again. */
  readonly reloadAll: () => void;
  /** What could not be read during a break can be read now. */
  readonly reloadFailed: () => void;
  readonly setServerNow: (serverNow: number) => void;
  /** Calls back once, a moment later. */
  readonly defer: (run: () => void, ms: number) => void;
};

/** Screens redraw at most four times a second. */
const FLUSH_MS = 250;

/**
 * Turns frames into news for the cache, and closes the gap after a break: what happened between the last cursor and
 * now comes by GET /api/changes, frames that arrive meanwhile wait, and those the answer already covers are dropped. A
 * gap that could not be closed is tried again with every heartbeat, from where it began.
 */
export function createLiveNews(needs: LiveNewsDependencies): (frame: ServerFrame) => void {
  let cursor: string | undefined;
  /** Where a gap begins that nobody could close yet. */
  let gapFrom: string | undefined;
  let waiting: NewsFrame[] = [];
  let deferred = false;
  let closingGap = false;
  let brokeAgain = false;

  const flush = () => {
    deferred = false;
    if (closingGap || waiting.length === 0) return;
    const frames = waiting;
    waiting = [];
    cursor = frames.at(-1)?.cursor ?? cursor;
    needs.apply(gatherNews(frames));
  };

  const readGap = async (since: string) => {
    try {
      const changes = await needs.listChanges(since);
      gapFrom = undefined;
      cursor = changes.cursor;
      needs.setServerNow(changes.serverNow);
      waiting = waiting.filter((frame) => compareCursors(frame.cursor, changes.cursor) > 0);
      if (!changes.complete) return needs.reloadAll();
      needs.apply(changes);
      needs.reloadFailed();
    } catch {
      // Nobody can say what was missed: the screens are read again from the beginning.
      gapFrom = since;
      needs.reloadAll();
    }
  };

  const closeGap = async () => {
    // Another break before the answer: what lies between the answer and now is missing as well.
    brokeAgain = closingGap;
    if (closingGap) return;
    closingGap = true;
    for (let since = gapFrom ?? cursor; since !== undefined; since = brokeAgain ? (gapFrom ?? cursor) : undefined) {
      brokeAgain = false;
      await readGap(since);
    }
    closingGap = false;
    flush();
  };

  const handle: { readonly [Type in ServerFrame['type']]: (frame: Extract<ServerFrame, { type: Type }>) => void } = {
    hello: (frame) => {
      needs.setServerNow(frame.serverNow);
      if (cursor !== undefined) return void closeGap();
      cursor = frame.cursor;
      needs.reloadAll();
    },
    heartbeat: (frame) => {
      needs.setServerNow(frame.serverNow);
      if (gapFrom !== undefined && !closingGap) return void closeGap();
      if (!closingGap && waiting.length === 0) cursor = frame.cursor;
    },
    news: (frame) => {
      waiting.push(frame);
      if (deferred) return;
      deferred = true;
      needs.defer(flush, FLUSH_MS);
    },
    resync: () => (cursor === undefined ? needs.reloadAll() : void closeGap()),
  };

  return (frame) => {
    if (frame.type === 'hello') handle.hello(frame);
    else if (frame.type === 'heartbeat') handle.heartbeat(frame);
    else if (frame.type === 'news') handle.news(frame);
    else handle.resync(frame);
  };
}
