export type FrameLimits = {
  /** The largest first packet (CONNECT), bytes after its fixed header: nobody has signed in yet. */
  readonly firstPacketBytes: number;
  /** The largest later packet, bytes after its fixed header. */
  readonly packetBytes: number;
};

export type FrameFault = 'packet-too-large' | 'length-malformed' | 'not-a-connect';

/** Walks the chunks of one connection; answers the first fault, and the same one for ever after. */
export type FrameWalker = (chunk: Uint8Array) => FrameFault | undefined;

/** MQTT 3.1.1 section 2.2.3: the remaining length takes at most four bytes. */
const LONGEST_LENGTH_FIELD = 4;
/** MQTT 3.1.1 section 2.2.1: the control packet type of CONNECT. */
const CONNECT = 1;

/**
 * Reads nothing but the fixed headers of an MQTT byte stream, so that a packet is refused by its announced length
 * before a byte of it is kept: the broker's own parser gathers up to 256 MB for anybody who asks.
 */
export function createFrameWalker(limits: FrameLimits): FrameWalker {
  let bodyBytes = 0;
  let length = 0;
  let lengthBytes = -1;
  let isFirst = true;
  let fault: FrameFault | undefined;

  const startPacket = (type: number): void => {
    lengthBytes = 0;
    length = 0;
    if (isFirst && type !== CONNECT) fault = 'not-a-connect';
  };
  const readLength = (byte: number): void => {
    length += (byte & 0x7f) * 128 ** lengthBytes;
    lengthBytes += 1;
    if (length > (isFirst ? limits.firstPacketBytes : limits.packetBytes)) fault = 'packet-too-large';
    else if (byte < 0x80) {
      bodyBytes = length;
      lengthBytes = -1;
      isFirst = false;
    } else if (lengthBytes === LONGEST_LENGTH_FIELD) fault = 'length-malformed';
  };

  return (chunk) => {
    let place = 0;
    while (place < chunk.length && fault === undefined) {
      if (bodyBytes > 0) {
        const skipped = Math.min(bodyBytes, chunk.length - place);
        bodyBytes -= skipped;
        place += skipped;
        continue;
      }
      const byte = chunk[place] ?? 0;
      place += 1;
      if (lengthBytes < 0) startPacket(byte >> 4);
      else readLength(byte);
    }
    return fault;
  };
}
