import type { NetworkedDevice } from './device/networked-device.ts';
import type { Fleet } from './fleet.ts';
import { fastForward } from './fleet.ts';
import { LARKMOOR_LIVE, LIVE_ROUND_MINUTES } from './scenarios/larkmoor-live.ts';
import { playLive } from './scenarios/scenario.ts';

export type LiveFleet = {
  /** Plays everything up to now and hands it to the devices. */
  readonly tick: () => void;
  /** How many devices it runs. */
  readonly size: number;
};

const MINUTE_MS = 60_000;
/** What devices would have kept of a time in which nobody listened; before it there is a gap. */
const KEPT_MS = 6 * 60 * MINUTE_MS;
/** Devices without a link for long measure more seldom, so that their store holds. */
const SHORT_GAP_MS = 10 * MINUTE_MS;
const CADENCE_MS = { live: 10_000, stored: 60_000 };

/**
 * Takes a fleet from the end of its story to now and keeps it there. Pumps without a device in `devices` are played
 * unwatched. What happened since `until` is told as a backlog, of at most the last six hours.
 */
export function startLiveFleet(
  fleet: Fleet,
  devices: ReadonlyMap<string, NetworkedDevice>,
  until: number,
  now: () => number,
): LiveFleet {
  const startedAt = now();
  const resumeAt = Math.min(startedAt, Math.max(until, startedAt - KEPT_MS));
  fastForward(fleet, resumeAt);
  playLive(fleet, LARKMOOR_LIVE, LIVE_ROUND_MINUTES, startedAt);
  const longGap = startedAt - resumeAt > SHORT_GAP_MS;
  const advance = (to: number) => {
    for (const member of fleet.members) {
      const device = devices.get(member.pump.spec.serial);
      member.advance(to, device?.hear ?? (() => undefined));
    }
  };
  const setCadence = (cadenceMs: number) => {
    for (const member of fleet.members) member.setCadence(cadenceMs);
  };
  setCadence(longGap ? CADENCE_MS.stored : CADENCE_MS.live);
  advance(startedAt);
  setCadence(CADENCE_MS.live);
  return { size: devices.size, tick: () => advance(now()) };
}
