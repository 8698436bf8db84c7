import { describe, expect, it } from 'vitest';
import { defineDetector } from '#shared/domain/detectors/define-detector.ts';
import type { AlarmSignal, Priority } from '#shared/domain/detectors/detector.ts';
import { createDetectorBank } from '#shared/domain/detectors/detector-bank.ts';
import { DETECTOR_DEFAULTS } from '#shared/domain/detectors/detector-defaults.data.ts';
import type { Facts } from '#shared/domain/detectors/facts.ts';
import { FOLDED_DETECTORS, limitsOfFigure, listFigures } from '#shared/domain/detectors/figure-limits.ts';
import { ABNORMAL } from '#shared/domain/detectors/judgement.ts';
import { mergeSettings, type RuleSettings, resolveRules } from '#shared/domain/detectors/rule-settings.ts';

/** What a rule says that finds something wrong at once, under these settings. */
function signalsUnder(settings: RuleSettings, found?: Priority, hot?: unknown): AlarmSignal[] {
  const rule = defineDetector({
    detector: 'settings-changed',
    hears: ['time'],
    initial: () => ({}),
    judge: () => ABNORMAL,
    describe: () => ({ cause: 'unknown', evidence: {}, ...(found === undefined ? {} : { priority: found }) }),
  });
  const bank = createDetectorBank([rule], resolveRules(settings), hot, undefined);
  const signals: AlarmSignal[] = [];
  bank.judge(
    { kind: 'time', now: 1000, receivedAt: 1000, padState: 'open', onSite: false, gap: false } as Facts,
    signals,
  );
  return signals;
}

describe('rules that somebody set', () => {
  it('are the defaults where nobody did', () => {
    expect(resolveRules()).toEqual(DETECTOR_DEFAULTS);
  });

  it('hold figure by figure, the most specific last', () => {
    const rules = resolveRules(
      { stopped: { figures: { delaySeconds: 60, frostCelsius: 1 }, enabled: false } },
      { stopped: { figures: { delaySeconds: 90 }, priority: 'urgent' } },
    );
    expect(rules.stopped).toEqual({ ...DETECTOR_DEFAULTS.stopped, delaySeconds: 90, frostCelsius: 1 });
    expect(rules.choices).toEqual({ stopped: { enabled: false, priority: 'urgent' } });
    expect(mergeSettings({ stopped: { enabled: false } }, { stopped: { figures: { delaySeconds: 9 } } })).toEqual({
      stopped: { enabled: false, figures: { delaySeconds: 9 } },
    });
  });

  it('say nothing where they are off, and end what stood', () => {
    expect(signalsUnder({})).toMatchObject([{ type: 'raised', priority: 'note' }]);
    expect(signalsUnder({ 'settings-changed': { enabled: false } })).toEqual([]);
    const standing = { 'settings-changed': { standing: { onset: 500, raisedAt: 600, from: 500 } } };
    expect(signalsUnder({ 'settings-changed': { enabled: false } }, undefined, standing)).toMatchObject([
      { type: 'cleared', evidence: { ruleOff: true } },
    ]);
  });

  it('speak with the priority that was chosen, but a worse one that they find stays', () => {
    const priorityOf = (chosen: Priority, found?: Priority) => {
      const [signal] = signalsUnder({ 'settings-changed': { priority: chosen } }, found);
      return signal?.type === 'raised' ? signal.priority : undefined;
    };
    expect([priorityOf('soon'), priorityOf('urgent')]).toEqual(['soon', 'urgent']);
    expect(priorityOf('soon', 'urgent')).toBe('urgent');
    expect(priorityOf('urgent', 'soon')).toBe('urgent');
  });
});

describe('the limits of every figure', () => {
  it('let its default through', () => {
    for (const detector of FOLDED_DETECTORS)
      for (const [name, usual] of listFigures(detector)) {
        const { least, most, whole } = limitsOfFigure(name);
        const fits = usual >= least && usual <= most && (!whole || Number.isInteger(usual));
        expect([detector, name, fits]).toEqual([detector, name, true]);
      }
  });
});
