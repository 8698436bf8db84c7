import { describe, expect, it } from 'vitest';
import { DETECTORS } from '#shared/domain/detectors/detector.ts';
import { createConditions } from '#simulator/conditions.ts';
import { FAULTS, getFault } from '#simulator/faults/catalogue.ts';
import { scheduleFault } from '#simulator/schedule-fault.ts';
import { inventPump } from '#simulator/score/invent-pump.ts';
import { createTruthBook } from '#simulator/truth.ts';
import { makePump } from '#tests/support/simulated-pump.ts';

const HOUR = 3_600_000;
const DAY = 24 * HOUR;
/** Two days before the clocks change in most of the United States. */
const BEFORE_CHANGE = Date.UTC(2026, 9, 30, 16);
const SPECS = Array.from({ length: 240 }, (_, index) => inventPump('catalogue', index));

describe('the catalogue', () => {
  it('names each fault once, and detectors that exist', () => {
    expect(new Set(FAULTS.map(({ slug }) => slug)).size).toBe(FAULTS.length);
    for (const { detector, also } of FAULTS) {
      expect(DETECTORS).toContain(detector);
      for (const other of also) expect(DETECTORS).toContain(other);
    }
  });

  it('has a fault for every detector that is not about what was commissioned', () => {
    const known = new Set(FAULTS.map(({ detector }) => detector));

    expect(DETECTORS.filter((detector) => !known.has(detector))).toEqual(['too-little-water', 'costly-program']);
  });

  it('refuses a fault that is not in it', () => {
    expect(() => getFault('gremlins')).toThrow('gremlins');
  });
});

describe.each(FAULTS)('$slug', (fault) => {
  const spec = SPECS.find(
    (candidate) =>
      fault.suits(candidate) && candidate.zoneName !== 'America/Phoenix' && candidate.zoneName.startsWith('America'),
  );

  it('shows on a pump that it suits, for as long as its rule needs, and leaves nothing behind', () => {
    if (spec === undefined) throw new Error(`no invented pump suits ${fault.slug}`);
    const from = BEFORE_CHANGE;
    const hours = (fault.hours[0] * 2 + fault.hours[1]) / 3;
    const truth = createTruthBook();
    const member = makePump({ ...spec, lived: false, stopWeekday: undefined }, from - 2 * DAY, 'catalogue', 20_000);
    scheduleFault(member.pump, fault, from, from + hours * HOUR, truth);
    member.advance(from - 1);
    member.advance(from + hours * HOUR + DAY, () => undefined);

    expect(truth.rows()).toMatchObject([
      { fault: fault.slug, detector: fault.detector, required: true, begunAt: from },
    ]);
    expect(member.pump.conditions).toEqual({ ...createConditions(), spells: member.pump.conditions.spells });
    expect(member.pump.settings).toBe(spec.settings);
    expect(member.pump.firmware).toMatchObject({ stopped: false, keypadRpm: undefined, fault: undefined });
    expect([member.pump.powered, member.pump.linkUp, member.pump.troubles]).toEqual([true, true, 0]);
  });
});
