import type { Reading } from '#shared/contract/mqtt/readings.ts';
import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import type { DeviceStatus } from '#shared/contract/mqtt/status.ts';
import { MAX_READINGS_PER_MESSAGE } from '#shared/contract/mqtt/wire-limits.ts';
import type { News } from '#simulator/virtual-pump.ts';
import { createDeviceIdentity, type IdentityOptions } from './device-identity.ts';

/** One message as it reaches a server, at its arrival, ms. */
export type Arrival = { readonly at: number; readonly serial: string } & (
  | { readonly kind: 'readings'; readonly readings: readonly Reading[] }
  | { readonly kind: 'status'; readonly status: DeviceStatus }
  | { readonly kind: 'settings'; readonly settings: MotorSettings }
  | { readonly kind: 'on-site'; readonly on: boolean }
);

export type InProcessDevice = {
  readonly hear: (news: News) => void;
  /** Delivers what falls due by `until` although the device says nothing: its last will. */
  readonly settle: (until: number) => void;
};

/** What a device keeps while its link is down: six hours at a reading every five seconds. */
const BUFFER_LIMIT = 4320;
/** A broker gives up on a silent client after one and a half keep-alives; these devices ask for 120 s. */
const WILL_DELAY_MS = 180_000;
const RECONNECT_MS = { min: 4000, max: 40_000 };

/**
 * A device with a link that is up or down by script, and nothing between it and the reader. Latency, ms, is the
 * caller's; messages of one device never overtake one another.
 */
export function createInProcessDevice(
  serial: string,
  identityOptions: Pick<IdentityOptions, 'firmware' | 'storySeed'>,
  latencyMs: () => number,
  deliver: (arrival: Arrival) => void,
): InProcessDevice {
  const { storySeed } = identityOptions;
  const identity = createDeviceIdentity({ ...identityOptions, serial, connectionSeed: storySeed });
  const buffer: Reading[] = [];
  let connectAt = Number.POSITIVE_INFINITY;
  let connection: string | undefined;
  let will: { readonly at: number; readonly connection: string } | undefined;
  let settings: MotorSettings | undefined;
  let alive = false;
  let linkUp = true;
  let lastArrival = 0;

  const arrival = (at: number) => {
    lastArrival = Math.max(lastArrival, Math.round(at + latencyMs()));
    return lastArrival;
  };

  const connect = (at: number) => {
    connectAt = Number.POSITIVE_INFINITY;
    connection = identity.nextConnection();
    deliver({ at: arrival(at), serial, kind: 'status', status: identity.online(connection, at) });
    // The old connection's will comes late, after the new one took over.
    if (will !== undefined) sendWill(at);
    if (settings !== undefined) deliver({ at: arrival(at), serial, kind: 'settings', settings });
    while (buffer.length > 0) {
      const readings = buffer.splice(0, MAX_READINGS_PER_MESSAGE);
      deliver({ at: arrival(at + 200), serial, kind: 'readings', readings });
    }
  };

  const sendWill = (at: number) => {
    if (will === undefined) return;
    deliver({ at: arrival(at), serial, kind: 'status', status: { state: 'lost', connection: will.connection } });
    will = undefined;
  };

  const disconnect = (at: number) => {
    connectAt = Number.POSITIVE_INFINITY;
    if (connection === undefined) return;
    will = { at: at + WILL_DELAY_MS, connection };
    connection = undefined;
  };

  const settle = (until: number) => {
    if (will !== undefined && will.at <= Math.min(until, connectAt)) sendWill(will.at);
    if (connectAt <= until) connect(connectAt);
  };

  const hear = (news: News): void => {
    settle(news.at);
    switch (news.kind) {
      case 'device':
        alive = news.up;
        if (!alive) disconnect(news.at);
        else {
          identity.boot(news.boot, news.since);
          if (linkUp) connect(news.at);
        }
        return;
      case 'link':
        linkUp = news.up;
        if (!linkUp) disconnect(news.at);
        else if (alive) connectAt = news.at + identity.between(RECONNECT_MS.min, RECONNECT_MS.max);
        return;
      case 'settings':
        settings = news.settings;
        if (connection !== undefined) deliver({ at: arrival(news.at), serial, kind: 'settings', settings });
        return;
      case 'on-site':
        deliver({ at: news.at, serial, kind: 'on-site', on: news.on });
        return;
      case 'reading':
        if (connection !== undefined) {
          deliver({ at: arrival(news.at), serial, kind: 'readings', readings: [news.reading] });
        } else {
          buffer.push(news.reading);
          if (buffer.length > BUFFER_LIMIT) buffer.shift();
        }
    }
  };
  return { hear, settle };
}
