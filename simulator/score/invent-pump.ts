import type { ClockType } from '#simulator/clocks/time-clock.ts';
import { MOTOR_DRIVES, WET_ENDS } from '#simulator/models.data.ts';
import { MOTOR_MODELS } from '#simulator/motor-models.data.ts';
import { dutyGpm } from '#simulator/physics/duty-point.ts';
import type { SystemCurve } from '#simulator/physics/system-curve.ts';
import { createClimate } from '#simulator/physics/weather.ts';
import type { WetEnd } from '#simulator/physics/wet-end.ts';
import type { ContactSpec, EquipmentSpec, PumpSpec } from '#simulator/pump-spec.ts';
import { createRandom, type Random } from '#simulator/random.ts';
import { SCORE_ZONES } from './score-zones.data.ts';
import { programGallons } from './standing-truth.ts';

const EVERY_DAY = [true, true, true, true, true, true, true];
const WEEKDAYS = [true, true, true, true, true, false, false];
type Pair = readonly [keyof typeof WET_ENDS, keyof typeof MOTOR_DRIVES];
const PAIRS: readonly [Pair, ...Pair[]] = [
  ['Aldermere 100', 'Fernholt V3-165'],
  ['Aldermere 150', 'Fernholt V4-270'],
  ['Aldermere 220', 'Fernholt V5-350'],
];
const CLOCK_TYPES: readonly [ClockType, ...ClockType[]] = [
  'synchronous',
  'synchronous',
  'synchronous',
  'spring-carry-over',
  'electronic',
];

const SHORT_HOURS_CHANCE = 0.04;

/** Invents the n-th pump of a fleet: its own wet end, pipes, program, clocks and household, all from the seed. */
export function inventPump(seed: string, index: number): PumpSpec {
  const random = createRandom(`${seed}/pump-${index}`);
  const place = SCORE_ZONES[index % SCORE_ZONES.length] ?? SCORE_ZONES[0];
  const [wetEndName, motorName] = random.pick(PAIRS);
  const wetEnd = varyWetEnd(WET_ENDS[wetEndName], random);
  const system = inventSystem(wetEnd, random);
  const model = MOTOR_MODELS[motorName];
  const program = inventProgram(random);
  const contacts = inventContacts(random, model.inputCount);
  const inputs: (number | null)[] = Array.from({ length: model.inputCount }, () => null);
  for (const contact of contacts) inputs[contact.number - 1] = contact.rpm;
  const settings = {
    inputs,
    program,
    prime: { rpm: random.pick([3450, 3450, 3200, 3000]), seconds: random.pick([120, 180, 180, 240, 300]) },
    timed: random.chance(0.6) ? { rpm: 3200, minutes: 45 } : null,
    freeze: random.chance(0.5) ? { celsius: 4.4, rpm: 1150 } : null,
    maxRpm: 3450,
    minRpm: 600,
  };
  // Most pools suit their programs; a few are far too large for them.
  const poolShare = random.chance(SHORT_HOURS_CHANCE) ? 2 : random.between(0.5, 0.7);
  return {
    serial: `SC-${String(index + 1).padStart(6, '0')}`,
    padName: `Pad ${index + 1}`,
    area: place.area,
    zoneName: place.zone,
    purpose: 'filter',
    settings,
    model,
    firmware: '1.4.2',
    paper: {
      state: 'open',
      poolGallons: Math.round((programGallons({ wetEnd, system, settings }) * poolShare) / 200) * 200,
      turnoversPerDay: 1,
      nominalVolts: 230,
    },
    contacts,
    equipment: inventEquipment(random, contacts, (rpm) =>
      dutyGpm(wetEnd, system, { valve: 1, dirt: 1.3, staticFeet: 0 }, rpm),
    ),
    wetEnd,
    drive: MOTOR_DRIVES[motorName],
    system,
    suction: {
      primeSeconds: random.between(12, 45),
      restFill: random.pick([0.3, 0.4, 0.5, 0.7, 0.95]),
      drainHours: random.between(3, 20),
    },
    dirtRates: {
      filterPerKilogallon: random.between(0.0002, 0.0006),
      basketPerKilogallon: random.between(0.0008, 0.002),
    },
    supply: { standingVolts: random.between(229, 243), swingVolts: random.between(1, 3.5) },
    climate: createClimate(createRandom(`${seed}/climate/${place.area}`), place),
    motorClock: { knowsDaylightSaving: true, survivesCuts: true },
    stopWeekday: random.integer(1, 5),
    dialsKept: true,
    lived: true,
  };
}

function varyWetEnd(wetEnd: WetEnd, random: Random): WetEnd {
  return {
    ...wetEnd,
    shutOffFeet: wetEnd.shutOffFeet * random.between(0.92, 1.08),
    bestGpm: wetEnd.bestGpm * random.between(0.92, 1.08),
    bestEfficiency: wetEnd.bestEfficiency * random.between(0.94, 1.06),
    headExponent: wetEnd.headExponent * random.between(0.9, 1.1),
    shutOffPowerShare: wetEnd.shutOffPowerShare * random.between(0.92, 1.08),
    dryPowerShare: wetEnd.dryPowerShare * random.between(0.8, 1.25),
  };
}

/** Pipes for a pump of this size: most let it run at more than half of its best flow, some are narrow. */
function inventSystem(wetEnd: WetEnd, random: Random): SystemCurve {
  const gpm = wetEnd.bestGpm * (random.chance(0.25) ? random.between(0.38, 0.46) : random.between(0.55, 1));
  const feet = wetEnd.shutOffFeet * random.between(0.78, 0.9);
  const friction = feet / gpm ** 1.9;
  const filterShare = random.between(0.2, 0.4);
  return { staticFeet: random.between(0, 2), pipe: friction * (1 - filterShare), filter: friction * filterShare };
}

function inventProgram(random: Random): PumpSpec['settings']['program'] {
  const from = random.integer(10, 16) * 30;
  const to = random.integer(34, 44) * 30;
  const rpm = random.integer(30, 36) * 50;
  const day = { days: EVERY_DAY, fromMinute: from, toMinute: to, rpm };
  if (random.chance(0.25))
    return [day, { days: EVERY_DAY, fromMinute: to, toMinute: from, rpm: random.integer(22, 26) * 50 }];
  if (random.chance(0.2))
    return [
      { ...day, days: WEEKDAYS },
      { ...day, days: WEEKDAYS.map((flag) => !flag), rpm: rpm + 200 },
    ];
  return [day];
}

type SpeedContact = ContactSpec & { readonly rpm: number };

function inventContacts(random: Random, inputCount: number): SpeedContact[] {
  const clock = (opensEarlyMinutes: number, onMinute: number, length: number) => {
    const type = random.pick(CLOCK_TYPES);
    const early = type === 'electronic' ? 0 : opensEarlyMinutes;
    const trippers = [{ days: EVERY_DAY, onMinute, offMinute: onMinute + length, opensEarlyMinutes: early }];
    return { type, circuit: random.chance(0.85) ? ('own' as const) : ('motor' as const), trippers };
  };
  const cleaner = {
    number: 1,
    kind: 'clock',
    drives: 'cleaner',
    rpm: random.integer(52, 58) * 50,
    clock: clock(20, random.integer(15, 20) * 30, random.integer(5, 8) * 30),
  };
  const contacts: SpeedContact[] = [cleaner];
  if (random.chance(0.6)) {
    // Half of the second windows overlap the first one's end.
    const end = cleaner.clock.trippers[0]?.offMinute ?? 720;
    const on = random.chance(0.5) ? end - 90 : end + 60;
    contacts.push({
      number: 2,
      kind: 'clock',
      drives: random.pick(['heater', 'cell', 'feeder']),
      rpm: random.integer(44, 49) * 50,
      clock: clock(15, on, random.integer(6, 8) * 30),
    });
  }
  if (inputCount > 3 && random.chance(0.4))
    contacts.push({ number: 3, kind: 'twist-timer', drives: 'spa', rpm: 3200, habit: 'spa' });
  else if (random.chance(0.25))
    contacts.push({ number: 3, kind: 'solar-controller', drives: 'solar', rpm: 2150, habit: 'solar' });
  return contacts;
}

function inventEquipment(
  random: Random,
  contacts: readonly SpeedContact[],
  gpmAt: (rpm: number) => number,
): EquipmentSpec[] {
  const equipment: EquipmentSpec[] = [];
  for (const { number, drives, rpm, clock } of contacts) {
    if (clock === undefined || drives === undefined || !['heater', 'cell', 'feeder'].includes(drives)) continue;
    const interlock = random.pick(['flow-switch', 'flow-switch', 'pressure-switch', 'none', 'none', 'unknown']);
    equipment.push({
      kind: drives,
      input: number,
      interlock,
      minimumGpm: drives === 'feeder' ? undefined : Math.floor(gpmAt(rpm) * 0.6),
    });
  }
  return equipment;
}
