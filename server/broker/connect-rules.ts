import { buildTopic, isSerial } from '#shared/contract/mqtt/topics.ts';
import { KEEP_ALIVE_SECONDS } from '#shared/contract/mqtt/wire-limits.ts';
import { shardOfSerial } from './shard-of-serial.ts';

/** What of a CONNECT packet the rules look at. */
export type ConnectRequest = {
  readonly clientId: string;
  readonly username: string | undefined;
  readonly keepAliveSeconds: number;
  readonly willTopic: string | undefined;
};

export type ConnectFault = 'client-id-no-serial' | 'username-not-the-serial' | 'keep-alive' | 'will-topic';

/** CONNACK return codes of MQTT 3.1.1 section 3.2.2.3. */
export const CONNACK = { identifierRejected: 2, unavailable: 3, badCredentials: 4, notAuthorized: 5 } as const;

/**
 * The first rule of the wire that a CONNECT breaks, undefined when it breaks none. The password is not looked at.
 *
 * @example findConnectFault({ clientId: 'x', username: 'x', keepAliveSeconds: 60, willTopic: undefined })
 * // 'client-id-no-serial'
 */
export function findConnectFault(request: ConnectRequest): ConnectFault | undefined {
  const { clientId: serial, keepAliveSeconds, willTopic } = request;
  if (!isSerial(serial)) return 'client-id-no-serial';
  if (request.username !== serial) return 'username-not-the-serial';
  if (keepAliveSeconds < KEEP_ALIVE_SECONDS.min || keepAliveSeconds > KEEP_ALIVE_SECONDS.max) return 'keep-alive';
  const statusTopic = buildTopic({ shard: shardOfSerial(serial), serial, kind: 'status' });
  return willTopic === undefined || willTopic === statusTopic ? undefined : 'will-topic';
}

/** The code a device is refused with: MQTT 3.1.1 has no reason text, the reason goes to the log. */
export function connackCodeOf(fault: ConnectFault): number {
  if (fault === 'client-id-no-serial') return CONNACK.identifierRejected;
  return fault === 'username-not-the-serial' ? CONNACK.badCredentials : CONNACK.notAuthorized;
}
