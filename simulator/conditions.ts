import { createSuctionTrouble, type SuctionTrouble } from './physics/prime.ts';
import type { Spell } from './physics/weather.ts';

/** Everything about a pad that can be wrong or out of the ordinary. A healthy pad has these values as created. */
export type Conditions = {
  readonly suction: SuctionTrouble;
  /** Factor on all friction: above 1 a valve closes, below 1 a bypass opens or water goes to waste. */
  valve: number;
  extraStaticFeet: number;
  /** Factor on how fast the filter gets dirty. */
  dirtRate: number;
  /** What the shaft takes more than the curve says, as a share of the load. */
  rubbing: number;
  /** Friction that a worn bearing adds, W per rpm of the shaft: its torque is the same at every speed. */
  frictionWattsPerRpm: number;
  /** Masks over inputs, bit 0 = input 1, at the clocks' side. */
  cutWires: number;
  stuckClosed: number;
  heldClosed: number;
  /** Somebody has turned the levers of all clocks to off, for as long as he works. */
  leversOff: boolean;
  /** The off tripper is missing: once closed it stays closed. */
  latchesClosed: number;
  flicker: number;
  /** A contact that will not hold: which bit, and how long it rests between bursts, ms. */
  chatter: { readonly bit: number; readonly meanRestMs: number; burstLeft: number; nextAt: number } | undefined;
  /** Masks at the motor's side. */
  ignores: number;
  runsOpen: number;
  /** Two leads swapped at the terminals (numbers from 1). */
  swapped: readonly [number, number] | undefined;
  /** What the motor says it obeys, whatever it obeys. */
  saysActive: number | undefined;
  followsLower: boolean;
  /** A speed nobody set, whenever it would run at another. */
  overrideRpm: number | undefined;
  limitRpm: number | undefined;
  /** Runs at this speed when nothing calls for any, and says that it is off. */
  unaskedRpm: number | undefined;
  /** The shaft does not turn although the drive is told to. */
  deadShaft: boolean;
  hotDriveCelsius: number;
  supplyShare: number;
  readonly spells: Spell[];
  /** The device's clock is behind by this, ms. */
  skewMs: number;
  hung: boolean;
};

export function createConditions(): Conditions {
  return {
    suction: createSuctionTrouble(),
    valve: 1,
    extraStaticFeet: 0,
    dirtRate: 1,
    rubbing: 0,
    frictionWattsPerRpm: 0,
    cutWires: 0,
    stuckClosed: 0,
    heldClosed: 0,
    leversOff: false,
    latchesClosed: 0,
    flicker: 0,
    chatter: undefined,
    ignores: 0,
    runsOpen: 0,
    swapped: undefined,
    saysActive: undefined,
    followsLower: false,
    overrideRpm: undefined,
    limitRpm: undefined,
    unaskedRpm: undefined,
    deadShaft: false,
    hotDriveCelsius: 0,
    supplyShare: 1,
    spells: [],
    skewMs: 0,
    hung: false,
  };
}
