import { describe, expect, it } from 'vitest';
import { DETECTOR_DEFAULTS } from '#shared/domain/detectors/detector-defaults.data.ts';
import { FOLDED_DETECTORS, listFigures } from '#shared/domain/detectors/figure-limits.ts';
import { formOfFigure, parseFigure, sayFigure, typedFigure } from '#src/features/rules/figure-view.ts';
import { countDifferences, countSet, draftOf, settingsOf } from '#src/features/rules/rule-draft.ts';
import { RULE_NAMES } from '#src/lib/messages/rule-names.data.ts';

describe('a figure on the screen', () => {
  it('is typed in the unit in which people say it', () => {
    expect(sayFigure(1200, formOfFigure('delaySeconds', 1200, 'us'))).toBe('20 min');
    expect(sayFigure(21_600, formOfFigure('urgentAfterSeconds', 21_600, 'us'))).toBe('6 h');
    expect(sayFigure(30, formOfFigure('edgeSeconds', 30, 'us'))).toBe('30 s');
    expect(sayFigure(0.12, formOfFigure('raggedShare', 0.12, 'us'))).toBe('12 %');
    expect(sayFigure(1, formOfFigure('dueDays', 2, 'us'))).toBe('1 day');
  });

  it('is refused where it is no number, too large, or a part of what only comes whole', () => {
    const minutes = formOfFigure('delaySeconds', 1200, 'us');
    expect(parseFigure(' 7,5 ', minutes)).toBe(450);
    for (const wrong of ['', '-1', 'ten', '1e9', '99999999', '0.001'])
      expect(parseFigure(wrong, minutes)).toBeUndefined();
    expect(parseFigure('2.5', formOfFigure('tries', 2, 'us'))).toBeUndefined();
  });

  it('is a temperature in the reader’s own degrees; degrees between two are not shifted', () => {
    const frost = formOfFigure('frostCelsius', 0, 'us');
    expect([sayFigure(0, frost), parseFigure('32', frost), parseFigure('41', frost)]).toEqual(['32 °F', 0, 5]);
    expect(parseFigure('31', frost)).toBeUndefined();
    const margin = formOfFigure('hotMarginCelsius', 5, 'us');
    expect([sayFigure(5, margin), parseFigure('18', margin)]).toEqual(['9 °F', 10]);
    expect(sayFigure(5, formOfFigure('hotMarginCelsius', 5, 'si'))).toBe('5 °C');
    expect(sayFigure(4.4, formOfFigure('unprotectedCelsius', 4.4, 'us'))).toBe('39.9 °F');
  });

  it('comes back as it was stored, for every figure there is', () => {
    for (const system of ['us', 'si'] as const)
      for (const detector of FOLDED_DETECTORS)
        for (const [name, usual] of listFigures(detector)) {
          const form = formOfFigure(name, usual, system);
          expect([detector, name, parseFigure(typedFigure(usual, form), form)]).toEqual([detector, name, usual]);
        }
  });

  it('has words, and so has every rule', () => {
    const known: readonly string[] = Object.keys(RULE_NAMES);
    const wanted = FOLDED_DETECTORS.flatMap((detector) => [
      ...[`rule.${detector}`, `rule.${detector}.says`],
      ...Object.keys(DETECTOR_DEFAULTS[detector]).map((figure) => `figure.${figure}`),
    ]);
    expect(wanted.filter((key) => !known.includes(key))).toEqual([]);
  });
});

describe('rules that are being edited', () => {
  const stored = { stopped: { enabled: false, figures: { delaySeconds: 600 } }, silent: { priority: 'soon' as const } };

  it('are what is stored until something is changed', () => {
    const draft = draftOf(stored, 'us');
    expect(settingsOf(draft, 'us')).toEqual(stored);
    expect([countSet(draft.stopped), countSet(draft.freezing)]).toEqual([2, 0]);
    expect(countDifferences(draft, draftOf(stored, 'us'))).toBe(0);
  });

  it('hold as above where a figure is emptied, and cannot be saved while one is wrong', () => {
    const draft = draftOf(stored, 'us');
    const emptied = { ...draft, stopped: { ...draft.stopped, figures: { delaySeconds: ' ' } } };
    expect(settingsOf(emptied, 'us')).toEqual({ stopped: { enabled: false }, silent: { priority: 'soon' } });
    expect(countDifferences(draft, emptied)).toBe(1);
    const wrong = { ...draft, stopped: { ...draft.stopped, figures: { delaySeconds: 'soon' } } };
    expect(settingsOf(wrong, 'us')).toBeUndefined();
  });
});
