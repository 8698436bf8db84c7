import type { DemoPad, DemoPump } from '#shared/contract/demo/demo-company.ts';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import type { Habit } from './clocks/habit.ts';
import { LARKMOOR_PHYSICS, type LarkmoorPhysics } from './larkmoor-physics.data.ts';
import { MOTOR_DRIVES, WET_ENDS } from './models.data.ts';
import { MOTOR_MODELS } from './motor-models.data.ts';
import { type Climate, createClimate } from './physics/weather.ts';
import type { ContactSpec, PumpSpec } from './pump-spec.ts';
import { createRandom } from './random.ts';

/** Means and swings, °C, of the areas; the pad across the mountains has weather of its own. */
const CLIMATES: Readonly<Record<string, Omit<Climate, 'phases'>>> = {
  North: { meanCelsius: 15.5, seasonCelsius: 6, dayCelsius: 5, frontCelsius: 2.2 },
  Coast: { meanCelsius: 16, seasonCelsius: 3.5, dayCelsius: 3.5, frontCelsius: 2 },
  South: { meanCelsius: 20, seasonCelsius: 6, dayCelsius: 6, frontCelsius: 2.2 },
  'America/Denver': { meanCelsius: 8, seasonCelsius: 9, dayCelsius: 6, frontCelsius: 3 },
};

const HABITS: Readonly<Record<string, Habit>> = { spa: 'spa', feature: 'feature', solar: 'solar' };

/** The demo company's pumps as the simulator plays them: its own data plus the physics behind each, in pad order. */
export function listLarkmoorPumps(): PumpSpec[] {
  return LARKMOOR.pads.flatMap((pad) => pad.pumps.map((pump) => describePump(pad, pump)));
}

function describePump(pad: DemoPad, pump: DemoPump): PumpSpec {
  const physics = getByName(LARKMOOR_PHYSICS, pump.serial);
  return {
    serial: pump.serial,
    padName: pad.name,
    area: pad.area,
    zoneName: pad.zone,
    purpose: pump.purpose,
    settings: pump.settings,
    model: getByName(MOTOR_MODELS, pump.motorModel),
    firmware: '1.4.2',
    paper: {
      state: pad.state,
      poolGallons: pump.purpose === 'filter' ? pad.poolGallons : undefined,
      turnoversPerDay: pump.purpose === 'filter' ? pad.turnoversPerDay : undefined,
      nominalVolts: pump.nominalVolts,
    },
    contacts: pump.inputs.map(describeContact),
    equipment: pump.equipment.map(({ kind, input, interlock, minimumGpm }) => ({ kind, input, interlock, minimumGpm })),
    wetEnd: getByName(WET_ENDS, pump.wetEndModel),
    drive: getByName(MOTOR_DRIVES, pump.motorModel),
    ...describePhysics(physics),
    climate: climateOf(pad),
    motorClock: { knowsDaylightSaving: true, survivesCuts: true },
    stopWeekday: pad.stopWeekday,
    dialsKept: true,
    lived: pad.state === 'open' && pump.purpose === 'filter',
  };
}

function describePhysics(physics: LarkmoorPhysics): Pick<PumpSpec, 'system' | 'suction' | 'dirtRates' | 'supply'> {
  return {
    system: { staticFeet: physics.staticFeet, pipe: physics.pipe, filter: physics.filter },
    suction: { primeSeconds: physics.primeSeconds, restFill: physics.restFill, drainHours: physics.drainHours },
    dirtRates: { filterPerKilogallon: physics.filterDirt, basketPerKilogallon: physics.basketDirt },
    supply: { standingVolts: physics.volts, swingVolts: physics.swing },
  };
}

function describeContact(input: DemoPump['inputs'][number]): ContactSpec {
  const { number, drives, kind } = input;
  if (kind === 'clock') {
    const { clockType = 'synchronous', circuit = 'own' } = input;
    return { number, kind, drives, clock: { type: clockType, circuit, trippers: input.windows } };
  }
  return { number, kind, drives, habit: HABITS[drives ?? ''] ?? 'never' };
}

function climateOf(pad: DemoPad): Climate {
  const name = pad.zone in CLIMATES ? pad.zone : pad.area;
  return createClimate(createRandom(`climate/${name}`), getByName(CLIMATES, name));
}

/** The entry of a table; throws when the data names one that is not there. */
function getByName<T>(table: Readonly<Record<string, T>>, name: string): T {
  const entry = table[name];
  if (entry === undefined) throw new Error(`The demo's data names ${name}, which the simulator does not know.`);
  return entry;
}
