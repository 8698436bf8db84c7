import { parseArgs } from 'node:util';
import { type DetectorScore, matchTruth } from './score/match-truth.ts';
import { playFleet } from './score/play-fleet.ts';

/*
 * Scores detection: plays a long, faulty, noisy fleet over several zones in process and prints what was found of what
 * was truly wrong. The aims: recall and precision 0.98, causes 0.9, no false alarm in 100 healthy pump-months.
 *   npm run score -- [--pumps 40] [--days 45] [--cadence 30] [--each 2] [--seed score] [--healthy 50] [--list]
 */
const { values } = parseArgs({
  options: {
    pumps: { type: 'string', default: '40' },
    days: { type: 'string', default: '45' },
    cadence: { type: 'string', default: '30' },
    each: { type: 'string', default: '2' },
    seed: { type: 'string', default: 'score' },
    healthy: { type: 'string', default: '50' },
    list: { type: 'boolean', default: false },
  },
});

/** A month that holds a daylight-saving day in both hemispheres lies ahead of it. */
const FROM = Date.UTC(2026, 8, 10);
const say = (text: string): void => void process.stdout.write(`${text}\n`);
const share = (part: number, whole: number): string => (whole === 0 ? '   –' : (part / whole).toFixed(2).padStart(4));
const median = (numbers: readonly number[]): number =>
  numbers.toSorted((a, b) => a - b)[Math.floor(numbers.length / 2)] ?? Number.NaN;

function row(score: DetectorScore): string {
  const delay = score.delaysMinutes.length === 0 ? '–' : `${Math.round(median(score.delaysMinutes))} min`;
  return [
    score.detector.padEnd(24),
    `${score.found}/${score.required}`.padStart(7),
    share(score.found, score.required),
    share(score.right, score.right + score.wrong),
    share(score.causesRight, score.causesJudged),
    `${score.repeats}`.padStart(4),
    delay.padStart(10),
  ].join('  ');
}

const base = { seed: values.seed, from: FROM, days: Number(values.days), cadenceMs: Number(values.cadence) * 1000 };
const startedAt = performance.now();
const faulty = playFleet({ ...base, pumps: Number(values.pumps), each: Number(values.each) });
const { scores, wrong, missed, mistaken } = matchTruth(faulty.alarms, faulty.truth);
say(
  `${faulty.readings.toLocaleString('en-US')} readings of ${values.pumps} pumps over ${values.days} days, ${faulty.truth.length} faults`,
);
say(`${'detector'.padEnd(24)}    found  recall  precision  causes  repeats  median delay`);
const all = [...scores.values()].sort((a, b) => a.detector.localeCompare(b.detector));
for (const score of all) say(row(score));
const sum = (pick: (score: DetectorScore) => number): number => all.reduce((total, score) => total + pick(score), 0);
const total = {
  recall: sum((s) => s.found) / sum((s) => s.required),
  precision: sum((s) => s.right) / (sum((s) => s.right) + sum((s) => s.wrong)),
  causes: sum((s) => s.causesRight) / sum((s) => s.causesJudged),
};
say(
  `all: recall ${total.recall.toFixed(3)}, precision ${total.precision.toFixed(3)}, causes ${total.causes.toFixed(3)}`,
);
if (values.list) {
  for (const alarm of wrong) say(`wrong: ${JSON.stringify(alarm)}`);
  for (const fault of missed) say(`missed: ${JSON.stringify(fault)}`);
  for (const { fault, alarms } of mistaken)
    say(`mistaken: ${fault.detector} ${fault.cause} ${JSON.stringify(fault)} ${JSON.stringify(alarms)}`);
}
if (Number(values.healthy) > 0) {
  const healthy = playFleet({
    ...base,
    seed: `${values.seed}/healthy`,
    days: 60,
    pumps: Number(values.healthy),
    each: 0,
  });
  const standing = matchTruth(healthy.alarms, healthy.truth).wrong;
  const alarms = standing.filter((line) => line.class === 'alarm');
  say(
    `healthy fleet: ${alarms.length} false alarms and ${standing.length - alarms.length} false notes in ${healthy.pumpMonths} pump-months`,
  );
  if (values.list) for (const alarm of standing) say(`false: ${JSON.stringify(alarm)}`);
}
say(`${Math.round((performance.now() - startedAt) / 1000)} s`);
