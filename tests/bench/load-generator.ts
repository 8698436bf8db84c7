import { connectDevice, type DeviceLogin, type LoadDevice, publish } from './load-device.ts';
import { writeReadings } from './load-readings.ts';

/** Connects these devices; answered with `connected`. */
export type ConnectOrder = {
  readonly connect: {
    readonly port: number;
    readonly devices: readonly DeviceLogin[];
    readonly readingsPerMessage: number;
    /** Messages each device may have under way. */
    readonly window: number;
  };
};
/** Publishes for a while; answered with a report. */
export type RunOrder = {
  readonly run: {
    readonly seconds: number;
    /** Messages a second in all; left out = as fast as they are acknowledged. */
    readonly messagesPerSecond?: number;
  };
};

export type LoadReport = {
  readonly messages: number;
  readonly seconds: number;
  readonly p50: number;
  readonly p95: number;
  readonly p99: number;
};

/** Connecting all at once would measure the accept queue. */
const CONNECTING_AT_ONCE = 100;
/** How much of time a message of readings covers: near the pace at which a device can send them. */
const STEP_MS = { one: 200, many: 50 };

const devices: LoadDevice[] = [];
const clocks = new Map<LoadDevice, number>();
const sentAt = new Map<LoadDevice, number[]>();
let settings: ConnectOrder['connect'] | undefined;
let counts = { messages: 0, lateness: [] as number[] };
let isFlat = false;

process.on('message', (order: ConnectOrder | RunOrder) => {
  const done = 'connect' in order ? connectAll(order.connect) : run(order.run);
  done.then(
    (answer) => process.send?.(answer),
    (error: unknown) => process.send?.({ error: String(error) }),
  );
});
process.on('disconnect', () => process.exit(0));

async function connectAll(order: ConnectOrder['connect']) {
  settings = order;
  const begin = Date.now() - (Date.now() % 1000) - 60_000;
  for (let from = 0; from < order.devices.length; from += CONNECTING_AT_ONCE) {
    const logins = order.devices.slice(from, from + CONNECTING_AT_ONCE);
    devices.push(...(await Promise.all(logins.map((login) => connectDevice(order.port, login, onAcknowledged)))));
  }
  for (const device of devices) {
    clocks.set(device, begin);
    sentAt.set(device, []);
  }
  return { connected: devices.length };
}

function send(device: LoadDevice): void {
  const count = settings?.readingsPerMessage ?? 1;
  const stepMs = count === 1 ? STEP_MS.one : STEP_MS.many;
  const until = (clocks.get(device) ?? 0) + count * stepMs;
  clocks.set(device, until);
  sentAt.get(device)?.push(performance.now());
  publish(device, writeReadings(until, count, stepMs));
}

function onAcknowledged(device: LoadDevice, count: number): void {
  counts.messages += count;
  const now = performance.now();
  for (const at of sentAt.get(device)?.splice(0, count) ?? []) counts.lateness.push(now - at);
  if (isFlat) while (device.inFlight < (settings?.window ?? 1)) send(device);
}

async function run({ seconds, messagesPerSecond }: RunOrder['run']): Promise<{ report: LoadReport }> {
  counts = { messages: 0, lateness: [] };
  const from = performance.now();
  if (messagesPerSecond === undefined) await runFlat(seconds);
  else await runPaced(seconds, messagesPerSecond);
  const { messages, lateness } = counts;
  const elapsed = (performance.now() - from) / 1000;
  lateness.sort((a, b) => a - b);
  const at = (share: number) => lateness[Math.min(lateness.length - 1, Math.floor(lateness.length * share))] ?? 0;
  // What is under way belongs to nobody's count.
  while (devices.some(({ inFlight }) => inFlight > 0)) await wait(5);
  return { report: { messages, seconds: elapsed, p50: at(0.5), p95: at(0.95), p99: at(0.99) } };
}

async function runFlat(seconds: number): Promise<void> {
  isFlat = true;
  for (const device of devices) while (device.inFlight < (settings?.window ?? 1)) send(device);
  await wait(seconds * 1000);
  isFlat = false;
}

async function runPaced(seconds: number, messagesPerSecond: number): Promise<void> {
  const from = performance.now();
  let sent = 0;
  while (performance.now() - from < seconds * 1000) {
    const due = Math.floor(((performance.now() - from) / 1000) * messagesPerSecond);
    for (; sent < due; sent += 1) {
      const device = devices[sent % devices.length];
      if (device !== undefined) send(device);
    }
    await wait(5);
  }
}

function wait(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms));
}
