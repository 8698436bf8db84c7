import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import { decodeReadings } from '#shared/contract/mqtt/readings.ts';
import { type Reading, SOURCES } from '#shared/domain/readings/reading.ts';

const T = 1_760_000_000_000;

function wire(fields: Record<string, unknown> = {}): Record<string, unknown> {
  return { t: T, rpm: 1700, in: 1, act: 1, w: 312.5, ...fields };
}

function decode(value: unknown) {
  const decoded = decodeReadings(JSON.stringify(value));
  if (decoded.kind === 'refused') throw new Error(decoded.reason);
  return decoded;
}

describe('decodeReadings', () => {
  it('reads one reading with every field', () => {
    const fields = { src: 'input', v: 231.4, td: 52, ta: -3.5, mc: 630, flt: 'E-07' };

    expect(decode(wire(fields))).toEqual({
      kind: 'readings',
      single: true,
      readings: [
        {
          at: T,
          rpm: 1700,
          closedInputs: 1,
          activeInput: 1,
          watts: 312.5,
          reportedSource: 'input',
          volts: 231.4,
          driveCelsius: 52,
          ambientCelsius: -3.5,
          motorClockMinute: 630,
          fault: 'E-07',
        },
      ],
      refused: [],
      dropped: [],
    });
  });

  it('reads an array and says that it was one', () => {
    const decoded = decode([wire(), wire({ t: T + 1 })]);

    expect(decoded.single).toBe(false);
    expect(decoded.readings.map((reading) => reading.at)).toEqual([T, T + 1]);
  });

  it.each([
    ['t', undefined, 't-missing'],
    ['t', T + 0.5, 't-not-an-integer'],
    ['t', `${T}`, 't-not-an-integer'],
    ['t', -1, 't-out-of-range'],
    ['t', 8e12, 't-out-of-range'],
    ['rpm', undefined, 'rpm-missing'],
    ['rpm', 'fast', 'rpm-not-a-number'],
    ['rpm', null, 'rpm-not-a-number'],
    ['rpm', -1, 'rpm-negative'],
    ['rpm', 4000.1, 'rpm-out-of-range'],
    ['in', undefined, 'in-missing'],
    ['in', 1.5, 'in-not-an-integer'],
    ['in', -1, 'in-out-of-range'],
    ['in', 256, 'in-out-of-range'],
    ['act', undefined, 'act-missing'],
    ['act', true, 'act-not-an-integer'],
    ['act', 9, 'act-out-of-range'],
    ['w', undefined, 'w-missing'],
    ['w', [], 'w-not-a-number'],
    ['w', -0.1, 'w-negative'],
    ['w', 6001, 'w-out-of-range'],
  ])('refuses %s = %j as %s', (field, value, reason) => {
    const decoded = decode(wire({ [field]: value }));

    expect(decoded.readings).toEqual([]);
    expect(decoded.refused).toEqual([{ index: 0, reason }]);
  });

  it('refuses a bad element alone', () => {
    const decoded = decode([wire(), 17, wire({ t: T + 1, w: -5 }), wire({ t: T + 2 })]);

    expect(decoded.readings.map((reading) => reading.at)).toEqual([T, T + 2]);
    expect(decoded.refused).toEqual([
      { index: 1, reason: 'reading-not-an-object' },
      { index: 2, reason: 'w-negative' },
    ]);
  });

  it('refuses a number a sensor could not give by name, and keeps the readings beside it', () => {
    const text = JSON.stringify([wire({ flt: 'nan "x' }), wire({ t: T + 1, w: 'X' }), wire({ t: T + 2, rpm: 'Y' })]);
    const decoded = decodeReadings(text.replace('"X"', 'NaN').replace('"Y"', '-inf'));

    expect(decoded).toMatchObject({
      readings: [{ at: T, fault: 'nan "x' }],
      refused: [
        { index: 1, reason: 'w-not-a-number' },
        { index: 2, reason: 'rpm-not-a-number' },
      ],
    });
  });

  it('refuses an infinite number written as a large one', () => {
    const decoded = decodeReadings(JSON.stringify(wire({ w: 'X' })).replace('"X"', '1e999'));

    expect(decoded).toMatchObject({ readings: [], refused: [{ index: 0, reason: 'w-not-a-number' }] });
  });

  it.each([
    ['src', 'solar'],
    ['src', 'constructor'],
    ['v', -1],
    ['td', 'hot'],
    ['ta', null],
    ['mc', 1440],
    ['mc', 10.5],
    ['flt', ''],
    ['flt', 'seventeen letters'],
    ['flt', 'E\u0000'],
  ])('drops the optional field %s = %j alone and names it', (field, value) => {
    const decoded = decode(wire({ [field]: value }));

    expect(decoded.readings).toEqual(decode(wire()).readings);
    expect(decoded.dropped).toEqual([{ index: 0, field }]);
  });

  it('ignores a field it does not know', () => {
    expect(decode(wire({ hum: 40 }))).toEqual(decode(wire()));
  });

  it('refuses an element whose time does not increase, measured against the last one it took', () => {
    const decoded = decode([wire(), wire(), wire({ t: T - 1 }), wire({ t: T + 9, w: -1 }), wire({ t: T + 5 })]);

    expect(decoded.readings.map((reading) => reading.at)).toEqual([T, T + 5]);
    expect(decoded.refused.map((refusal) => refusal.reason)).toEqual([
      't-not-increasing',
      't-not-increasing',
      'w-negative',
    ]);
  });

  it('refuses what is ahead or too old, and a reading ahead does not hide those behind it', () => {
    const list = [wire({ t: T - 10 }), wire(), wire({ t: T + 10 }), wire({ t: T + 1 })];
    const decoded = decodeReadings(JSON.stringify(list), { notBefore: T - 5, notAfter: T + 5 });

    expect(decoded).toMatchObject({
      readings: [{ at: T }, { at: T + 1 }],
      refused: [
        { index: 0, reason: 'too-old' },
        { index: 2, reason: 'ahead' },
      ],
    });
  });

  it('refuses inputs beyond those of the motor model', () => {
    const limits = { inputCount: 3 };

    expect(decodeReadings(JSON.stringify(wire({ in: 8 })), limits)).toMatchObject({
      refused: [{ reason: 'in-beyond-model' }],
    });
    expect(decodeReadings(JSON.stringify(wire({ act: 4 })), limits)).toMatchObject({
      refused: [{ reason: 'act-beyond-model' }],
    });
    expect(decodeReadings(JSON.stringify(wire({ in: 7, act: 3 })), limits)).toMatchObject({ refused: [] });
  });

  it.each([
    ['{"t":', 'not-json'],
    ['', 'not-json'],
    ['17', 'not-an-object'],
    ['null', 'not-an-object'],
    ['[]', 'empty'],
    [JSON.stringify(Array.from({ length: 501 }, (_, index) => wire({ t: T + index }))), 'too-many'],
  ])('refuses a whole message %.20s as %s', (text, reason) => {
    expect(decodeReadings(text)).toEqual({ kind: 'refused', reason });
  });

  it('reads back every reading it wrote', () => {
    const optional = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined });
    const fields = fc.record({
      rpm: fc.double({ min: 0, max: 4000, noNaN: true }),
      closedInputs: fc.integer({ min: 0, max: 255 }),
      activeInput: fc.integer({ min: 0, max: 8 }),
      watts: fc.double({ min: 0, max: 6000, noNaN: true }),
      reportedSource: optional(fc.constantFrom(...SOURCES)),
      volts: optional(fc.double({ min: 0, max: 1000, noNaN: true })),
      driveCelsius: optional(fc.integer({ min: -60, max: 250 })),
      ambientCelsius: optional(fc.integer({ min: -60, max: 250 })),
      motorClockMinute: optional(fc.integer({ min: 0, max: 1439 })),
      fault: optional(fc.stringMatching(/^[ -~]{1,16}$/)),
    });
    fc.assert(
      fc.property(fc.array(fields, { minLength: 1, maxLength: 20 }), (list) => {
        const readings: Reading[] = list.map((reading, index) => ({ at: T + index, ...reading }));

        const decoded = decodeReadings(encodeReadings(readings));

        expect(decoded).toMatchObject({ kind: 'readings', single: list.length === 1, refused: [], dropped: [] });
        // Negative zero is written as 0.
        if (decoded.kind === 'readings') expect(JSON.stringify(decoded.readings)).toBe(JSON.stringify(readings));
      }),
    );
  });

  it('never throws and never lets a bad value through, whatever JSON comes', () => {
    fc.assert(
      fc.property(
        fc.json(),
        fc.dictionary(fc.constantFrom('t', 'rpm', 'in', 'act', 'w', 'src'), fc.jsonValue()),
        (text, fields) => {
          for (const input of [text, JSON.stringify(fields), JSON.stringify([wire(fields)])]) {
            const decoded = decodeReadings(input);
            if (decoded.kind === 'refused') continue;
            for (const reading of decoded.readings) {
              expect(reading.watts >= 0 && reading.watts <= 6000).toBe(true);
              expect(reading.rpm >= 0 && reading.rpm <= 4000).toBe(true);
              expect(Number.isInteger(reading.at)).toBe(true);
            }
          }
        },
      ),
    );
  });
});
