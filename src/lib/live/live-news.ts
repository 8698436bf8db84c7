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
  readonly setServerNow: (serverNow: number) => void;
  /** Calls back once, a moment later. */
  readonly defer: (run: () => void, ms: number) => void;
};

/** Screens redraw at most four times a second. */
const FLUSH_MS = 250;

/**
 * Turns frames into news for the cache, and closes the gap after a break: what happened between the last cursor and
 * now comes by GET /api/changes, frames that arrive meanwhile wait, and those the answer already covers are dropped.
 */
export function createLiveNews(needs: LiveNewsDependencies): (frame: ServerFrame) => void {
  let cursor: string | undefined;
  let waiting: NewsFrame[] = [];
  let deferred = false;
  let closingGap = false;

  const flush = () => {
    deferred = false;
    if (closingGap || waiting.length === 0) return;
    const frames = waiting;
    waiting = [];
    cursor = frames.at(-1)?.cursor ?? cursor;
    needs.apply(gatherNews(frames));
  };

  const closeGap = async (since: string) => {
    if (closingGap) return;
    closingGap = true;
    try {
      const changes = await needs.listChanges(since);
      cursor = changes.cursor;
      needs.setServerNow(changes.serverNow);
      waiting = waiting.filter((frame) => compareCursors(frame.cursor, changes.cursor) > 0);
      if (changes.complete) needs.apply(changes);
      else needs.reloadAll();
    } catch {
      // Nobody can say what was missed: the screens are read again from the beginning.
      needs.reloadAll();
    } finally {
      closingGap = false;
      flush();
    }
  };

  const handle: { readonly [Type in ServerFrame['type']]: (frame: Extract<ServerFrame, { type: Type }>) => void } = {
    hello: (frame) => {
      needs.setServerNow(frame.serverNow);
      if (cursor !== undefined) return void closeGap(cursor);
      cursor = frame.cursor;
      needs.reloadAll();
    },
    heartbeat: (frame) => {
      needs.setServerNow(frame.serverNow);
      if (!closingGap && waiting.length === 0) cursor = frame.cursor;
    },
    news: (frame) => {
      waiting.push(frame);
      if (deferred) return;
      deferred = true;
      needs.defer(flush, FLUSH_MS);
    },
    resync: () => (cursor === undefined ? needs.reloadAll() : void closeGap(cursor)),
  };

  return (frame) => {
    if (frame.type === 'hello') handle.hello(frame);
    else if (frame.type === 'heartbeat') handle.heartbeat(frame);
    else if (frame.type === 'news') handle.news(frame);
    else handle.resync(frame);
  };
}
