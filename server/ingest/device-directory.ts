import type { KnownDevice } from './known-device.ts';

/** The devices that were asked for lately, kept in memory: a fleet that reconnects at once is one query, not thousands. */
export type DeviceDirectory = {
  /** Finds a device; rejects when the database cannot be asked and the device is not in memory. */
  readonly find: (serial: string) => Promise<KnownDevice | undefined>;
  /** The device as it is in memory: for one that has signed in that is always there. */
  readonly peek: (serial: string) => KnownDevice | undefined;
  /** Loads everything in memory anew and answers the serials whose secret is another now, or gone. */
  readonly refresh: () => Promise<string[]>;
};

export type DeviceDirectoryOptions = {
  readonly load: (serials: readonly string[]) => Promise<readonly KnownDevice[]>;
  readonly now: () => number;
};

/** How long the answer "no such device" is believed, ms: a made-up serial must not cost a query each time. */
const UNKNOWN_BELIEVED_MS = 2_000;
/** Made-up serials that are remembered at most. */
const MAX_UNKNOWN = 10_000;

/** An empty directory. */
export function createDeviceDirectory({ load, now }: DeviceDirectoryOptions): DeviceDirectory {
  const known = new Map<string, KnownDevice>();
  const unknownUntil = new Map<string, number>();
  let asking: { readonly serials: Set<string>; readonly answer: Promise<void> } | undefined;

  const learn = async (serials: readonly string[]): Promise<void> => {
    const found = await load(serials);
    for (const serial of serials) known.delete(serial);
    for (const device of found) known.set(device.serial, device);
    if (unknownUntil.size > MAX_UNKNOWN) unknownUntil.clear();
    for (const serial of serials) if (!known.has(serial)) unknownUntil.set(serial, now() + UNKNOWN_BELIEVED_MS);
  };
  // Whoever asks in the same turn of the event loop shares one query.
  const ask = (serial: string): Promise<void> => {
    if (asking === undefined) {
      const serials = new Set<string>();
      const answer = new Promise<void>((resolve) => setImmediate(resolve)).then(() => {
        asking = undefined;
        return learn([...serials]);
      });
      asking = { serials, answer };
    }
    asking.serials.add(serial);
    return asking.answer;
  };

  return {
    peek: (serial) => known.get(serial),
    find: async (serial) => {
      const device = known.get(serial);
      if (device !== undefined || (unknownUntil.get(serial) ?? 0) > now()) return device;
      await ask(serial);
      return known.get(serial);
    },
    refresh: async () => {
      unknownUntil.clear();
      const before = [...known.values()];
      await learn(before.map(({ serial }) => serial));
      return before.filter((device) => !hasSameSecret(device, known.get(device.serial))).map(({ serial }) => serial);
    },
  };
}

function hasSameSecret(before: KnownDevice, after: KnownDevice | undefined): boolean {
  if (before.secretHash === undefined) return true;
  return after?.secretHash !== undefined && before.secretHash.equals(after.secretHash);
}
