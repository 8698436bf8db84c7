/**
 * What a motor finds itself in, for `decide`. Instants in ms; every claim is one already found believable (see
 * `believes`), and absent where there is none.
 */
export type Situation = {
  readonly at: number;
  /** IANA name of the pad's zone; an unknown one is read as UTC. */
  readonly zone: string;
  /** How far the motor's own clock is ahead of the pad's wall time, minutes. */
  readonly motorClockOffsetMinutes: number;
  /** Mask, bit 0 = input 1. */
  readonly closedInputs: number;
  /**
   * The start from standstill whose prime counts. `claimed`: the motor says that it primes, which holds for 30 s past
   * the prime time and whatever asked for the start.
   */
  readonly prime?: { readonly since: number; readonly claimed: boolean } | undefined;
  /** The speed held at the keypad, rpm. */
  readonly keypadRpm?: number | undefined;
  readonly timedSince?: number | undefined;
  /** The beginning of the hour for which freeze protection runs. */
  readonly freezeSince?: number | undefined;
  readonly stopped?: boolean | undefined;
  readonly fault?: { readonly code: string | undefined } | undefined;
};
