import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { Voice } from '#shared/domain/control/explain-options.ts';
import { runAt, type StripState } from '#src/components/charts/strip/strip-run.ts';
import { describeSource } from '#src/components/charts/strip/strip-words.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { whyNow, whyThen } from '#src/lib/why/why.ts';

/** What is said of one instant: the figures measured then, and why. */
export type InstantWords = { readonly figures: string | undefined; readonly why: string };

type Asked = {
  readonly pump: PumpRow;
  readonly strip: StripState;
  readonly at: number | undefined;
  readonly now: number;
  readonly format: Format;
  readonly voice: Voice;
};

const figuresOf = (rpm: number, expected: number, watts: number, off: boolean, format: Format): string =>
  off
    ? t('pump.figures.off', { rpm: format.rpm(rpm), expected: format.rpm(expected), watts: format.watts(watts) })
    : t('pump.figures', { rpm: format.rpm(rpm), watts: format.watts(watts) });

/** The sentence for the instant under the cursor, or for now when nobody points anywhere. Nothing is made up. */
export function instantWords({ pump, strip, at, now, format, voice }: Asked): InstantWords {
  if (at === undefined && pump.now !== null && pump.silentSince === null) {
    const { rpm, expectedRpm, watts, source, expectedSource } = pump.now;
    return {
      figures: figuresOf(rpm, expectedRpm, watts, source !== expectedSource, format),
      why: whyNow(pump.now, pump, format, voice),
    };
  }
  const instant = at ?? now;
  const run = runAt(strip.runs ?? [], instant, now);
  if (run !== undefined) {
    const off = run.flags.includes('off-expected');
    return {
      figures:
        run.source === 'no-data' ? undefined : figuresOf(run.meanRpm, run.expectedRpm, run.meanWatts, off, format),
      why: whyThen(run, instant, pump, format, voice),
    };
  }
  const planned = instant <= now ? undefined : strip.planned.find(({ from, to }) => from <= instant && instant < to);
  if (planned === undefined) return { figures: undefined, why: t('pump.unknownInstant') };
  return {
    figures: undefined,
    why: t('pump.plannedInstant', { source: describeSource(planned).toLowerCase(), rpm: format.rpm(planned.rpm) }),
  };
}
