/** What a device may publish, by the last part of its topic. */
export type DeviceMessageKind = 'readings' | 'status' | 'settings';

/** One message of a signed-in device, as it arrived. */
export type DeviceMessage = {
  readonly serial: string;
  readonly kind: DeviceMessageKind;
  readonly payload: Buffer;
  /** Arrival, ms. */
  readonly receivedAt: number;
};

/**
 * Answers a message. Without an error its PUBACK leaves at once; with one the connection is closed without a PUBACK
 * and the device sends again.
 */
export type Settle = (error?: Error) => void;

/** Takes a message and settles it once what it says is stored. Messages of one device are settled in order. */
export type ReceiveMessage = (message: DeviceMessage, settle: Settle) => void;
