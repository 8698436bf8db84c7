import { join } from 'node:path';
import { createDemoFleet } from './demo-fleet.ts';
import { createNetworkedDevice, type DeviceReport, type NetworkedDevice } from './device/networked-device.ts';
import { DEVICE_SECRETS_FILE, readDeviceSecrets } from './device-secrets.ts';
import { readSimulatorEnvironment, type SimulatorEnvironment } from './env.ts';
import { openConnection } from './link.ts';
import { startLiveFleet } from './live-fleet.ts';
import { readStoryMark, STORY_MARK_FILE, writeStoryMark } from './story-mark.ts';

/*
 * The demo company's devices, live over MQTT. They go on from where the seeded history ended. Says `ready` to its
 * parent once the broker has taken them; ends when told to, or when the parent is gone.
 */

const TICK_MS = 250;
const MARK_MS = 15_000;
/** Readiness waits no longer than this for the last device. */
const PATIENCE_MS = 15_000;
const GOODBYE_MS = 2000;
const DAY_MS = 86_400_000;

function main(): void {
  const environment = readSimulatorEnvironment();
  if ('faults' in environment) {
    fail(environment.faults.join(' '));
    return;
  }
  const secretsPath = join(environment.dataFolder, DEVICE_SECRETS_FILE);
  const secrets = readDeviceSecrets(secretsPath);
  if (secrets === undefined) {
    fail(`There are no device secrets in ${secretsPath}. Make the demo company anew with: npm run reset`);
    return;
  }
  run(environment, secrets);
}

function run(environment: SimulatorEnvironment, secrets: ReadonlyMap<string, string>): void {
  const markPath = join(environment.dataFolder, STORY_MARK_FILE);
  const startedAt = Date.now();
  const fresh = { seed: 'larkmoor', from: startedAt - 2 * DAY_MS, to: startedAt, until: startedAt };
  const mark = readStoryMark(markPath) ?? fresh;
  const fleet = createDemoFleet({ ...mark, cadenceMs: 10_000, pumps: environment.pumps });
  const expected = fleet.pumps.filter(({ spec }) => secrets.has(spec.serial)).length;
  const reports = createReports(expected);
  const devices = new Map<string, NetworkedDevice>();
  for (const { spec } of fleet.pumps) {
    const secret = secrets.get(spec.serial);
    if (secret === undefined) continue;
    const device = createNetworkedDevice({
      port: environment.mqttPort,
      serial: spec.serial,
      secret,
      identity: { firmware: spec.firmware, storySeed: mark.seed, connectionSeed: `${mark.seed}/${startedAt}` },
      now: Date.now,
      openConnection,
      schedule: (delayMs, task) => {
        const timer = setTimeout(task, delayMs);
        return { cancel: () => clearTimeout(timer) };
      },
      report: reports.take,
    });
    devices.set(spec.serial, device);
  }
  process.send?.({ type: 'progress', text: `Starting ${devices.size} simulated pumps…` });
  const live = startLiveFleet(fleet, devices, mark.until, Date.now);
  const saveMark = () => writeStoryMark(markPath, { ...mark, until: Date.now() });
  const timers = [setInterval(live.tick, TICK_MS), setInterval(saveMark, MARK_MS)];
  endOnRequest(async () => {
    for (const timer of timers) clearInterval(timer);
    saveMark();
    const goodbye = Promise.all([...devices.values()].map((device) => device.close()));
    await Promise.race([goodbye, new Promise((resolve) => setTimeout(resolve, GOODBYE_MS))]);
  });
}

/** Gathers what devices report, and says `ready` or `failed` to the parent once. */
function createReports(expected: number): { readonly take: (report: DeviceReport) => void } {
  const connected = new Set<string>();
  const refused = new Set<string>();
  let settled = false;
  const settle = () => {
    if (settled) return;
    settled = true;
    process.send?.({ type: 'ready', text: `${connected.size} simulated pumps are live.` });
  };
  if (expected === 0) settle();
  setTimeout(() => connected.size > 0 && settle(), PATIENCE_MS).unref();
  return {
    take: (report) => {
      if (report.kind === 'notice') {
        process.stderr.write(`${report.serial}: ${report.bad} readings refused, the last as ${report.reason}\n`);
        return;
      }
      (report.kind === 'connected' ? connected : refused).add(report.serial);
      if (report.kind === 'refused')
        process.stderr.write(`${report.serial}: the broker refuses it: ${report.reason}\n`);
      if (connected.size === 0 && refused.size >= expected && !settled) {
        settled = true;
        fail('The broker refuses every device of the demo. Make the demo company anew with: npm run reset');
      } else if (connected.size >= expected) settle();
    },
  };
}

function endOnRequest(goodbye: () => Promise<void>): void {
  let ending = false;
  const end = () => {
    if (ending) return;
    ending = true;
    void goodbye().finally(() => process.exit(0));
  };
  process.once('SIGTERM', end);
  process.once('SIGINT', end);
  process.once('disconnect', end);
}

/** Ends the program with one sentence, once the parent has it. */
function fail(text: string): void {
  process.stderr.write(`${text}\n`);
  if (process.send === undefined) process.exit(1);
  process.send({ type: 'failed', text }, () => process.exit(1));
}

main();
