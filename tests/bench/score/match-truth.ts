import type { AlarmLine } from '#server/backtest/alarm-lines.ts';
import type { TruthRow } from '#simulator/truth.ts';

/** How one detector did against what was truly wrong. */
export type DetectorScore = {
  readonly detector: string;
  /** Faults that showed for as long as the rule needs. */
  required: number;
  found: number;
  /** Alarms that some fault explains, and those that nothing does. */
  right: number;
  wrong: number;
  /** A second alarm about one fault. */
  repeats: number;
  causesJudged: number;
  causesRight: number;
  readonly delaysMinutes: number[];
};

export type Scored = {
  readonly scores: ReadonlyMap<string, DetectorScore>;
  readonly wrong: readonly AlarmLine[];
  readonly missed: readonly TruthRow[];
  /** Faults that were found and given another cause, with the alarms that gave it. */
  readonly mistaken: readonly { readonly fault: TruthRow; readonly alarms: readonly AlarmLine[] }[];
};

/** A rule that looks back over days may speak this long after a fault was put right, and an edge falls on a reading. */
const AFTERWARDS_MS = 6 * 3_600_000;
const BEFORE_MS = 10 * 60_000;

const covers = (row: TruthRow, alarm: AlarmLine): boolean =>
  (row.s === alarm.s || alarm.pads?.includes(row.s) === true) &&
  alarm.raised >= row.begunAt - BEFORE_MS &&
  alarm.raised <= (row.endedAt ?? Number.POSITIVE_INFINITY) + AFTERWARDS_MS;

const emptyScore = (detector: string): DetectorScore => ({
  detector,
  required: 0,
  found: 0,
  right: 0,
  wrong: 0,
  repeats: 0,
  causesJudged: 0,
  causesRight: 0,
  delaysMinutes: [],
});

/** Holds alarms against the truth. An alarm that a fault allows beside its own detector counts neither way. */
export function matchTruth(alarms: readonly AlarmLine[], truth: readonly TruthRow[]): Scored {
  const scores = new Map<string, DetectorScore>();
  const scoreOf = (detector: string): DetectorScore => {
    const score = scores.get(detector) ?? emptyScore(detector);
    scores.set(detector, score);
    return score;
  };
  const byRow = new Map<TruthRow, AlarmLine[]>();
  const wrong: AlarmLine[] = [];
  for (const alarm of alarms) {
    const rows = truth.filter((row) => covers(row, alarm));
    const own = rows.filter((row) => row.detector === alarm.detector);
    if (own.length > 0) {
      scoreOf(alarm.detector).right += 1;
      for (const row of own) byRow.set(row, [...(byRow.get(row) ?? []), alarm]);
    } else if (!rows.some((row) => row.also.includes(alarm.detector))) {
      scoreOf(alarm.detector).wrong += 1;
      wrong.push(alarm);
    }
  }
  const missed: TruthRow[] = [];
  const mistaken: { readonly fault: TruthRow; readonly alarms: readonly AlarmLine[] }[] = [];
  for (const row of truth) {
    const found = byRow.get(row) ?? [];
    const score = scoreOf(row.detector);
    const [first] = found;
    if (row.required) score.required += 1;
    if (row.required && first !== undefined) score.found += 1;
    if (row.required && first === undefined) missed.push(row);
    if (first === undefined) continue;
    score.repeats += found.length - 1;
    score.delaysMinutes.push((first.raised - row.from) / 60_000);
    if (row.cause === null) continue;
    score.causesJudged += 1;
    if (found.some((alarm) => alarm.cause === row.cause)) score.causesRight += 1;
    else mistaken.push({ fault: row, alarms: found });
  }
  return { scores, wrong, missed, mistaken };
}
