import { createServer, type Server, type Socket } from 'node:net';
import { createServer as createTlsServer } from 'node:tls';
import { MAX_PACKET_BYTES } from '#shared/contract/mqtt/wire-limits.ts';
import type { FrameFault } from './frame-walker.ts';
import { guardFrames } from './guard-frames.ts';

export type DeviceListenerOptions = {
  readonly host: string;
  /** PEM texts. Without them only a loopback address is served. */
  readonly tls: { readonly key: string; readonly certificate: string } | undefined;
  readonly maxConnections: number;
  readonly onSocket: (socket: Socket) => void;
  readonly onRefused: (reason: FrameFault | 'tls', address: string | undefined) => void;
};

/** A CONNECT of the wire has a serial twice, a secret and a short will: well under this. */
const FIRST_PACKET_BYTES = 4096;
const TLS_HANDSHAKE_MS = 10_000;
const LOOPBACK = /^(localhost|127\.\d+\.\d+\.\d+|::1|::ffff:127\.\d+\.\d+\.\d+)$/;

/** The port devices connect to: TLS where keys are given, plain on loopback only. Throws on a plain outside address. */
export function createDeviceServer(options: DeviceListenerOptions): Server {
  if (options.tls === undefined && !LOOPBACK.test(options.host)) {
    throw new Error(
      `Devices may not be served without TLS on ${options.host}: set MQTT_TLS_KEY and MQTT_TLS_CERT, or listen on 127.0.0.1.`,
    );
  }
  const accept = (socket: Socket): void => {
    socket.setNoDelay(true);
    socket.on('error', () => socket.destroy());
    const limits = { firstPacketBytes: FIRST_PACKET_BYTES, packetBytes: MAX_PACKET_BYTES };
    guardFrames(socket, limits, (fault) => options.onRefused(fault, socket.remoteAddress));
    options.onSocket(socket);
  };
  const server = options.tls === undefined ? createServer(accept) : createSecureServer(options, options.tls, accept);
  server.maxConnections = options.maxConnections;
  return server;
}

function createSecureServer(
  options: DeviceListenerOptions,
  tls: { readonly key: string; readonly certificate: string },
  accept: (socket: Socket) => void,
): Server {
  const keys = { key: tls.key, cert: tls.certificate, handshakeTimeout: TLS_HANDSHAKE_MS };
  const server = createTlsServer(keys, accept);
  server.on('tlsClientError', (_error, socket) => options.onRefused('tls', socket.remoteAddress));
  return server;
}

/** Starts listening; the port that was taken. Throws the system's error with its code (EADDRINUSE) when it cannot. */
export function listen(server: Server, host: string, port: number): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => {
      server.off('error', reject);
      const address = server.address();
      resolve(typeof address === 'object' && address ? address.port : port);
    });
  });
}
