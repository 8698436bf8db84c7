import { DETECTORS } from '#shared/domain/detectors/detector.ts';
import { matchTruth } from './score/match-truth.ts';
import { playDemo } from './score/play-fleet.ts';

/*
 * What the demo's month shows: every detector somewhere, and none without a reason. Prints how often each speaks, what
 * nothing explains and what was not seen; 1 when a detector is missing or something was said for nothing. It takes a
 * minute, so it is no test. Run: npx tsx tests/bench/demo-month.ts [days]
 */
const DAY_MS = 86_400_000;
/** The advisor's, which looks at bills and not at readings. */
const ELSEWHERE: readonly string[] = ['costly-program'];

const say = (text: string): void => void process.stdout.write(`${text}\n`);

const days = Number(process.argv[2] ?? 30);
const to = Date.UTC(2026, 8, 14, 17);
const month = playDemo({ seed: 'larkmoor', from: to - days * DAY_MS, to, cadenceMs: 60_000 });
const { scores, wrong, missed } = matchTruth(month.alarms, month.truth);
for (const detector of DETECTORS) {
  const spoke = month.alarms.filter((alarm) => alarm.detector === detector);
  const right = scores.get(detector)?.right ?? 0;
  if (!ELSEWHERE.includes(detector)) say(`${detector.padEnd(24)} ${spoke.length} alarms, ${right} of them scripted`);
}
const silent = DETECTORS.filter((one) => !ELSEWHERE.includes(one) && (scores.get(one)?.right ?? 0) === 0);
for (const alarm of wrong) say(`for nothing: ${JSON.stringify(alarm)}`);
for (const row of missed) say(`not seen: ${JSON.stringify(row)}`);
say(`${month.readings} readings; never shown: ${silent.join(', ') || 'none'}; for nothing: ${wrong.length}`);
process.exitCode = silent.length + wrong.length > 0 ? 1 : 0;
