/**
 * Water in the strainer and volute: 1 = full, 0 = air. It moves exponentially towards where lid, water level and lift
 * let it go; both ends are written down, so that any later instant follows without stepping.
 */
export type Water = { fill: number; since: number; target: number; tauMs: number };

/** The suction side of one pad. */
export type Suction = {
  /** Seconds from a third full to primed at full speed, with everything in order. */
  readonly primeSeconds: number;
  /** How full it stays when it stands, and how fast it drains back. */
  readonly restFill: number;
  readonly drainHours: number;
};

/** What is wrong with the suction side; all of it absent on a healthy pad. */
export type SuctionTrouble = {
  /** 0 = tight, 1 = the lid's seal is out. */
  airLeak: number;
  waterLow: boolean;
  /** The line is plugged: the pump churns what it has. */
  blocked: boolean;
  /** The check valve leaks: it stands dry and has the whole lift to draw. */
  drainsBack: boolean;
  /** Draws air while it runs: all at once, or now and then. */
  gulps: 'no' | 'sudden' | 'ragged';
  /** How many times longer a prime takes. */
  slowness: number;
};

export function createSuctionTrouble(): SuctionTrouble {
  return { airLeak: 0, waterLow: false, blocked: false, drainsBack: false, gulps: 'no', slowness: 1 };
}

/** With the whole lift to draw it takes a quarter of an hour at the least, if it gets there at all. */
const LIFT_TAU_MS = 700_000;

/** A healthy pump overshoots its full mark, so that it gets there in finite time. */
const FULL_TARGET = 1.06;

export function waterFill(water: Water, at: number): number {
  const fill = water.target + (water.fill - water.target) * Math.exp(-(at - water.since) / water.tauMs);
  return fill > 1 ? 1 : Math.max(fill, 0);
}

/** Something changed: settle what has happened so far and aim anew. `luck` is this start's own factor on its time. */
export function aimWater(
  water: Water,
  suction: Suction,
  trouble: SuctionTrouble,
  rpm: number,
  at: number,
  luck: number,
): void {
  water.fill = waterFill(water, at);
  water.since = at;
  const aim = rpm > 0 ? drawing(suction, trouble, rpm, luck) : standing(suction, trouble);
  water.target = aim.target;
  water.tauMs = aim.tauMs;
}

type Aim = { readonly target: number; readonly tauMs: number };

function drawing(suction: Suction, trouble: SuctionTrouble, rpm: number, luck: number): Aim {
  const tauSeconds = (suction.primeSeconds * luck) / Math.log((FULL_TARGET - 0.33) / (FULL_TARGET - 0.98));
  // Suction falls with the square of the speed; what is drawn, a little less steeply.
  const speed = Math.min(1, rpm / 3450) ** 1.6;
  const tauMs = (1000 * tauSeconds * trouble.slowness) / speed;
  if (trouble.gulps === 'sudden') return { target: 0.12, tauMs: 15_000 };
  if (trouble.airLeak > 0) return { target: FULL_TARGET - 0.8 * trouble.airLeak, tauMs };
  if (trouble.waterLow) return { target: 0.42, tauMs };
  if (trouble.blocked) return { target: 0.74, tauMs };
  if (trouble.gulps === 'ragged') return { target: 0.78, tauMs: 40_000 };
  return { target: FULL_TARGET, tauMs: trouble.drainsBack ? Math.max(tauMs * 14, LIFT_TAU_MS) : tauMs };
}

function standing(suction: Suction, trouble: SuctionTrouble): Aim {
  if (trouble.drainsBack) return { target: 0, tauMs: 120_000 };
  if (trouble.airLeak > 0 || trouble.gulps !== 'no') return { target: 0.1, tauMs: 180_000 };
  if (trouble.waterLow) return { target: 0.15, tauMs: 600_000 };
  return { target: suction.restFill, tauMs: suction.drainHours * 3_600_000 };
}

/** Share of the full load that a fill gives: air escapes for a while, then the pump catches at once. */
export function loadShare(fill: number): number {
  return fill >= 1 ? 1 : fill ** 4;
}
