import { instantOf } from '../time/instant-of.ts';
import { DAY_MS, localTime, weekdayOf } from '../time/local-time.ts';
import type { ClockWindow, WiredInput } from './pump-context.ts';

/** A window in which an input closes, recorded or learnt. */
export type InputWindow = { readonly input: number; readonly window: ClockWindow };

/** A stretch in which an input is closed, half-open, ms. */
export type InputSpan = { readonly input: number; readonly from: number; readonly to: number };

/**
 * The windows recorded for a pump's inputs.
 *
 * @example recordedWindows(context.inputs) // [{ input: 1, window: { onMinute: 600, offMinute: 840, … } }]
 */
export function recordedWindows(inputs: readonly WiredInput[]): InputWindow[] {
  return inputs.flatMap(({ number, windows }) => windows.map((window) => ({ input: number, window })));
}

/**
 * When a clock's contact is closed between two instants (ms), in order: from the on tripper to `opensEarlyMinutes`
 * before the off tripper, in the pad's wall time, past midnight where off is not after on. Spans reach beyond
 * `from` and `to` where they straddle them. Empty for an unknown zone.
 *
 * @example listInputSpans('America/Phoenix', recordedWindows(context.inputs), dayFrom, dayTo)
 */
export function listInputSpans(zone: string, windows: readonly InputWindow[], from: number, to: number): InputSpan[] {
  const first = localTime(zone, from - DAY_MS)?.epochDay;
  const last = localTime(zone, to)?.epochDay;
  if (first === undefined || last === undefined) return [];
  const spans: InputSpan[] = [];
  for (let day = first; day <= last; day += 1) {
    for (const { input, window } of windows) {
      const span = window.days[weekdayOf(day)] === true ? spanOn(zone, day, window) : undefined;
      if (span !== undefined && span.from < to && span.to > from) spans.push({ input, ...span });
    }
  }
  return spans.sort((left, right) => left.from - right.from || left.input - right.input);
}

function spanOn(zone: string, day: number, window: ClockWindow): { from: number; to: number } | undefined {
  const { onMinute, offMinute, opensEarlyMinutes } = window;
  const offDay = offMinute > onMinute ? day : day + 1;
  const from = instantOf(zone, day, onMinute);
  const to = instantOf(zone, offDay, offMinute - opensEarlyMinutes);
  return from !== undefined && to !== undefined && from < to ? { from, to } : undefined;
}
