import type { PumpNow, PumpRow } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { type Explained, explain, explainShort } from '#shared/domain/control/explain.ts';
import type { ExplainContext, ExplainOptions, Voice } from '#shared/domain/control/explain-options.ts';
import { explainedRun } from '#shared/domain/control/explain-run.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { parseBecause } from './parse-because.ts';

/** What is known of a pump when its speed is explained. */
export type WhyContext = Pick<PumpRow, 'zone' | 'settings' | 'traits' | 'inputs'>;

export const explainOptions = ({ twelveHour, locale, units }: Format, voice: Voice): ExplainOptions => ({
  voice,
  hour12: twelveHour,
  locale,
  system: units,
});

const explainedNow = (now: PumpNow): Explained => ({
  at: now.at,
  rpm: now.rpm,
  source: now.source,
  expectedSource: now.expectedSource,
  expectedRpm: now.expectedRpm,
  because: parseBecause(now.because),
  until: now.until ?? undefined,
  lockedBy: now.lockedBy ?? undefined,
});

const explainedThen = (run: Run, at: number, context: ExplainContext): Explained =>
  explainedRun({ ...run, to: run.to ?? undefined, gallons: run.gallons ?? undefined }, at, context, 0);

/** Why a pump runs as it does now, in a few words. */
export const whyNowShort = (now: PumpNow, context: WhyContext, format: Format): string =>
  explainShort(explainedNow(now), context, explainOptions(format, 'technician'));

/** Why a pump runs as it does now, as a sentence. */
export const whyNow = (now: PumpNow, context: WhyContext, format: Format, voice: Voice): string =>
  explain(explainedNow(now), context, explainOptions(format, voice));

/** Why a pump ran as it did at an instant within one of its runs, in a few words. */
export const whyThenShort = (run: Run, at: number, context: WhyContext, format: Format): string =>
  explainShort(explainedThen(run, at, context), context, explainOptions(format, 'technician'));

/** Why a pump ran as it did at an instant within one of its runs, as a sentence. */
export const whyThen = (run: Run, at: number, context: WhyContext, format: Format, voice: Voice): string =>
  explain(explainedThen(run, at, context), context, explainOptions(format, voice));
