/** The largest MQTT packet a device may send, bytes. */
export const MAX_PACKET_BYTES = 128 * 1024;

/** The most readings one message may carry. */
export const MAX_READINGS_PER_MESSAGE = 500;

/** Keep-alive a device must ask for, seconds. */
export const KEEP_ALIVE_SECONDS = { min: 60, max: 300 } as const;

/** Readings, status, settings and notices travel at QoS 1; QoS 0 readings are stored as well, QoS 2 is refused. */
export const PUBLISH_QOS = 1;
export const ACCEPTED_QOS: readonly number[] = [0, 1];

/** Messages a second from one device, and how many may come at once before it is slowed. */
export const DEVICE_RATE = { messagesPerSecond: 20, burst: 200 } as const;

/** A reading further ahead of the server's clock than this is refused as `ahead`, ms. */
export const AHEAD_LIMIT_MS = 5 * 60_000;

/** At most one notice in this time goes to a device, ms. */
export const NOTICE_INTERVAL_MS = 60_000;

/** A device sends at once when the speed moved by more than this, rpm. */
export const REPORT_SPEED_STEP_RPM = 50;

/** A contact must hold this long before the device believes it, ms. */
export const CONTACT_DEBOUNCE_MS = 250;
