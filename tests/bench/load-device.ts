import { connect, type Socket } from 'node:net';
import mqttPacket from 'mqtt-packet';

/** One device of the load: its connection, what it has under way, and how it counts what was acknowledged. */
export type LoadDevice = {
  readonly socket: Socket;
  readonly topic: Buffer;
  inFlight: number;
  nextId: number;
};

export type DeviceLogin = { readonly serial: string; readonly secret: string; readonly topic: string };

const PUBACK_BYTES = 4;

/** Connects and signs in; `onAcknowledged` is called with how many PUBACKs a read brought. */
export function connectDevice(
  port: number,
  { serial, secret, topic }: DeviceLogin,
  onAcknowledged: (device: LoadDevice, count: number) => void,
): Promise<LoadDevice> {
  const socket = connect(port, '127.0.0.1');
  socket.setNoDelay(true);
  const device: LoadDevice = { socket, topic: Buffer.from(topic), inFlight: 0, nextId: 1 };
  const packet = { cmd: 'connect' as const, clientId: serial, username: serial, password: Buffer.from(secret) };
  socket.write(mqttPacket.generate({ ...packet, keepalive: 300, clean: true, protocolVersion: 4, protocolId: 'MQTT' }));
  let isWelcome = false;
  let pending = 0;
  return new Promise((resolve, reject) => {
    socket.once('error', reject);
    socket.once('close', () => reject(new Error(`${serial} was disconnected`)));
    socket.on('data', (chunk) => {
      // CONNACK and PUBACK both have four bytes, and nothing else comes.
      pending += chunk.length;
      let packets = Math.floor(pending / PUBACK_BYTES);
      pending -= packets * PUBACK_BYTES;
      if (!isWelcome && packets > 0) {
        if (chunk[3] !== 0) return reject(new Error(`${serial} was refused with code ${chunk[3]}`));
        isWelcome = true;
        packets -= 1;
        resolve(device);
      }
      if (packets > 0) {
        device.inFlight -= packets;
        onAcknowledged(device, packets);
      }
    });
  });
}

/** Writes one PUBLISH at QoS 1. */
export function publish(device: LoadDevice, payload: string): void {
  const bodyLength = 2 + device.topic.length + 2 + payload.length;
  const header = headerOf(bodyLength);
  const packet = Buffer.allocUnsafe(header.length + bodyLength);
  packet.set(header, 0);
  let place = packet.writeUInt16BE(device.topic.length, header.length);
  packet.set(device.topic, place);
  place = packet.writeUInt16BE(device.nextId, place + device.topic.length);
  packet.write(payload, place, 'latin1');
  device.nextId = (device.nextId % 65_535) + 1;
  device.inFlight += 1;
  device.socket.write(packet);
}

/** Fixed header of a PUBLISH at QoS 1 (MQTT 3.1.1 sections 2.2 and 3.3). */
function headerOf(bodyLength: number): number[] {
  const bytes = [0x32];
  let rest = bodyLength;
  do {
    const digit = rest % 128;
    rest = Math.floor(rest / 128);
    bytes.push(rest > 0 ? digit | 0x80 : digit);
  } while (rest > 0);
  return bytes;
}
