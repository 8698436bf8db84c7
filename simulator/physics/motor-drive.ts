/** The electrical side: a permanent-magnet motor behind a drive. */
export type MotorDrive = {
  readonly standbyWatts: number;
  /** Shaft power the drive is rated for. */
  readonly ratedWatts: number;
  readonly ratedRpm: number;
  /** Losses at rated load as a share of the rated power: iron and switching (with the speed), copper (with the torque). */
  readonly ironShare: number;
  readonly copperShare: number;
  /** How fast the speed moves, rpm per second. */
  readonly rampUp: number;
  readonly rampDown: number;
};

/**
 * Watts at the line terminals for a shaft power and speed. The losses do not follow the cube of the speed: iron and
 * switching go roughly with the speed, copper with the square of the torque.
 */
export function lineWatts(drive: MotorDrive, shaft: number, rpm: number): number {
  if (rpm <= 0) return drive.standbyWatts;
  const speed = rpm / drive.ratedRpm;
  const torque = shaft / drive.ratedWatts / speed;
  const loss = drive.ironShare * (0.15 + 0.85 * speed ** 1.3) + drive.copperShare * torque * torque;
  return drive.standbyWatts + shaft + drive.ratedWatts * loss;
}
