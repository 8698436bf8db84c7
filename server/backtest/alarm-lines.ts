import type { AlarmClass, AlarmSignal, Detector, Evidence, Priority } from '#shared/domain/detectors/detector.ts';

/** One alarm of a backtest in its last state; `to` null = still standing. */
export type AlarmLine = {
  readonly s: string;
  readonly detector: Detector;
  class: AlarmClass;
  priority: Priority;
  from: number;
  readonly raised: number;
  to: number | null;
  cause: string;
  evidence: Evidence;
};

/** Gathers signals into alarm lines and gives them out in order of raising, each once it has returned. */
export type AlarmLines = {
  readonly take: (serial: string, signals: readonly AlarmSignal[]) => void;
  /** Lines raised before an instant that will not change any more; one that stands holds back those behind it. */
  readonly settled: (before: number) => AlarmLine[];
  /** Everything left, standing alarms included. */
  readonly rest: () => AlarmLine[];
};

/** A later signal never empties what an earlier one knew. */
function applySignal(line: AlarmLine, signal: AlarmSignal): void {
  if (signal.type === 'cleared') {
    line.to = signal.at;
    return;
  }
  line.class = signal.alarmClass;
  line.priority = signal.priority;
  line.cause = signal.cause;
  line.evidence = signal.evidence;
}

export function createAlarmLines(): AlarmLines {
  let queue: AlarmLine[] = [];
  const open = new Map<string, AlarmLine>();

  const raise = (serial: string, signal: Extract<AlarmSignal, { type: 'raised' }>): void => {
    const line: AlarmLine = {
      s: serial,
      detector: signal.detector,
      class: signal.alarmClass,
      priority: signal.priority,
      from: signal.from,
      raised: signal.at,
      to: null,
      cause: signal.cause,
      evidence: signal.evidence,
    };
    queue.push(line);
    open.set(`${serial} ${signal.detector}`, line);
  };

  return {
    take: (serial, signals) => {
      for (const signal of signals) {
        if (signal.type === 'raised') {
          raise(serial, signal);
          continue;
        }
        const key = `${serial} ${signal.detector}`;
        const line = open.get(key);
        if (line === undefined) continue;
        applySignal(line, signal);
        if (signal.type === 'cleared') open.delete(key);
      }
    },
    settled: (before) => {
      queue.sort((a, b) => a.raised - b.raised);
      const unsettled = queue.findIndex((line) => line.to === null || line.raised >= before);
      const settled = queue.slice(0, unsettled === -1 ? queue.length : unsettled);
      queue = queue.slice(settled.length);
      return settled;
    },
    rest: () => {
      const rest = queue.sort((a, b) => a.raised - b.raised);
      queue = [];
      return rest;
    },
  };
}
