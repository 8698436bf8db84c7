import { parseRequest } from '#server/backtest/stored/backtest-request.ts';
import type {
  Backtest,
  BacktestCounts,
  BacktestPump,
  BacktestResult,
  ComparedAlarm,
} from '#shared/contract/http/backtests.ts';
import type { ComparedAlarm as Compared } from '#shared/domain/backtest/compare-alarms.ts';
import type { Detector } from '#shared/domain/detectors/detector.ts';
import type { BacktestRow, OutcomeRow } from './backtest-read-model.ts';

/** A screen shows so many pumps on which something differs; the counts are of all. */
const MOST_PUMPS = 200;

/** How far a backtest is. */
export function presentBacktest(row: BacktestRow): Backtest {
  const { scope, rules, from, to } = parseRequest(row.request);
  const done = row.pumps === 0 ? 1 : (row.pumpsDone + row.permilleOfPump / 1000) / row.pumps;
  const { id, state, askedAt, askedBy, startedAt, endedAt, pumps, pumpsDone, readings, cancelAsked, failure } = row;
  return {
    ...{ id, state, scope, rules: presentRules(rules), from, to, askedAt, askedBy, startedAt, endedAt },
    ...{ pumps, pumpsDone, readings, cancelAsked, failure },
    progress: state === 'done' ? 1 : Math.min(1, done),
  };
}

const presentRules = (rules: object): Backtest['rules'] => ({ ...rules }) as Backtest['rules'];

const noCounts = (): BacktestCounts => ({ before: 0, after: 0, same: 0, changed: 0, gone: 0, new: 0 });

function count(counts: BacktestCounts, { difference, before, after }: Compared): void {
  counts[difference] += 1;
  if (before !== null) counts.before += 1;
  if (after !== null) counts.after += 1;
}

const differs = ({ changed, gone, new: added }: BacktestCounts): number => changed + gone + added;

/** A backtest with what it found, as far as it is. */
export function presentResult(row: BacktestRow, outcomes: readonly OutcomeRow[]): BacktestResult {
  const counts = noCounts();
  const byDetector = new Map<Detector, BacktestCounts>();
  const needless = { answered: 0, before: 0, after: 0 };
  const pumps: BacktestPump[] = [];
  for (const { outcome, ...pump } of outcomes) {
    if (outcome.kind === 'failed') continue;
    const own = noCounts();
    for (const alarm of outcome.alarms) {
      const detector = (alarm.before ?? alarm.after)?.detector;
      if (detector === undefined) continue;
      const ofDetector = byDetector.get(detector) ?? noCounts();
      byDetector.set(detector, ofDetector);
      for (const each of [counts, own, ofDetector]) count(each, alarm);
    }
    for (const key of ['answered', 'before', 'after'] as const) needless[key] += outcome.needless[key];
    if (differs(own) > 0) pumps.push({ ...pump, counts: own, alarms: outcome.alarms.map(presentCompared) });
  }
  pumps.sort((a, b) => differs(b.counts) - differs(a.counts));
  return {
    ...presentBacktest(row),
    counts,
    detectors: [...byDetector]
      .map(([detector, each]) => ({ detector, ...each }))
      .sort((a, b) => differs(b) - differs(a)),
    needless,
    differing: pumps.slice(0, MOST_PUMPS),
    morePumps: Math.max(0, pumps.length - MOST_PUMPS),
    failedPumps: outcomes.filter(({ outcome }) => outcome.kind === 'failed').length,
  };
}

const presentCompared = ({ difference, before, after }: Compared): ComparedAlarm => ({ difference, before, after });
