import WebSocket from 'ws';
import { LIVE_PATH, ServerFrame } from '#shared/contract/socket/frames.ts';

/** A manager's open screen, as far as the wire goes. */
export type LiveWatcher = {
  /** Watches these pumps and calls back with each one's newest device time, ms. */
  readonly watch: (pumpIds: readonly string[], onNews: (pumpId: string, at: number) => void) => void;
  readonly close: () => void;
};

type Address = { readonly httpPort: number; readonly publicUrl: string };
type Person = { readonly email: string; readonly password: string };

/** Signs in as a browser does and opens the live connection. */
export async function openLiveWatcher({ httpPort, publicUrl }: Address, person: Person): Promise<LiveWatcher> {
  const answer = await fetch(`http://127.0.0.1:${httpPort}/api/session`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: publicUrl },
    body: JSON.stringify(person),
  });
  if (answer.status !== 201) throw new Error(`signing in answered ${answer.status}: ${await answer.text()}`);
  const cookie = answer.headers
    .getSetCookie()
    .map((text) => text.split(';')[0])
    .join('; ');
  const socket = new WebSocket(`ws://127.0.0.1:${httpPort}${LIVE_PATH}`, { headers: { cookie, origin: publicUrl } });
  await new Promise<void>((resolve, reject) => {
    socket.once('open', () => resolve());
    socket.once('error', reject);
  });
  return {
    watch: (pumpIds, onNews) => {
      socket.on('message', (data) => {
        const frame = ServerFrame.parse(JSON.parse(String(data)));
        if (frame.type === 'heartbeat') socket.send(JSON.stringify({ type: 'heartbeat' }));
        if (frame.type !== 'news') return;
        for (const { pumpId, now } of frame.pumps) if (now !== null) onNews(pumpId, now.at);
      });
      socket.send(JSON.stringify({ type: 'watch', pumps: pumpIds }));
    },
    close: () => socket.terminate(),
  };
}
