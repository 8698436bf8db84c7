import type { Reading } from '#shared/contract/mqtt/readings.ts';
import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import { REPORT_SPEED_STEP_RPM } from '#shared/contract/mqtt/wire-limits.ts';
import { passZoneChange } from './clocks/dial.ts';
import { decide } from './decide.ts';
import { observeReading } from './observe.ts';
import { shaftRpm } from './physics/shaft.ts';
import type { Pump } from './pump.ts';

/** What a pump's device has to tell, in the order in which it happens. */
export type News =
  | { readonly kind: 'reading'; readonly at: number; readonly reading: Reading }
  | { readonly kind: 'settings'; readonly at: number; readonly settings: MotorSettings }
  /** `boot` counts the device's starts; `since` is when it last started, ms. */
  | {
      readonly kind: 'device';
      readonly at: number;
      readonly up: boolean;
      readonly boot: number;
      readonly since: number;
    }
  | { readonly kind: 'link'; readonly at: number; readonly up: boolean }
  | { readonly kind: 'on-site'; readonly at: number; readonly on: boolean };

export type Emit = (news: News) => void;

export type VirtualPump = {
  readonly pump: Pump;
  /**
   * Plays everything that happens up to and including `until`. Without `emit` nobody watches: nothing is measured,
   * and the pump comes to the same state as if somebody had.
   */
  readonly advance: (until: number, emit?: Emit) => void;
  /** From the next reading on, a steady pump speaks every so many ms. */
  readonly setCadence: (cadenceMs: number) => void;
};

/** How often a ramp is looked at, ms. */
const LOOK_MS = 1000;
/** A pump that primes is not steady: its device speaks at least so often, ms. */
const PRIMING_CADENCE_MS = 10_000;
const NEVER = Number.POSITIVE_INFINITY;

/** Runs a pump from event to event, and its device's rule of when to speak. */
export function createVirtualPump(pump: Pump, initialCadenceMs: number): VirtualPump {
  let cadenceMs = initialCadenceMs;
  let zoneChangeAt = pump.zone.nextChangeAfter(pump.now);
  // Devices do not all speak in the same second.
  let reportAt = pump.now + Math.round(pump.noise.between(0, cadenceMs));
  // Up to here everything has been played; nobody may be told of anything earlier.
  let playedUntil = pump.now;
  let lastSent: Reading | undefined;
  let told = { up: false, linkUp: true, onSite: false, settings: undefined as MotorSettings | undefined };

  const nextAt = (watched: boolean): number => {
    const deedAt = pump.deeds[0]?.at ?? NEVER;
    const at = Math.min(deedAt, pump.decideAt, zoneChangeAt);
    if (!watched) return at;
    const lookAt = pump.shaft.settlesAt > pump.now ? Math.min(pump.now + LOOK_MS, pump.shaft.settlesAt) : NEVER;
    return Math.min(at, Math.max(playedUntil, Math.min(reportAt, lookAt)));
  };

  const play = (at: number): void => {
    pump.now = at;
    let changed = at >= pump.decideAt;
    while ((pump.deeds[0]?.at ?? NEVER) <= at) {
      pump.deeds.shift()?.act(pump, at);
      changed = true;
    }
    if (at >= zoneChangeAt) {
      for (const contact of pump.contacts) {
        if (contact.clock !== undefined) passZoneChange(contact.clock.dial, pump.zone, at);
      }
      passZoneChange(pump.motorClock, pump.zone, at);
      zoneChangeAt = pump.zone.nextChangeAfter(at);
      changed = true;
    }
    if (changed) decide(pump, at);
  };

  const tell = (at: number, emit: Emit): void => {
    const up = pump.powered && !pump.conditions.hung;
    if (pump.linkUp !== told.linkUp) emit({ kind: 'link', at, up: pump.linkUp });
    if (up !== told.up) emit({ kind: 'device', at, up, boot: pump.boots, since: pump.poweredSince });
    if (pump.onSite !== told.onSite) emit({ kind: 'on-site', at, on: pump.onSite });
    const settings = up ? pump.settings : undefined;
    if (settings !== undefined && settings !== told.settings && pump.spec.model.says.settings) {
      emit({ kind: 'settings', at, settings });
    }
    told = { up, linkUp: pump.linkUp, onSite: pump.onSite, settings };
    if (!up) reportAt = at + cadenceMs;
    else if (at >= reportAt || isNotable(pump, lastSent, at)) report(at, emit);
  };

  const report = (at: number, emit: Emit): void => {
    reportAt = at + (pump.command.source === 'prime' ? Math.min(cadenceMs, PRIMING_CADENCE_MS) : cadenceMs);
    const reading = observeReading(pump, at);
    if (lastSent !== undefined && reading.at <= lastSent.at) return;
    lastSent = reading;
    emit({ kind: 'reading', at, reading });
  };

  return {
    pump,
    setCadence: (next) => {
      cadenceMs = next;
      reportAt = Math.min(reportAt, pump.now + next);
    },
    advance: (until, emit) => {
      for (;;) {
        const at = nextAt(emit !== undefined);
        if (at > until) break;
        play(at);
        if (emit === undefined) continue;
        tell(at, emit);
        for (const watch of pump.watchers) watch(at);
      }
      playedUntil = Math.max(playedUntil, until);
    },
  };
}

/** Inputs, what the motor obeys and what commands it are told at once, and so is a speed that moved. */
function isNotable(pump: Pump, last: Reading | undefined, at: number): boolean {
  if (last === undefined) return true;
  const active = pump.command.activeInput > 0 ? (pump.conditions.saysActive ?? pump.command.activeInput) : 0;
  return (
    last.closedInputs !== pump.closed ||
    last.activeInput !== active ||
    (last.reportedSource !== undefined && last.reportedSource !== pump.command.source) ||
    Math.abs(shaftRpm(pump.shaft, at) - last.rpm) > REPORT_SPEED_STEP_RPM
  );
}
