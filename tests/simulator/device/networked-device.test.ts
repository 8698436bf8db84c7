import { describe, expect, it } from 'vitest';
import { decodeReadings } from '#shared/contract/mqtt/readings.ts';
import { createNetworkedDevice, type DeviceReport } from '#simulator/device/networked-device.ts';
import type { ConnectionOptions } from '#simulator/link.ts';
import type { News } from '#simulator/virtual-pump.ts';

type Sent = { readonly kind: string; readonly payload: string; readonly stored: (() => void) | undefined };

/** A device on a line that the test holds in its hands. */
function makeDevice() {
  const opened: { options: ConnectionOptions; sent: Sent[]; cut: boolean }[] = [];
  const waiting: (() => void)[] = [];
  const reports: DeviceReport[] = [];
  const device = createNetworkedDevice({
    port: 1883,
    serial: 'MR-000101',
    secret: 'secret',
    identity: { firmware: '1.4.2', storySeed: 'story', connectionSeed: 'connection' },
    now: () => 5000,
    openConnection: (options) => {
      const line = { options, sent: [] as Sent[], cut: false };
      opened.push(line);
      return {
        publish: (kind, payload, stored) => void line.sent.push({ kind, payload, stored }),
        cut: () => {
          line.cut = true;
          options.onClosed();
        },
        end: async () => undefined,
      };
    },
    schedule: (_delayMs, task) => {
      waiting.push(task);
      return { cancel: () => void waiting.splice(waiting.indexOf(task), 1) };
    },
    report: (report) => void reports.push(report),
  });
  const wait = () => waiting.shift()?.();
  const line = (index: number) => opened[index] ?? expect.fail(`connection ${index} was not opened`);
  return { device, line, opened, wait, reports };
}

const up: News = { kind: 'device', at: 0, up: true, boot: 0, since: 0 };
const reading = (at: number): News => ({
  kind: 'reading',
  at,
  reading: { at, rpm: 0, closedInputs: 0, activeInput: 0, watts: 6 },
});
const timesOf = (sent: Sent | undefined) => {
  const decoded = decodeReadings(sent?.payload ?? '');
  return decoded.kind === 'readings' ? decoded.readings.map(({ at }) => at) : [];
};

describe('a networked device', () => {
  it('connects when it is up and says so, then sends what waited', () => {
    const { device, line } = makeDevice();
    device.hear(up);
    device.hear(reading(1));
    device.hear(reading(2));
    line(0).options.onOpen();

    expect(line(0).sent.map(({ kind }) => kind)).toEqual(['status', 'readings']);
    expect(JSON.parse(line(0).sent[0]?.payload ?? '')).toMatchObject({ state: 'online', up: 5, fw: '1.4.2' });
    expect(timesOf(line(0).sent[1])).toEqual([1, 2]);
  });

  it('leaves the will of its own connection', () => {
    const { device, line } = makeDevice();
    device.hear(up);
    line(0).options.onOpen();
    const status = JSON.parse(line(0).sent[0]?.payload ?? '');

    expect(JSON.parse(line(0).options.will)).toEqual({ state: 'lost', conn: status.conn });
  });

  it('sends again what was not stored when the line went, before what came later', () => {
    const { device, line, wait } = makeDevice();
    device.hear(up);
    line(0).options.onOpen();
    device.hear(reading(1));
    device.hear(reading(2));
    line(0).sent[1]?.stored?.();
    line(0).options.onClosed();
    device.hear(reading(3));
    wait();
    line(1).options.onOpen();

    expect(
      line(1)
        .sent.filter(({ kind }) => kind === 'readings')
        .map(timesOf),
    ).toEqual([[2, 3]]);
  });

  it('has no more than eight messages under way, and goes on as they are stored', () => {
    const { device, line } = makeDevice();
    device.hear(up);
    line(0).options.onOpen();
    for (let at = 1; at <= 30; at += 1) device.hear(reading(at));
    expect(line(0).sent.filter(({ kind }) => kind === 'readings')).toHaveLength(8);

    line(0).sent[1]?.stored?.();

    expect(timesOf(line(0).sent.at(-1))).toEqual(Array.from({ length: 22 }, (_, index) => index + 9));
  });

  it('cuts its line when its link is down by script, and stays away until it is up', () => {
    const { device, line, opened, wait } = makeDevice();
    device.hear(up);
    line(0).options.onOpen();
    device.hear({ kind: 'link', at: 1, up: false });
    wait();

    expect(line(0).cut).toBe(true);
    expect(opened).toHaveLength(1);
    device.hear({ kind: 'link', at: 2, up: true });
    expect(opened).toHaveLength(2);
  });

  it('reports a refusal and the notices it is sent', () => {
    const { device, line, reports } = makeDevice();
    device.hear(up);
    line(0).options.onRefused('not authorized');
    line(0).options.onNotice('{"bad":2,"reason":"w-negative"}');
    line(0).options.onNotice('nonsense');

    expect(reports).toEqual([
      { serial: 'MR-000101', kind: 'refused', reason: 'not authorized' },
      { serial: 'MR-000101', kind: 'notice', bad: 2, reason: 'w-negative' },
    ]);
  });

  it('does not come back after it was closed', async () => {
    const { device, line, opened, wait } = makeDevice();
    device.hear(up);
    line(0).options.onOpen();
    await device.close();
    line(0).options.onClosed();
    wait();

    expect(opened).toHaveLength(1);
  });
});
