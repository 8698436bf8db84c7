import type { AlarmClass, AlarmSignal, Detector, Evidence, Priority } from '#shared/domain/detectors/detector.ts';

/** One alarm of a backtest in its last state; `to` null = still standing. It names one pad, or all it speaks for. */
export type AlarmLine = {
  readonly s?: string;
  pads?: readonly string[];
  readonly detector: Detector;
  class: AlarmClass;
  priority: Priority;
  readonly from: number;
  readonly raised: number;
  to: number | null;
  cause: string;
  evidence: Evidence;
};

type Words = Pick<AlarmLine, 'class' | 'priority' | 'cause' | 'evidence'>;

/** Gathers what is said into alarm lines and gives them out in order of raising, each once it has returned. */
export type AlarmLines = {
  readonly take: (serial: string, signal: AlarmSignal) => void;
  /** The open line of a key: a pad with its detector (`lineKey`), or an alarm that speaks for several pads. */
  readonly find: (key: string) => AlarmLine | undefined;
  readonly open: (key: string, line: AlarmLine) => void;
  readonly close: (key: string, at: number) => void;
  /** Takes back an open line as if it had never been said. */
  readonly withdraw: (key: string) => void;
  /** Lines raised before an instant that will not change any more; one that stands holds back those behind it. */
  readonly settled: (before: number) => AlarmLine[];
  /** Everything left, standing alarms included. */
  readonly rest: () => AlarmLine[];
};

export const lineKey = (serial: string, detector: Detector): string => `${serial} ${detector}`;

const wordsOf = (signal: Exclude<AlarmSignal, { type: 'cleared' }>): Words => ({
  class: signal.alarmClass,
  priority: signal.priority,
  cause: signal.cause,
  evidence: signal.evidence,
});

/** An alarm is over when its condition is, not when that has lasted for the off-delay. */
const normalSince = ({ evidence, at }: Extract<AlarmSignal, { type: 'cleared' }>): number =>
  typeof evidence.normalSince === 'number' ? evidence.normalSince : at;

const byRaising = (one: AlarmLine, other: AlarmLine): number => one.raised - other.raised;

export function createAlarmLines(): AlarmLines {
  let queue: AlarmLine[] = [];
  const standing = new Map<string, AlarmLine>();

  const open: AlarmLines['open'] = (key, line) => {
    queue.push(line);
    standing.set(key, line);
  };
  const close: AlarmLines['close'] = (key, at) => {
    const line = standing.get(key);
    if (line !== undefined) line.to = at;
    standing.delete(key);
  };

  return {
    open,
    close,
    withdraw: (key) => {
      queue = queue.filter((line) => line !== standing.get(key));
      standing.delete(key);
    },
    find: (key) => standing.get(key),
    take: (serial, signal) => {
      const key = lineKey(serial, signal.detector);
      const line = standing.get(key);
      if (signal.type === 'cleared') close(key, normalSince(signal));
      else if (signal.type === 'raised') {
        const { detector, from, at } = signal;
        const { class: alarmClass, priority, cause, evidence } = wordsOf(signal);
        open(key, { s: serial, detector, class: alarmClass, priority, from, raised: at, to: null, cause, evidence });
      } else if (line !== undefined) Object.assign(line, wordsOf(signal));
    },
    settled: (before) => {
      queue.sort(byRaising);
      const unsettled = queue.findIndex((line) => line.to === null || line.raised >= before);
      const settled = queue.slice(0, unsettled === -1 ? queue.length : unsettled);
      queue = queue.slice(settled.length);
      return settled;
    },
    rest: () => {
      const rest = queue.sort(byRaising);
      queue = [];
      return rest;
    },
  };
}
