import type { BenchPostgres } from './bench-database.ts';

/** One measured figure. Without a limit it only informs: absolute figures say as much of the machine as of the code. */
export type Figure = {
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  readonly atLeast?: number;
  readonly atMost?: number;
};

/** What a bench may ask for; PostgreSQL is started when the first one does. */
export type BenchTools = {
  readonly postgres: () => Promise<BenchPostgres>;
  readonly say: (text: string) => void;
};

export type Bench = {
  readonly name: string;
  readonly about: string;
  readonly run: (tools: BenchTools) => Promise<readonly Figure[]>;
};

/** Whether a figure keeps its limit; one without a limit always does. */
export function keepsLimit({ value, atLeast, atMost }: Figure): boolean {
  if (!Number.isFinite(value)) return false;
  return (atLeast === undefined || value >= atLeast) && (atMost === undefined || value < atMost);
}

/** The value below which this share of some values lies; NaN for none. */
export function quantile(values: readonly number[], share: number): number {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? Number.NaN;
}

/** The middle of some values; NaN for none. */
export const median = (values: readonly number[]): number => quantile(values, 0.5);
