import type { AuthenticateError, Client, ConnectPacket } from 'aedes';
import { CONNACK, type ConnectRequest, connackCodeOf, findConnectFault } from './connect-rules.ts';
import { createConnectedDevice } from './connected-device.ts';
import { type DeviceCredential, isDeviceSecret } from './device-credential.ts';
import type { DeviceRegistry } from './device-registry.ts';
import type { RefusalLog } from './refusal-log.ts';

export type SignInOptions = {
  readonly deviceKey: Buffer | string;
  readonly findCredential: (serial: string) => Promise<DeviceCredential | undefined>;
  readonly registry: DeviceRegistry;
  readonly now: () => number;
  readonly isQuiet: () => boolean;
  readonly sayRefused: RefusalLog;
  readonly onSignedIn: (serial: string) => void;
};

type SignIn = {
  readonly preConnect: (
    client: Client,
    packet: ConnectPacket,
    callback: (error: Error | null, go: boolean) => void,
  ) => void;
  readonly authenticate: (
    client: Client,
    username: string | undefined,
    password: Buffer | undefined,
    callback: (error: AuthenticateError | null, go: boolean | null) => void,
  ) => void;
};

/** The two hooks through which a CONNECT packet passes. */
export function createSignIn(options: SignInOptions): SignIn {
  const requests = new WeakMap<Client, ConnectRequest>();
  return {
    preConnect: (client, packet, callback) => {
      // The session is always clean, whatever was asked for: what has to last lasts in the database.
      packet.clean = true;
      requests.set(client, {
        clientId: packet.clientId,
        username: packet.username,
        keepAliveSeconds: packet.keepalive ?? 0,
        willTopic: packet.will?.topic,
      });
      callback(options.isQuiet() ? new Error('the server is stopping') : null, !options.isQuiet());
    },
    authenticate: (client, _username, password, callback) => {
      const request = requests.get(client);
      decide(options, client, request, password).then(
        (code) => (code === undefined ? callback(null, true) : callback(refusal(code), null)),
        () => callback(refusal(CONNACK.unavailable), null),
      );
    },
  };
}

/** The CONNACK code of a refusal, undefined = welcome. */
async function decide(
  options: SignInOptions,
  client: Client,
  request: ConnectRequest | undefined,
  password: Buffer | undefined,
): Promise<number | undefined> {
  if (request === undefined) return CONNACK.notAuthorized;
  const serial = request.clientId;
  const fault = findConnectFault(request);
  if (fault !== undefined) {
    options.sayRefused(fault, { serial: serial.slice(0, 64) });
    return connackCodeOf(fault);
  }
  const credential = await options.findCredential(serial);
  if (credential === undefined || !isDeviceSecret(options.deviceKey, credential, password ?? Buffer.alloc(0))) {
    options.sayRefused(credential === undefined ? 'device-unknown' : 'secret-wrong', { serial });
    return CONNACK.badCredentials;
  }
  if (client.closed) return undefined;
  options.registry.add(createConnectedDevice(serial, client, options.now));
  options.onSignedIn(serial);
  return undefined;
}

function refusal(returnCode: number): AuthenticateError {
  return Object.assign(new Error('refused'), { returnCode });
}
