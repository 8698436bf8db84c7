import { CLOSE_NOT_SIGNED_IN, type ClientFrame, ServerFrame } from '#shared/contract/socket/frames.ts';
import { judgeSilence, type LinkPhase } from './link-state.ts';
import { reconnectDelay } from './reconnect-delay.ts';

/** What the connection needs of the outside: the real page gives it the browser's, a test its own. */
export type LiveSocketDependencies = {
  readonly open: () => WebSocket;
  readonly now: () => number;
  readonly chance: () => number;
  readonly isOnline: () => boolean;
  readonly renewSession: () => Promise<boolean>;
  readonly onFrame: (frame: ServerFrame) => void;
  readonly onPhase: (phase: LinkPhase, heardAt: number | undefined) => void;
  readonly listWatched: () => string[];
};

const TICK_MS = 1000;

/**
 * Keeps one live connection up for as long as it is started: answers heartbeats, gives up a silent connection, comes
 * back with growing waits, renews the session when the server asks who we are.
 */
export class LiveSocket {
  readonly #needs: LiveSocketDependencies;
  #socket: WebSocket | undefined;
  #ticker: ReturnType<typeof setInterval> | undefined;
  #retry: ReturnType<typeof setTimeout> | undefined;
  #heardAt: number | undefined;
  #attempt = 0;
  #watched = '';

  constructor(needs: LiveSocketDependencies) {
    this.#needs = needs;
  }

  start(): void {
    if (this.#ticker !== undefined) return;
    this.#ticker = setInterval(() => this.#tick(), TICK_MS);
    this.#connect();
  }

  stop(): void {
    clearInterval(this.#ticker);
    clearTimeout(this.#retry);
    this.#ticker = undefined;
    this.#leave();
  }

  /** Comes back at once, for example when the network returns, without waiting out the delay. */
  hurry(): void {
    if (this.#ticker === undefined || this.#socket !== undefined) return;
    this.#attempt = 0;
    this.#connect();
  }

  /** Tells the server what is on screen now, when that has changed. */
  sendWatched(): void {
    const pumps = this.#needs.listWatched();
    const text = pumps.join();
    if (text === this.#watched || this.#socket?.readyState !== WebSocket.OPEN) return;
    this.#watched = text;
    this.#send({ type: 'watch', pumps });
  }

  #connect(): void {
    clearTimeout(this.#retry);
    const socket = this.#needs.open();
    this.#socket = socket;
    this.#watched = '';
    const isCurrent = () => this.#socket === socket;
    let opened = false;
    socket.addEventListener('open', () => {
      opened = true;
    });
    socket.addEventListener('message', ({ data }) => isCurrent() && this.#hear(data));
    socket.addEventListener('close', ({ code }) => isCurrent() && void this.#closed(code, opened));
  }

  #hear(data: unknown): void {
    const frame = ServerFrame.safeParse(parseJson(data));
    if (!frame.success) return;
    this.#heardAt = this.#needs.now();
    this.#attempt = 0;
    this.#needs.onPhase('live', this.#heardAt);
    this.#needs.onFrame(frame.data);
    if (frame.data.type === 'hello') this.sendWatched();
    if (frame.data.type === 'heartbeat') this.#send({ type: 'heartbeat' });
  }

  async #closed(code: number, opened: boolean): Promise<void> {
    this.#socket = undefined;
    if (this.#ticker === undefined) return;
    // A refused upgrade reaches the browser without its status: the first time it may be a session that has run out.
    const renewed =
      code === CLOSE_NOT_SIGNED_IN || (!opened && this.#attempt === 0) ? await this.#needs.renewSession() : true;
    if (code === CLOSE_NOT_SIGNED_IN && !renewed) return this.#needs.onPhase('signed-out', this.#heardAt);
    if (this.#ticker !== undefined && this.#socket === undefined) this.#comeBack();
  }

  #comeBack(): void {
    this.#needs.onPhase(this.#needs.isOnline() ? 'broken' : 'offline', this.#heardAt);
    clearTimeout(this.#retry);
    this.#retry = setTimeout(() => this.#connect(), reconnectDelay(this.#attempt, this.#needs.chance()));
    this.#attempt += 1;
  }

  #tick(): void {
    if (this.#socket?.readyState !== WebSocket.OPEN || this.#heardAt === undefined) return;
    // Without a network a socket stays open and silent: no need to wait for the silence to grow.
    const verdict = this.#needs.isOnline() ? judgeSilence(this.#needs.now() - this.#heardAt) : 'dead';
    if (verdict === 'stale') this.#needs.onPhase('stale', this.#heardAt);
    if (verdict !== 'dead') return;
    this.#leave();
    this.#comeBack();
  }

  #leave(): void {
    const socket = this.#socket;
    this.#socket = undefined;
    socket?.close();
  }

  #send(frame: ClientFrame): void {
    this.#socket?.send(JSON.stringify(frame));
  }
}

const parseJson = (data: unknown): unknown => {
  try {
    return typeof data === 'string' ? JSON.parse(data) : undefined;
  } catch {
    return undefined;
  }
};
