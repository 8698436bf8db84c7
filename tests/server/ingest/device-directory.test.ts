import { describe, expect, it } from 'vitest';
import { createDeviceDirectory } from '#server/ingest/device-directory.ts';
import type { KnownDevice } from '#server/ingest/known-device.ts';

const device = (serial: string, secret: string | null = 'a'): KnownDevice => ({
  serial,
  deviceId: serial,
  companyId: 'c',
  secretHash: secret === null ? undefined : Buffer.from(secret),
  pump: undefined,
});

function start(devices: Map<string, KnownDevice>) {
  const asked: string[][] = [];
  const clock = { now: 0 };
  const directory = createDeviceDirectory({
    now: () => clock.now,
    load: async (serials) => {
      asked.push([...serials]);
      return serials.flatMap((serial) => devices.get(serial) ?? []);
    },
  });
  return { directory, asked, clock };
}

describe('the device directory', () => {
  it('asks once for a whole fleet that connects at the same time, and not again', async () => {
    const devices = new Map(['A', 'B', 'C'].map((serial) => [serial, device(serial)]));
    const { directory, asked } = start(devices);
    const found = await Promise.all(['A', 'B', 'C', 'A'].map((serial) => directory.find(serial)));
    expect(found.map((one) => one?.serial)).toEqual(['A', 'B', 'C', 'A']);
    await directory.find('B');
    expect(asked).toEqual([['A', 'B', 'C']]);
    expect(directory.peek('C')?.serial).toBe('C');
  });

  it('believes for two seconds that a device does not exist, and then asks again', async () => {
    const devices = new Map<string, KnownDevice>();
    const { directory, asked, clock } = start(devices);
    expect(await directory.find('X')).toBeUndefined();
    devices.set('X', device('X'));
    expect(await directory.find('X')).toBeUndefined();
    clock.now = 2_001;
    expect((await directory.find('X'))?.serial).toBe('X');
    expect(asked.length).toBe(2);
  });

  it('names the devices whose secret changed or was revoked, and those that are gone', async () => {
    const devices = new Map(['A', 'B', 'C', 'D'].map((serial) => [serial, device(serial)]));
    const { directory } = start(devices);
    await Promise.all([...devices.keys()].map((serial) => directory.find(serial)));
    devices.set('B', device('B', 'b'));
    devices.set('C', device('C', null));
    devices.delete('D');
    expect((await directory.refresh()).toSorted()).toEqual(['B', 'C', 'D']);
    expect(directory.peek('D')).toBeUndefined();
    expect(directory.peek('A')?.serial).toBe('A');
  });

  it('passes on that the database cannot be asked, and asks anew the next time', async () => {
    let isDown = true;
    const directory = createDeviceDirectory({
      now: () => 0,
      load: async () => (isDown ? Promise.reject(new Error('down')) : [device('A')]),
    });
    await expect(directory.find('A')).rejects.toThrow('down');
    isDown = false;
    expect((await directory.find('A'))?.serial).toBe('A');
  });
});
