import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import { type Json, restoreState, saveChanges } from '../plain-state.ts';
import type { LinkFacts, Outage } from './link-facts.ts';

type LinkState = {
  lastWordAt: number;
  listeningSince: number;
  heardSince: number;
  connection: string;
  connectionId: string;
  lostAt: number;
  boot: string;
  bootedAt: number;
  resumedAt: number;
  restartedAt: number;
  /** A will was heard once: then a connection that nobody gave up was there. */
  tellsLoss: boolean;
  connectedThroughAt: number;
  /** A new boot since the last reading. */
  bootPending: boolean;
  outages: Json[];
};

const restingLink = (): LinkState => ({
  lastWordAt: 0,
  listeningSince: 0,
  heardSince: 0,
  connection: 'unknown',
  connectionId: '',
  lostAt: 0,
  boot: '',
  bootedAt: 0,
  resumedAt: 0,
  restartedAt: 0,
  tellsLoss: false,
  connectedThroughAt: 0,
  bootPending: false,
  outages: [],
});

const KEPT_OUTAGES = 8;
const LEAST_SILENCE_MS = 120_000;
/** A broker gives a connection up after one and a half of its longest keep-alive, 300 s (MQTT 3.1.1, 3.1.2.10), ms; with some slack. */
const GIVEN_UP_MS = 600_000;

/** No word for longer than this is silence: three intervals, at least two minutes. */
export function silenceLimitMs({ intervalSeconds }: PumpContext): number {
  return Math.max(3 * intervalSeconds * 1000, LEAST_SILENCE_MS);
}

/** Follows words, connections, boots and outages of one device. */
export type LinkTracker = {
  readonly facts: LinkFacts;
  readonly hear: (event: PumpEvent) => void;
  /**
   * A reading that is folded, after `hear`: `previousAt` is the device time of the one before it, 0 = none; `ranOn` =
   * the motor turns at a speed other than its prime's, which it does not do just after power returned.
   */
  readonly read: (at: number, previousAt: number, gap: boolean, ranOn: boolean) => void;
  readonly save: () => Json;
};

/**
 * A tracker that goes on from what was saved.
 *
 * @example createLinkTracker(context, undefined).facts.connection // 'unknown'
 */
export function createLinkTracker(context: PumpContext, saved: unknown): LinkTracker {
  const state = restoreState(restingLink(), saved);
  const facts: LinkFacts = {
    lastWordAt: 0,
    listeningSince: 0,
    heardSince: 0,
    connection: 'unknown',
    lostAt: 0,
    reportsBoots: false,
    bootedAt: 0,
    resumedAt: 0,
    restartedAt: 0,
    connectedThroughAt: 0,
    outages: state.outages.flatMap(parseOutage),
    outageEnded: false,
  };
  const limitMs = silenceLimitMs(context);
  publish(facts, state);
  return {
    facts,
    hear: (event) => {
      if (event.kind === 'listening') state.listeningSince = event.receivedAt;
      if (event.kind === 'reading' || event.kind === 'status' || event.kind === 'settings') {
        if (event.receivedAt - state.lastWordAt > limitMs) state.heardSince = event.receivedAt;
        noteConnected(state, event.receivedAt);
        if (!(event.kind === 'status' && event.status.state === 'lost')) {
          state.lastWordAt = Math.max(state.lastWordAt, event.receivedAt);
          // Speaks after its will, without having said that it is back: it is there.
          if (state.connection === 'lost') state.connection = 'online';
          state.lostAt = 0;
        }
      }
      if (event.kind === 'status') hearStatus(state, event);
      publish(facts, state);
    },
    read: (at, previousAt, gap, ranOn) => {
      facts.outageEnded = previousAt !== 0 && (gap || state.bootPending);
      if (state.bootPending && ranOn) {
        // The device began anew and the motor did not: it was no power cut.
        state.restartedAt = state.bootedAt;
        facts.restartedAt = state.bootedAt;
        state.bootPending = false;
      }
      if (facts.outageEnded) {
        const outage: Outage = { from: previousAt, to: at, booted: state.bootPending };
        facts.outages = [...facts.outages, outage].slice(-KEPT_OUTAGES);
        state.outages = facts.outages.map(({ from, to, booted }) => [from, to, booted]);
      }
      state.bootPending = false;
    },
    save: () => saveChanges(restingLink(), state) ?? {},
  };
}

/**
 * Nothing was heard for so long that a broken connection would have been given up, and it was not: the device was there
 * and had nothing to say.
 */
function noteConnected(state: LinkState, at: number): void {
  const quietMs = at - Math.max(state.lastWordAt, state.listeningSince);
  if (state.lastWordAt === 0 || quietMs < GIVEN_UP_MS || !state.tellsLoss) return;
  if (state.connection === 'online') state.connectedThroughAt = at;
}

function hearStatus(state: LinkState, { status, receivedAt }: PumpEvent & { kind: 'status' }): void {
  if (status.state === 'lost') {
    // A take-over publishes the old will late.
    if (state.connectionId !== '' && status.connection !== state.connectionId) return;
    if (state.connection !== 'lost') state.lostAt = receivedAt;
    state.connection = 'lost';
    state.tellsLoss = true;
    return;
  }
  const known = state.boot !== '';
  if (known && status.boot !== state.boot) {
    state.bootedAt = receivedAt;
    state.bootPending = true;
  } else if (known) state.resumedAt = receivedAt;
  state.boot = status.boot;
  state.connection = 'online';
  state.connectionId = status.connection;
}

function publish(facts: LinkFacts, state: LinkState): void {
  facts.lastWordAt = state.lastWordAt;
  facts.listeningSince = state.listeningSince;
  facts.heardSince = state.heardSince;
  facts.connection = state.connection === 'online' || state.connection === 'lost' ? state.connection : 'unknown';
  facts.lostAt = state.lostAt;
  facts.reportsBoots = state.boot !== '';
  facts.bootedAt = state.bootedAt;
  facts.resumedAt = state.resumedAt;
  facts.restartedAt = state.restartedAt;
  facts.connectedThroughAt = state.connectedThroughAt;
}

function parseOutage(value: Json): Outage[] {
  if (!Array.isArray(value)) return [];
  const [from, to, booted]: readonly Json[] = value;
  return typeof from === 'number' && typeof to === 'number' ? [{ from, to, booted: booted === true }] : [];
}
