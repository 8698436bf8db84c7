import { LIVE_PATH } from '#shared/contract/socket/frames.ts';
import { renewSession } from '../api/session-renewal.ts';
import { liveLink } from './live-link.ts';
import { createLiveNews, type LiveNewsDependencies } from './live-news.ts';
import { LiveSocket } from './live-socket.ts';
import { watchedPumps } from './watched-pumps.ts';

export type LiveNeeds = Pick<
  LiveNewsDependencies,
  'listChanges' | 'apply' | 'reloadAll' | 'reloadFailed' | 'setServerNow'
>;

const openSocket = (): WebSocket => new WebSocket(LIVE_PATH);

/** Starts the one live connection of the page; answers the way to stop it. */
export function startLive(needs: LiveNeeds): () => void {
  const socket = new LiveSocket({
    open: openSocket,
    now: () => Date.now(),
    chance: () => Math.random(),
    isOnline: () => navigator.onLine,
    renewSession,
    onFrame: createLiveNews({ ...needs, defer: (run, ms) => setTimeout(run, ms) }),
    onPhase: (phase, heardAt) => liveLink.set({ phase, heardAt }),
    listWatched: () => [...watchedPumps.watched.get()],
  });
  const hurry = () => socket.hurry();
  const stopWatching = watchedPumps.watched.subscribe(() => socket.sendWatched());
  addEventListener('online', hurry);
  addEventListener('offline', hurry);
  document.addEventListener('visibilitychange', hurry);
  socket.start();
  return () => {
    stopWatching();
    removeEventListener('online', hurry);
    removeEventListener('offline', hurry);
    document.removeEventListener('visibilitychange', hurry);
    socket.stop();
    liveLink.set({ phase: 'connecting', heardAt: undefined });
  };
}
