import { describe, expect, it } from 'vitest';
import { listEvidence } from '#src/features/alarms/evidence-view.ts';
import { createFormat } from '#src/lib/format/create-format.ts';

const format = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });

describe('the figures of a costly program', () => {
  it('are written with their currency and units', () => {
    const evidence = {
      saving: 0.46,
      daysJudged: 14,
      currency: 'USD',
      costPerYearBefore: '1651.88',
      costPerYearAfter: '354.32',
      kwhPerYearBefore: 2606,
      gallonsPerWeekBefore: 364_843,
    };
    expect(listEvidence(evidence, format)).toEqual([
      ['Could cost less by', '46 %'],
      ['Days judged', '14'],
      ['Cost a year, as it is', '$1,651.88'],
      ['Cost a year, proposed', '$354.32'],
      ['Energy a year, as it is', '2,606 kWh'],
      ['Water a week, as it is', expect.stringMatching(/^364,843.gal$/)],
    ]);
  });
});
