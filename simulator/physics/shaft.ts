/** A shaft on its way to a speed: at `since` it turned at `fromRpm`; it moves by `rpmPerSecond` until `targetRpm`. */
export type Shaft = { fromRpm: number; since: number; targetRpm: number; rpmPerSecond: number; settlesAt: number };

export function createShaft(at: number): Shaft {
  return { fromRpm: 0, since: at, targetRpm: 0, rpmPerSecond: 1, settlesAt: at };
}

/** Speed, rpm, at an instant not before `since`. */
export function shaftRpm(shaft: Shaft, at: number): number {
  if (at >= shaft.settlesAt) return shaft.targetRpm;
  const moved = (shaft.rpmPerSecond * (at - shaft.since)) / 1000;
  return shaft.targetRpm > shaft.fromRpm ? shaft.fromRpm + moved : shaft.fromRpm - moved;
}

/** The drive is told another speed. */
export function aimShaft(shaft: Shaft, targetRpm: number, rampUp: number, rampDown: number, at: number): void {
  shaft.fromRpm = shaftRpm(shaft, at);
  shaft.since = at;
  shaft.targetRpm = targetRpm;
  shaft.rpmPerSecond = targetRpm > shaft.fromRpm ? rampUp : rampDown;
  shaft.settlesAt = at + Math.ceil((Math.abs(targetRpm - shaft.fromRpm) / shaft.rpmPerSecond) * 1000);
}
