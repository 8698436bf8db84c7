import { useMemo, useSyncExternalStore } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { Voice } from '#shared/domain/control/explain-options.ts';
import type { StripState } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { instantWords } from './instant-words.ts';

export type InstantLineProps = {
  readonly pump: PumpRow;
  readonly strip: StripState;
  readonly cursor: CursorStore;
  readonly now: number;
  readonly voice: Voice;
  /** What stands here while nobody points at an instant; without it, what is said of now. */
  readonly idle?: string;
};

/** A minute is as fine as anybody reads a day's strip. */
const STEP_MS = 60_000;

/** Figures that part between one another, never from their units. */
const Unbroken = ({ text }: { readonly text: string }) => (
  <span>
    {text.split(/(?<=, )/).map((part) => (
      <span key={part} className="inline-block whitespace-pre">
        {part}
      </span>
    ))}
  </span>
);

/** "Why this speed": time, figures and reason of the instant under the cursor. */
export function InstantLine({ pump, strip, cursor, now, voice, idle }: InstantLineProps) {
  const format = useFormat();
  const at = useSyncExternalStore(cursor.subscribe, () => {
    const chosen = cursor.get();
    return chosen === undefined ? undefined : Math.floor(chosen / STEP_MS) * STEP_MS;
  });
  const { figures, why } = useMemo(
    () => instantWords({ pump, strip, at, now, format, voice }),
    [pump, strip, at, now, format, voice],
  );
  if (at === undefined && idle !== undefined) return <p className="min-h-8 pt-1 text-ink-2">{idle}</p>;
  return (
    <div className="min-h-13">
      <p className="figures flex flex-wrap items-baseline gap-x-3 font-semibold">
        <span className={`px-1.5 text-13 font-medium text-sheet ${at === undefined ? 'bg-ink' : 'bg-focus'}`}>
          {format.time(at ?? now, pump.zone)}
        </span>
        {figures === undefined ? null : <Unbroken text={figures} />}
      </p>
      <p className="text-17">
        <Figures text={why} />
      </p>
    </div>
  );
}
