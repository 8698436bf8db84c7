import type { Pump } from '#simulator/pump.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';

/**
 * How much of a fault must have been visible before a rule has to speak, by the table of detectors: one stretch of
 * so many ms, so many stretches, or stretches on so many local days.
 */
export type Needs = { readonly stretchMs?: number; readonly stretches?: number; readonly days?: number };

/** Something that goes wrong at a pad, and what a watcher should make of it. */
export type Fault = {
  readonly slug: string;
  /** Slug of the detector that has to speak, and of the true cause: null where the table of detectors names none. */
  readonly detector: string;
  readonly cause: string | null;
  /** The cause on this pump, where it depends on what hangs on it. */
  readonly causeOn?: (spec: PumpSpec) => string;
  /** What happens, for whoever reads a scenario. */
  readonly story: string;
  /** How long it usually stands, hours. */
  readonly hours: readonly [number, number];
  readonly needs: Needs;
  /** Detectors whose word about this fault is not wrong either: its consequences, or the same thing seen otherwise. */
  readonly also: readonly string[];
  /** Whether this pump can have it and its readings could show it. */
  readonly suits: (spec: PumpSpec) => boolean;
  readonly begin: (pump: Pump, at: number, until: number) => void;
  /** Somebody comes and puts it right. */
  readonly end: (pump: Pump, at: number) => void;
  /** Whether the readings show it at this instant. */
  readonly shows: (pump: Pump, at: number) => boolean;
};

export const MINUTE_MS = 60_000;
export const HOUR_MS = 3_600_000;
export const DAY_MS = 86_400_000;
