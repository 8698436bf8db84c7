/** What a motor does when a prime ends without load: try again so often, then rest. */
export type PrimeRetry = {
  readonly tries: number;
  readonly pauseMs: number;
  readonly restMs: number;
};

/** How the simulated firmware behaves, and which optional fields it says. */
export type MotorModel = {
  readonly inputCount: number;
  readonly programOverlap: 'first-listed' | 'higher-speed';
  readonly stopBeatsInputs: boolean;
  readonly timedResumes: boolean;
  /** Absent = it does not sense load: after the prime it runs on, dry or not. */
  readonly primeRetry: PrimeRetry | undefined;
  readonly says: {
    readonly source: boolean;
    readonly motorClock: boolean;
    readonly temperatures: boolean;
    readonly volts: boolean;
    readonly settings: boolean;
  };
  readonly driveHotCelsius: number;
};
