import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import type { Dial } from './clocks/dial.ts';
import { createHabitContact, type HabitContact } from './clocks/habit.ts';
import { createTimeClock, type TimeClock } from './clocks/time-clock.ts';
import { planWeek, type WeekPlan } from './clocks/week-plan.ts';
import type { Zone } from './clocks/zone.ts';
import { type Conditions, createConditions } from './conditions.ts';
import { type Command, createFirmware, type Firmware } from './control/firmware.ts';
import type { DriveHeat } from './physics/drive-heat.ts';
import { createDirt, type Dirt } from './physics/filter.ts';
import { createMeter, type Meter } from './physics/meter.ts';
import type { Water } from './physics/prime.ts';
import { createShaft, type Shaft } from './physics/shaft.ts';
import type { ContactSpec, PumpSpec } from './pump-spec.ts';
import { createRandom, type Random } from './random.ts';

/** What turns one input's contact. */
export type Contact = {
  readonly number: number;
  readonly bit: number;
  readonly clock: TimeClock | undefined;
  readonly habit: HabitContact | undefined;
};

/** Something that will be done to a pump at an instant. */
export type Deed = { readonly at: number; readonly act: (pump: Pump, at: number) => void };

/** One pump, its pad and its device at `now`, the instant of the last event. Deeds and the event loop change it. */
export type Pump = {
  readonly spec: PumpSpec;
  readonly zone: Zone;
  /** Chance that moves events. Chance in readings has a stream of its own, so that watching changes nothing. */
  readonly chance: Random;
  readonly noise: Random;
  readonly conditions: Conditions;
  readonly contacts: readonly Contact[];
  readonly motorClock: Dial;
  readonly firmware: Firmware;
  readonly shaft: Shaft;
  readonly water: Water;
  readonly dirt: Dirt;
  readonly heat: DriveHeat;
  readonly meter: Meter;
  readonly deeds: Deed[];
  now: number;
  settings: MotorSettings;
  program: WeekPlan;
  /** Contacts closed, as the device sees them at the clocks' side. */
  closed: number;
  /** When the contacts, the program or the firmware's timers next want a look. */
  decideAt: number;
  command: Command;
  powered: boolean;
  poweredSince: number;
  boots: number;
  startLuck: number;
  /** What the pump would take at the speed the shaft aims for. */
  load: Load;
  linkUp: boolean;
  onSite: boolean;
  /** Somebody is at it until then; nothing else begins before. */
  busyUntil: number;
  /** How many faults stand; while one does, ordinary life keeps its hands off. */
  troubles: number;
  /** Called after every event while somebody watches. */
  readonly watchers: Set<(at: number) => void>;
};

/** Flow and shaft power at one speed: full of water, and full of air. */
export type Load = { readonly rpm: number; readonly gpm: number; readonly wetWatts: number; readonly dryWatts: number };

/** Creates a pump that stands still at `from`, with every clock set right to within a couple of minutes. */
export function createPump(spec: PumpSpec, zone: Zone, seed: string, from: number): Pump {
  const chance = createRandom(`${seed}/${spec.serial}/events`);
  const offset = zone.offsetAt(from);
  const settingError = () => Math.round(chance.between(-90_000, 90_000));
  return {
    spec,
    zone,
    chance,
    noise: createRandom(`${seed}/${spec.serial}/noise`),
    conditions: createConditions(),
    contacts: spec.contacts.map((contact) => ({
      number: contact.number,
      bit: 1 << (contact.number - 1),
      clock:
        contact.clock === undefined
          ? undefined
          : createContactClock(contact.clock, spec.dialsKept, offset + settingError(), from),
      habit:
        contact.habit === undefined
          ? undefined
          : createHabitContact(contact.habit, zone, `${seed}/${spec.serial}/habit-${contact.number}`),
    })),
    motorClock: {
      offsetMs: offset + settingError(),
      setAt: from,
      driftMsPerDay: chance.between(-900, 900),
      knowsDaylightSaving: spec.motorClock.knowsDaylightSaving,
      carryOverMs: spec.motorClock.survivesCuts ? Number.POSITIVE_INFINITY : 0,
      standsAtMs: undefined,
    },
    firmware: createFirmware(),
    shaft: createShaft(from),
    water: { fill: 0.9, since: from, target: spec.suction.restFill, tauMs: spec.suction.drainHours * 3_600_000 },
    dirt: createDirt(from),
    heat: { riseCelsius: 4, since: from, targetCelsius: 4 },
    meter: createMeter(createRandom(`${seed}/${spec.serial}/meter`)),
    deeds: [],
    now: from,
    settings: spec.settings,
    program: planProgram(spec.settings),
    closed: 0,
    decideAt: from,
    command: { source: 'off', rpm: 0, activeInput: 0 },
    powered: true,
    poweredSince: from,
    boots: 0,
    startLuck: 1,
    load: { rpm: 0, gpm: 0, wetWatts: 0, dryWatts: 0 },
    linkUp: true,
    onSite: false,
    busyUntil: from,
    troubles: 0,
    watchers: new Set(),
  };
}

/** A clock that reads `offsetMs` from UTC; kept by a careful household, a mechanical one follows daylight saving too. */
function createContactClock(clock: NonNullable<ContactSpec['clock']>, kept: boolean, offsetMs: number, at: number) {
  const created = createTimeClock(clock.type, clock.circuit, clock.trippers, offsetMs, at);
  created.dial.knowsDaylightSaving ||= kept;
  return created;
}

/** The week of a motor's own program. */
export function planProgram(settings: MotorSettings): WeekPlan {
  return planWeek(settings.program);
}

/** Adds a deed in its place, at a whole ms; deeds of one instant keep the order in which they came. */
export function addDeed(pump: Pump, instant: number, act: Deed['act']): void {
  const at = Math.round(instant);
  let index = pump.deeds.length;
  while (index > 0 && (pump.deeds[index - 1]?.at ?? 0) > at) index -= 1;
  pump.deeds.splice(index, 0, { at, act });
}
