import fc from 'fast-check';
import mqttPacket from 'mqtt-packet';
import { describe, expect, it } from 'vitest';
import { createFrameWalker, type FrameFault } from '#server/broker/frame-walker.ts';

const LIMITS = { firstPacketBytes: 4096, packetBytes: 131_072 };
const CONNECT = mqttPacket.generate({
  cmd: 'connect',
  clientId: 'MR-000001',
  keepalive: 60,
  clean: true,
  protocolVersion: 4,
});
const publish = (bytes: number) =>
  mqttPacket.generate({
    cmd: 'publish',
    topic: 't',
    payload: Buffer.alloc(bytes),
    qos: 1,
    messageId: 7,
    dup: false,
    retain: false,
  });

/** The faults after each piece of a stream cut at the given lengths. */
function walkInPieces(stream: Buffer, lengths: readonly number[]): (FrameFault | undefined)[] {
  const walk = createFrameWalker(LIMITS);
  const faults: (FrameFault | undefined)[] = [];
  let place = 0;
  for (const length of [...lengths, stream.length]) {
    faults.push(walk(stream.subarray(place, place + length)));
    place += length;
  }
  return faults;
}

describe('the frame walker', () => {
  it('lets packets of any size up to the limit pass, however they are cut', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 0, max: 130_000 }), { maxLength: 5 }),
        fc.array(fc.integer({ min: 1, max: 70_000 }), { maxLength: 20 }),
        (bodies, cuts) => {
          const stream = Buffer.concat([CONNECT, ...bodies.map(publish)]);
          expect(walkInPieces(stream, cuts).every((fault) => fault === undefined)).toBe(true);
        },
      ),
    );
  });

  it('refuses a packet by its announced length, before its body', () => {
    const walk = createFrameWalker(LIMITS);
    expect(walk(CONNECT)).toBeUndefined();
    // PUBLISH, remaining length 131,073 in three bytes.
    expect(walk(Buffer.from([0x32, 0x81, 0x80, 0x08]))).toBe('packet-too-large');
  });

  it('refuses a large first packet after its fixed header', () => {
    // CONNECT with the largest length the protocol knows, 268,435,455 (MQTT 3.1.1, table 2.4).
    expect(createFrameWalker(LIMITS)(Buffer.from([0x10, 0xff, 0xff, 0xff, 0x7f]))).toBe('packet-too-large');
  });

  it('refuses a length of more than four bytes', () => {
    // Zero written in five bytes: MQTT 3.1.1 section 2.2.3 allows four.
    expect(createFrameWalker(LIMITS)(Buffer.from([0x10, 0x80, 0x80, 0x80, 0x80, 0x00]))).toBe('length-malformed');
  });

  it('refuses a stream that does not begin with CONNECT', () => {
    expect(createFrameWalker(LIMITS)(Buffer.from('GET / HTTP/1.1\r\n'))).toBe('not-a-connect');
  });

  it('goes on refusing once it has refused', () => {
    const walk = createFrameWalker(LIMITS);
    walk(Buffer.from([0xff]));
    expect(walk(CONNECT)).toBe('not-a-connect');
  });
});
