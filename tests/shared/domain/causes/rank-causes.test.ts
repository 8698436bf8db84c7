import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { CAUSE_WEIGHTS } from '#shared/domain/causes/cause-weights.data.ts';
import { CAUSE_WORDS, SIGN_WORDS } from '#shared/domain/causes/cause-words.data.ts';
import { listFindings, rankCauses } from '#shared/domain/causes/rank-causes.ts';
import { SIGNS, type Signs } from '#shared/domain/causes/sign.ts';
import { DETECTORS } from '#shared/domain/detectors/detector.ts';

const DAY = 86_400_000;
const from = 100 * DAY;
const order = (...args: Parameters<typeof rankCauses>) => rankCauses(...args).causes.map(({ cause }) => cause);

describe('likely causes', () => {
  it('stand in the order of the starting guess while nothing is known, and say so', () => {
    const ranking = rankCauses('failed-prime', 'unknown', { from });

    expect(ranking.causes.map(({ cause }) => cause)).toEqual([
      'air-leak',
      'water-low',
      'blocked',
      'valve-shut',
      'drained-back',
    ]);
    expect(ranking.restsOn).toEqual(['starting-guess']);
    expect(ranking.lidOpened).toBeUndefined();
  });

  it('put an air leak first after the lid was opened, and say who opened it', () => {
    const ranking = rankCauses('failed-prime', 'unknown', { from, lidOpened: { at: from - 2 * DAY, by: 'Ana' } });

    expect(ranking.causes[0]).toMatchObject({
      cause: 'air-leak',
      standing: 'likely',
      evidenceFor: [{ sign: 'lid-opened', present: true }],
    });
    expect(ranking.lidOpened).toEqual({ at: from - 2 * DAY, by: 'Ana', daysBefore: 2 });
  });

  it('count a lid opened long before as one not opened, and one opened after it as unknown', () => {
    const [long, after] = [from - 60 * DAY, from + DAY].map((at) =>
      rankCauses('failed-prime', 'unknown', { from, lidOpened: { at, by: 'Ana' } }),
    );

    expect(long?.causes.find(({ cause }) => cause === 'air-leak')?.evidenceAgainst).toEqual([
      { sign: 'lid-opened', present: false },
    ]);
    expect(long?.lidOpened).toBeUndefined();
    expect(after?.restsOn).toEqual(['starting-guess']);
    expect(after?.lidOpened).toBeUndefined();
  });

  it('give evidence against as well as for', () => {
    const ranking = rankCauses('low-load', 'sudden', { from, seen: { 'psi-high': true } });
    const basket = ranking.causes.find(({ cause }) => cause === 'plugged-basket');

    expect(basket?.evidenceFor).toEqual([{ sign: 'sudden', present: true }]);
    expect(basket?.evidenceAgainst).toEqual([{ sign: 'psi-high', present: true }]);
  });

  it('tell a plugged basket from a dirty filter by how it came and by the gauge', () => {
    expect(order('low-load', 'sudden', { from, seen: { 'psi-low': true, wind: true } })[0]).toBe('plugged-basket');
    expect(order('low-load', 'slow', { from, seen: { 'psi-high': true } })[0]).toBe('dirty-filter');
    expect(order('low-load', 'slow', { from, filterCleanedAt: from - DAY })[0]).not.toBe('dirty-filter');
  });

  it('think of the breaker where no input closes, and of the clock where one does not', () => {
    expect(order('missing-input', 'all-inputs', { from })[0]).toBe('breaker-off');
    expect(order('missing-input', 'one-input', { from })[0]).toBe('clock-stopped');
  });

  it('follow the detector where it has named a cause itself', () => {
    expect(order('failed-prime', 'drained-back', { from })[0]).toBe('drained-back');
    expect(rankCauses('failed-prime', 'drained-back', { from })).toMatchObject({
      restsOn: ['signs'],
      causes: [{ cause: 'drained-back', detectorSays: true }, { detectorSays: false }, {}, {}, {}],
    });
  });

  it('learn from what this company’s closed calls found', () => {
    const found = { blocked: 12, 'air-leak': 2, 'something-else': 1 };
    const ranking = rankCauses('failed-prime', 'unknown', { from }, found);

    expect(ranking.causes[0]).toMatchObject({ cause: 'blocked', found: 12, calls: 15, guess: 2 });
    expect(ranking.restsOn).toEqual(['closed-calls']);
  });

  it('count nothing that is no count', () => {
    const bad = { blocked: Number.NaN, 'air-leak': -4, 'water-low': 1.5, 'valve-shut': Number.POSITIVE_INFINITY };

    expect(rankCauses('failed-prime', 'unknown', { from }, bad)).toEqual(
      rankCauses('failed-prime', 'unknown', { from }),
    );
    expect(
      rankCauses('failed-prime', 'unknown', { from: Number.NaN, lidOpened: { at: 0, by: 'Ana' } }).restsOn,
    ).toEqual(['starting-guess']);
  });

  it('never lose a cause, never give a percentage, and call at most one likely', () => {
    const signs: fc.Arbitrary<Signs> = fc.dictionary(fc.constantFrom(...SIGNS), fc.boolean());
    fc.assert(
      fc.property(fc.constantFrom(...DETECTORS), signs, fc.nat({ max: 50 }), (detector, seen, count) => {
        const [known] = listFindings(detector);
        const { causes } = rankCauses(
          detector,
          'unknown',
          { from, seen },
          known === undefined ? {} : { [known]: count },
        );
        expect(new Set(causes.map(({ cause }) => cause))).toEqual(new Set(listFindings(detector)));
        expect(causes.map(({ rank }) => rank)).toEqual(causes.map((_, place) => place + 1));
        expect(causes.slice(1).every(({ standing }) => standing !== 'likely')).toBe(true);
        expect(causes.every((cause) => !('weight' in cause))).toBe(true);
      }),
    );
  });

  it('never sink when a sign that speaks for a cause appears', () => {
    const place = (list: readonly string[], cause: string): number => list.indexOf(cause);
    for (const detector of DETECTORS) {
      for (const { cause, signs } of CAUSE_WEIGHTS[detector]) {
        for (const sign of SIGNS) {
          const [present = 1] = signs[sign] ?? [];
          const others = CAUSE_WEIGHTS[detector].map((other) => other.signs[sign]?.[0] ?? 1);
          if (present < Math.max(...others)) continue;
          const [without, withSign] = [
            order(detector, 'unknown', { from }),
            order(detector, 'unknown', { from, seen: { [sign]: true } }),
          ];
          expect(place(withSign, cause)).toBeLessThanOrEqual(place(without, cause));
        }
      }
    }
  });

  it('have starting guesses of ten in all, factors above 0, words, and each cause once', () => {
    for (const detector of DETECTORS) {
      const weights = CAUSE_WEIGHTS[detector];
      expect(
        weights.reduce((sum, { guess }) => sum + guess, 0),
        detector,
      ).toBe(10);
      expect(new Set(listFindings(detector)).size).toBe(weights.length);
      for (const { cause, signs } of weights) {
        expect(CAUSE_WORDS[cause].check.length).toBeGreaterThan(2);
        for (const factors of Object.values(signs)) expect(Math.min(...factors)).toBeGreaterThan(0);
      }
    }
  });

  it('have every cause and sign in use', () => {
    const rules = DETECTORS.flatMap((detector) => CAUSE_WEIGHTS[detector]);

    expect(new Set(rules.map(({ cause }) => cause))).toEqual(new Set(Object.keys(CAUSE_WORDS)));
    expect(new Set(rules.flatMap(({ signs }) => Object.keys(signs)))).toEqual(new Set(SIGNS));
    const sentences = SIGNS.flatMap((sign) => SIGN_WORDS[sign]);
    expect(new Set(sentences).size).toBe(2 * SIGNS.length);
  });
});
