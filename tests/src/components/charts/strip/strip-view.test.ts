import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { RunSourceName } from '#shared/contract/http/runs.ts';
import { STRIP_METRICS } from '#src/components/charts/strip/strip-metrics.ts';
import { runAt } from '#src/components/charts/strip/strip-run.ts';
import { createStripScale, instantAt } from '#src/components/charts/strip/strip-scale.ts';
import { hatchAngle, textureOf } from '#src/components/charts/strip/strip-texture.ts';
import { layoutStrip, type StripInput } from '#src/components/charts/strip/strip-view.ts';
import { makeRun } from '#tests/src/support/make-run.ts';

const HOUR = 3_600_000;
const METRICS = STRIP_METRICS.row;
const input = (change: Partial<StripInput> = {}): StripInput => ({
  runs: [],
  planned: [],
  window: { from: 0, until: 24 * HOUR },
  now: 20 * HOUR,
  tone: 'soon',
  topRpm: 3450,
  ...change,
});
const layout = (change: Partial<StripInput>) => layoutStrip(input(change), 960, METRICS);

describe('the texture', () => {
  it('tells who commands, never by hue', () => {
    const textures = Object.fromEntries(
      RunSourceName.options.map((source) => [source, textureOf({ source, closedInputs: 1 })]),
    );
    expect(textures).toEqual({
      off: 'none',
      stop: 'none',
      fault: 'none',
      program: 'wash',
      unknown: 'wash',
      input: 'hatch',
      keypad: 'dots',
      timed: 'dots',
      prime: 'prime',
      freeze: 'dashes',
      'no-data': 'gap',
    });
  });

  it('is crossed where two inputs are closed', () => {
    expect(textureOf({ source: 'input', closedInputs: 0b11 })).toBe('cross');
    expect(textureOf({ source: 'program', closedInputs: 0b11 })).toBe('wash');
  });

  it('gives every input of an eight-input motor its own direction, neighbours leaning opposite ways', () => {
    const angles = [1, 2, 3, 4, 5, 6, 7, 8].map(hatchAngle);
    expect(new Set(angles).size).toBe(8);
    expect(angles.map(Math.sign)).toEqual([1, -1, 1, -1, 1, -1, 1, -1]);
  });
});

describe('a block', () => {
  it('lies where its run lies, as high as its speed', () => {
    const [block] = layout({ runs: [makeRun({ from: 6 * HOUR, to: 12 * HOUR, meanRpm: 3450 })] }).blocks;
    expect(block).toMatchObject({
      x: 240,
      width: 240,
      y: METRICS.top,
      height: METRICS.base - METRICS.top,
      tone: undefined,
    });
  });

  it('is cut at the paper’s edges, and left out when it lies beyond them', () => {
    const { blocks } = layout({
      runs: [
        makeRun({ from: -9 * HOUR, to: -1 }),
        makeRun({ from: -HOUR, to: HOUR }),
        makeRun({ from: 25 * HOUR, to: 26 * HOUR }),
      ],
    });
    expect(blocks.map(({ x, width }) => [x, width])).toEqual([[0, 40]]);
  });

  it('reaches now while it is open, and not further', () => {
    const [block] = layout({ runs: [makeRun({ from: 18 * HOUR, to: null })] }).blocks;
    expect((block?.x ?? 0) + (block?.width ?? 0)).toBe(800);
  });

  it('is never so narrow that a short prime disappears', () => {
    const [block] = layout({ runs: [makeRun({ source: 'prime', from: 0, to: 60_000 })] }).blocks;
    expect(block?.width).toBeGreaterThanOrEqual(1.5);
  });

  it('takes the alarm’s colour and a dashed expected speed where it is off', () => {
    const off = makeRun({ flags: ['off-expected'], expectedRpm: 2850, to: HOUR });
    expect(layout({ runs: [off], tone: 'urgent' }).blocks[0]).toMatchObject({
      tone: 'urgent',
      expectedY: expect.any(Number),
    });
    expect(layout({ runs: [makeRun({ flags: ['unprimed'], to: HOUR })] }).blocks[0]).toMatchObject({
      tone: 'soon',
      expectedY: undefined,
    });
  });

  it('takes the alarm’s colour where the alarm says that it does not prime', () => {
    const prime = (from: number) => makeRun({ source: 'prime', from, to: from + HOUR });
    const { blocks } = layout({ runs: [prime(0), prime(6 * HOUR)], tone: 'urgent', unprimedSince: 5 * HOUR });
    expect(blocks.map(({ tone }) => tone)).toEqual([undefined, 'urgent']);
  });

  it('stays on the paper whatever the readings say', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -48, max: 48 }),
        fc.option(fc.integer({ min: 0, max: 48 }), { nil: null }),
        fc.integer({ min: 0, max: 4000 }),
        (from, length, rpm) => {
          const to = length === null ? null : (from + length) * HOUR;
          for (const block of layout({ runs: [makeRun({ from: from * HOUR, to, meanRpm: rpm })] }).blocks) {
            expect(block.x).toBeGreaterThanOrEqual(0);
            expect(block.x + block.width).toBeLessThanOrEqual(961.5);
            expect(block.y).toBeGreaterThanOrEqual(METRICS.top - 4);
            expect(block.height).toBeGreaterThanOrEqual(0);
          }
        },
      ),
    );
  });
});

describe('time that no run covers', () => {
  const run = (from: number, to: number | null) => makeRun({ from: from * HOUR, to: to === null ? null : to * HOUR });
  const unheard = (change: Partial<StripInput>) => layout(change).unheard.map(({ x, width }) => [x, width]);

  it('is drawn as no data up to now, not as standing still', () => {
    expect(unheard({ runs: [run(6, 12), run(15, null)] })).toEqual([
      [0, 240],
      [480, 120],
    ]);
    expect(unheard({ runs: [] })).toEqual([[0, 800]]);
    expect(unheard({ runs: [run(0, 6)], now: 30 * HOUR })).toEqual([[240, 720]]);
    expect(unheard({ runs: [run(0, null)] })).toEqual([]);
  });

  it('is not drawn before the runs have come: a strip on its way has no ink at all', () => {
    expect(layout({ runs: undefined })).toEqual({
      known: false,
      blocks: [],
      unheard: [],
      planned: [],
      nowX: undefined,
    });
  });
});

describe('what is planned', () => {
  const plan = (from: number, to: number, rpm = 1400) => ({
    from: from * HOUR,
    to: to * HOUR,
    source: 'program' as const,
    closedInputs: 0,
    activeInput: 0,
    rpm,
  });

  it('is outlined ahead of now only', () => {
    const { planned, nowX } = layout({ planned: [plan(10, 12), plan(18, 22), plan(22, 23, 0)] });
    expect(nowX).toBe(800);
    expect(planned.map(({ x, width }) => [x, width])).toEqual([[800, 80]]);
  });

  it('has no now line on a paper of the past', () => {
    expect(layout({ now: 30 * HOUR }).nowX).toBeUndefined();
  });
});

describe('the run at an instant', () => {
  const runs = [makeRun({ from: 0, to: 10 }), makeRun({ from: 10, to: null })];

  it('is half-open, and open to now', () => {
    expect(runAt(runs, 9, 100)?.from).toBe(0);
    expect(runAt(runs, 10, 100)?.from).toBe(10);
    expect(runAt(runs, 99, 100)?.from).toBe(10);
    expect(runAt(runs, 100, 100)).toBeUndefined();
  });
});

it('finds the instant under a pointer, kept inside the paper', () => {
  const window = { from: 1000, until: 2000 };
  expect([
    instantAt(window, 100, -5),
    instantAt(window, 100, 50),
    instantAt(window, 100, 500),
    instantAt(window, 0, 5),
  ]).toEqual([1000, 1500, 2000, 1000]);
});

it('goes from time to x and back again', () => {
  fc.assert(
    fc.property(fc.integer({ min: 0, max: 86_400_000 }), (at) => {
      const window = { from: 0, until: 86_400_000 };
      const scale = createStripScale(window, 690, METRICS, 3450);
      expect(Math.abs(instantAt(window, 690, scale.x(at)) - at)).toBeLessThanOrEqual(1);
    }),
  );
});
