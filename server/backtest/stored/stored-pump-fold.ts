import type { RaisedAlarm } from '#shared/domain/backtest/compare-alarms.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { AlarmSignal, Detector } from '#shared/domain/detectors/detector.ts';
import type { DetectorParameters } from '#shared/domain/detectors/detector-parameters.ts';
import { createPumpFold, type PumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';

/** When the server could hear anything, ms, in order; before the first and while it lasts. */
export type Listening = readonly { readonly from: number; readonly to: number }[];

/** One pump under one version of the rules, and what it raised. */
export type StoredPumpFold = {
  readonly push: (event: PumpEvent) => void;
  /** Tells that time has passed up to an instant without an event; silence counts only while the server listened. */
  readonly passTime: (until: number) => void;
  /** Alarms that stood or were raised from an instant on, in order of raising. */
  readonly alarmsFrom: (from: number) => RaisedAlarm[];
};

/** Silence is judged in minutes, ms. */
const TELL_TIME_EVERY_MS = 60_000;
const TAKE_EVERY_EVENTS = 200;

/** The fold that runs live, with nothing learnt yet. */
export function createStoredPumpFold(
  context: PumpContext,
  rules: DetectorParameters,
  listening: Listening,
): StoredPumpFold {
  const fold = createPumpFold(context, undefined, rules);
  const book = createAlarmBook();
  let toldAt: number | undefined;
  let waiting = 0;
  const gather = (): void => {
    waiting = 0;
    for (const signal of fold.take().signals) book.take(signal);
  };
  const passTime = (until: number): void => {
    if (toldAt === undefined) return;
    for (let at = toldAt + TELL_TIME_EVERY_MS; at < until; at += TELL_TIME_EVERY_MS) {
      tell(fold, listening, at);
      toldAt = at;
    }
    gather();
  };
  return {
    push: (event) => {
      passTime(event.receivedAt);
      toldAt = Math.max(toldAt ?? 0, event.receivedAt);
      if (event.kind === 'reading' && event.reading.at <= (fold.highWater() ?? Number.NEGATIVE_INFINITY)) return;
      fold.push(event);
      waiting += 1;
      if (waiting >= TAKE_EVERY_EVENTS) gather();
    },
    passTime,
    alarmsFrom: (from) => {
      gather();
      return book.list().filter(({ to }) => to === null || to >= from);
    },
  };
}

function tell(fold: PumpFold, listening: Listening, at: number): void {
  const [first] = listening;
  const period = listening.findLast(({ from }) => from <= at);
  // What was imported lies before the first start: nothing says that nobody listened then.
  if (first === undefined || at < first.from) fold.push({ kind: 'time', receivedAt: at });
  else if (period !== undefined && at <= period.to + TELL_TIME_EVERY_MS) {
    const isStart = at - period.from < TELL_TIME_EVERY_MS;
    fold.push({ kind: isStart ? 'listening' : 'time', receivedAt: at });
  }
}

type AlarmBook = { readonly take: (signal: AlarmSignal) => void; readonly list: () => readonly RaisedAlarm[] };

type Entry = { -readonly [Key in keyof RaisedAlarm]: RaisedAlarm[Key] };

function createAlarmBook(): AlarmBook {
  const entries: Entry[] = [];
  const open = new Map<Detector, Entry>();
  return {
    take: (signal) => {
      const { detector } = signal;
      const entry = open.get(detector);
      if (signal.type === 'cleared') {
        if (entry !== undefined) entry.to = signal.at;
        open.delete(detector);
        return;
      }
      const { alarmClass, priority, cause } = signal;
      if (entry !== undefined) {
        Object.assign(entry, { alarmClass, priority, cause });
        return;
      }
      if (signal.type !== 'raised') return;
      const raised: Entry = { detector, alarmClass, priority, cause, from: signal.from, raised: signal.at, to: null };
      entries.push(raised);
      open.set(detector, raised);
    },
    list: () => entries,
  };
}
