import { describe, expect, it } from 'vitest';
import { likelyCausesOf } from '#shared/domain/causes/likely-causes-of.ts';
import { DETECTORS, type Detector, type Evidence } from '#shared/domain/detectors/detector.ts';

const from = 100 * 86_400_000;
const explain = (detector: Detector, cause: string, evidence: Evidence) =>
  likelyCausesOf({ detector, cause, from, evidence });

describe('likely causes of an alarm', () => {
  it('says in words what speaks for and against each cause', () => {
    const [first, ...others] = explain('failed-prime', 'water-low', {
      loadShare: 0.3,
      loadCameAndWent: true,
      wattsOfNoFlow: false,
    }).causes;

    expect(first).toMatchObject({
      cause: 'water-low',
      standing: 'likely',
      detectorSays: true,
      reasonsFor: ['It catches water and loses it'],
      name: 'Water low at the skimmer',
    });
    expect(others.find(({ cause }) => cause === 'blocked')?.reasonsAgainst).toContain('No load at all');
  });

  it.each([
    ['failed-prime', 'unknown', { loadShare: 0.32, loadCameAndWent: false }, 'air-leak'],
    ['failed-prime', 'unknown', { loadShare: 0.62, wattsOfNoFlow: true }, 'valve-shut'],
    ['failed-prime', 'unknown', { loadShare: 0.55, wattsOfNoFlow: false, loadCameAndWent: false }, 'blocked'],
    ['slow-prime', 'unknown', { recentSeconds: [60, 70, 90, 120, 150, 190] }, 'drained-back'],
    ['low-load', 'sudden', { drop: 0.3 }, 'plugged-basket'],
    ['low-load', 'slow', { drop: 0.4 }, 'dirty-filter'],
    ['high-load', 'unknown', { rise: 0.45 }, 'to-waste'],
    ['wrong-speed', 'ignores-input', { driveCelsius: 45 }, 'input-wiring'],
    ['energized-without-flow', 'heater', { rpm: 3450, loadShare: 0.3 }, 'failed-prime'],
    ['energized-without-flow', 'heater', { rpm: 0 }, 'keypad-stop'],
    ['freezing', 'unknown', { protectionSet: false, saysSource: 'off' }, 'protection-off'],
    ['freezing', 'unknown', { protectionSet: true, saysSource: 'stop' }, 'stopped-by-hand'],
    ['keypad-hold', 'unknown', { sinceOurVisit: true }, 'left-on-manual-by-us'],
    ['drive-fault', 'E07', { driveCelsius: 97 }, 'overheated'],
    ['supply-voltage', 'standing', { volts: 262, nominalVolts: 230 }, 'utility'],
    ['too-little-water', 'low-flow', {}, 'dirty-filter'],
    ['clock-shift', 'drift', { inputs: [1] }, 'drift'],
    ['stopped', 'unknown', { fault: 'OC' }, 'fault'],
  ] as const)('puts %s, %s with %o down to %s first', (detector, cause, evidence, first) => {
    expect(explain(detector, cause, evidence).causes[0]?.cause).toBe(first);
  });

  it('rests on the starting guess, and is not certain, where the figures tell nothing', () => {
    for (const detector of DETECTORS) {
      if (detector === 'fed-through-clock' || detector === 'too-little-water') continue;
      const { restsOn, certain } = explain(detector, 'unknown', { minutes: 12 });
      expect(restsOn, detector).toEqual(['starting-guess']);
      expect(certain, detector).toBe(false);
    }
  });

  it('takes damaged figures for unknown ones', () => {
    const damaged = { loadShare: null, recentSeconds: ['soon'], driveCelsius: 'hot', volts: Number.NaN, inputs: 3 };

    for (const detector of ['failed-prime', 'slow-prime', 'drive-hot', 'clock-shift'] as const)
      expect(explain(detector, 'unknown', damaged).restsOn).toEqual(['starting-guess']);
  });

  it('lets what a person reported win over the figures', () => {
    const { causes } = likelyCausesOf(
      { detector: 'failed-prime', cause: 'unknown', from, evidence: { loadCameAndWent: true } },
      { seen: { 'load-comes-and-goes': false } },
    );

    expect(causes.find(({ cause }) => cause === 'water-low')?.reasonsAgainst).toContain(
      'The load does not come and go',
    );
  });

  it('counts what closed calls found', () => {
    const { causes, restsOn } = likelyCausesOf(
      { detector: 'low-load', cause: 'unknown', from, evidence: {} },
      {},
      { 'clogged-impeller': 30 },
    );

    expect(causes[0]).toMatchObject({ cause: 'clogged-impeller', found: 30, calls: 30 });
    expect(restsOn).toEqual(['closed-calls']);
  });
});
