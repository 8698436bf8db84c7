import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import { createDetectorBank } from '#shared/domain/detectors/detector-bank.ts';
import { isDetectorFailure } from '#shared/domain/detectors/detector-failure.ts';
import { resolveParameters } from '#shared/domain/detectors/detector-parameters.ts';
import { createPumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { CONTEXT, createPlayer, goodDay, HOUR, MINUTE, MONDAY } from '../detectors/pump-player.ts';

/** What a player is given, as events. */
function record(play: (player: ReturnType<typeof createPlayer>) => void): PumpEvent[] {
  const events: PumpEvent[] = [];
  const player = createPlayer();
  const { push } = player.fold;
  player.fold.push = (event) => {
    events.push(event);
    push(event);
  };
  play(player);
  return events;
}

/** A pump that is switched on at six in the morning, runs so long with that load and is switched off. */
const startOf = (lasts: number, load: number): PumpEvent[] =>
  record((player) => {
    player.playUntil(0, 360, {});
    player.play(lasts, { load });
    player.play(5 * MINUTE, { rpm: 0, reportedSource: 'off' });
  });

/** A day and a half with a failed prime, a silence and a visit in it. */
const recordedEvents = (): PumpEvent[] =>
  record((player) => {
    player.playUntil(0, 360, {});
    player.play(20 * MINUTE, { load: 0.35 });
    player.playUntil(0, 620, goodDay());
    player.play(10 * MINUTE, { closedInputs: 1, activeInput: 0, rpm: 1700, reportedSource: 'program' });
    player.silence(2 * HOUR);
    player.push({ kind: 'on-site', receivedAt: player.at, on: true });
    player.play(30 * MINUTE, { rpm: 0, reportedSource: 'stop' });
    player.push({ kind: 'on-site', receivedAt: player.at, on: false });
    player.playUntil(1, 700, goodDay());
  });

function foldAll(events: readonly PumpEvent[], restartAfter: ReadonlySet<number>) {
  const signals: AlarmSignal[] = [];
  const runs = new Map<number, Run>();
  let fold = createPumpFold(CONTEXT);
  const take = (): void => {
    const output = fold.take();
    signals.push(...output.signals);
    for (const run of output.runs) runs.set(run.from, run);
  };
  events.forEach((event, index) => {
    fold.push(event);
    if (!restartAfter.has(index)) return;
    take();
    fold = createPumpFold(CONTEXT, JSON.parse(JSON.stringify(fold.save())) as { hot: unknown; learnt: unknown });
  });
  take();
  return { signals, runs: [...runs.values()], now: fold.now(), highWater: fold.highWater(), saved: fold.save() };
}

describe('the fold of a pump', () => {
  const events = recordedEvents();
  const whole = foldAll(events, new Set());

  it('says the same however often it is stored and read back', () => {
    fc.assert(
      fc.property(fc.uniqueArray(fc.nat(events.length - 1), { maxLength: 12 }), (restarts) => {
        const split = foldAll(events, new Set(restarts));
        expect(split.signals).toEqual(whole.signals);
        expect(split.runs).toEqual(whole.runs);
        expect(split.now).toEqual(whole.now);
        expect(split.saved).toEqual(whole.saved);
      }),
      { numRuns: 12 },
    );
  });

  it.each([0, events.length - 1])('shows the same pump once it is read back after event %i', (last) => {
    const before = events.slice(0, last + 1);
    const { now } = foldAll(before, new Set([last]));
    expect(now).toEqual(foldAll(before, new Set()).now);
    expect(now?.flow?.gpm).toBeGreaterThanOrEqual(0);
  });

  it.each([
    ['a try that was given up when its prime time was over', 3 * MINUTE, 0.35, ['prime unprimed']],
    ['a prime that came', 3 * MINUTE, 1, ['prime']],
    ['a try that was cut short', MINUTE, 0.35, ['prime']],
    ['a pump that runs on without load', 6 * MINUTE, 0.35, ['prime unprimed', 'program unprimed']],
  ])('marks %s as what it is', (_, lasts, load, marks) => {
    const { runs } = foldAll(startOf(lasts, load), new Set());
    const turning = runs.filter(({ source }) => source === 'prime' || source === 'program');
    expect(turning.map(({ source, flags }) => [source, ...flags].join(' '))).toEqual(marks);
  });

  it('tells what it was made to tell', () => {
    expect(whole.signals.filter(({ type }) => type === 'raised').map(({ detector }) => detector)).toEqual([
      'failed-prime',
      'wrong-speed',
      'silent',
    ]);
  });

  it.each([
    ['no number', { rpm: Number.NaN }, 'rpm not-finite'],
    ['negative watts', { watts: -3 }, 'watts too-small'],
    ['an input beyond the model’s', { closedInputs: 8 }, 'closedInputs input-beyond-model'],
    ['a winner beyond the model’s', { activeInput: 4 }, 'activeInput input-beyond-model'],
  ])('refuses %s by name, and goes on as if it had not come', (_, bad, fault) => {
    const fold = createPumpFold(CONTEXT);
    const reading = { at: MONDAY, rpm: 1700, watts: 400, closedInputs: 0, activeInput: 0 };
    const push = (at: number, more: object = {}) =>
      fold.push({ kind: 'reading', reading: { ...reading, at, ...more }, receivedAt: at, single: true });
    push(MONDAY);
    push(MONDAY + 10_000, bad);
    expect(fold.highWater()).toBe(MONDAY);
    push(MONDAY + 20_000);
    const { runs, unfolded } = fold.take();
    expect(unfolded.map(({ at, faults }) => [at, ...faults.map(({ field, reason }) => `${field} ${reason}`)])).toEqual([
      [MONDAY + 10_000, fault],
    ]);
    expect(runs.map(({ meanRpm, closedInputs }) => [meanRpm, closedInputs])).toEqual([[1700, 0]]);
  });

  it('keeps hot state under 4 kB and learnt state apart', () => {
    expect(JSON.stringify(whole.saved.hot).length).toBeLessThan(4096);
    expect(JSON.stringify(whole.saved.learnt).length).toBeLessThan(16_384);
  });

  it('lets learntVersion grow only when learnt state changes', () => {
    const player = createPlayer();
    let version = -1;
    let learnt = '';
    let grown = 0;
    for (let minute = 0; minute < 1440; minute += 5) {
      player.play(5 * MINUTE, goodDay());
      const saved = player.fold.save();
      const now = JSON.stringify(saved.learnt);
      if (saved.learntVersion === version) expect(now).toBe(learnt);
      else grown += 1;
      expect(saved.learntVersion).toBeGreaterThanOrEqual(version);
      version = saved.learntVersion;
      learnt = now;
    }
    expect(grown).toBeGreaterThan(2);
    expect(grown).toBeLessThan(80);
  });

  it('shows the pump as it is this instant', () => {
    const player = createPlayer();
    expect(player.fold.now()).toBeUndefined();
    expect(player.fold.highWater()).toBeUndefined();
    player.playUntil(0, 630, goodDay());

    expect(player.fold.now()).toMatchObject({
      source: 'input',
      expectedSource: 'input',
      expectedRpm: 2850,
      activeInput: 1,
      closedInputs: 1,
      lockedBy: 1,
      primed: true,
      because: { kind: 'input', input: 1 },
    });
    expect(player.fold.highWater()).toBe(player.at - 10_000);
  });

  it('refuses a reading at or below its high-water mark', () => {
    const player = createPlayer();
    player.playUntil(0, 400, goodDay());
    const before = player.fold.now();
    player.push({
      kind: 'reading',
      reading: { at: player.at - HOUR, rpm: 0, closedInputs: 0, activeInput: 0, watts: 3 },
      receivedAt: player.at,
      single: true,
    });

    expect(player.fold.now()).toEqual(before);
    expect(player.fold.take().runs).toEqual([]);
  });

  it('goes on with the same state under new commissioned data', () => {
    const player = createPlayer();
    player.playUntil(0, 700, goodDay());
    const faster = { ...CONTEXT, settings: { ...CONTEXT.settings, inputs: [3000, 2400, null] } };
    const fold = player.fold.withContext(faster);

    expect(fold.highWater()).toBe(player.fold.highWater());
    expect(fold.now()?.expectedRpm).toBe(3000);
  });

  it('carries signals not yet taken over to the new context', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    for (let minute = 0; minute < 30; minute += 1) {
      const at = player.at + minute * MINUTE;
      const reading = { at, rpm: 0, closedInputs: 0, activeInput: 0, watts: 3 };
      player.fold.push({ kind: 'reading', reading, receivedAt: at, single: true });
    }
    expect(
      player.fold
        .withContext(CONTEXT)
        .take()
        .signals.map(({ type }) => type),
    ).toEqual(['raised']);
  });

  it('takes damaged state for none, and begins afresh', () => {
    const fold = createPumpFold(CONTEXT, {
      hot: { control: 7, detectors: { stopped: { standing: 'x' } } },
      learnt: 'y',
    });
    expect(fold.now()).toBeUndefined();
    const reading = { at: MONDAY, rpm: 0, closedInputs: 0, activeInput: 0, watts: 3 };
    fold.push({ kind: 'reading', reading, receivedAt: MONDAY, single: true });
    expect(fold.highWater()).toBe(MONDAY);
  });

  it('names the rule that fails', () => {
    const failing = () => ({
      detector: 'stopped' as const,
      hears: ['reading' as const],
      byArrival: false,
      looksAgainOnReturn: false,
      judge: () => {
        throw new RangeError('no such thing');
      },
      delayMs: () => 0,
      offDelayMs: () => 0,
      describe: () => ({ cause: '', evidence: {} }),
      learntVersion: () => undefined,
      save: () => undefined,
    });
    const bank = createDetectorBank([failing], resolveParameters(), undefined, undefined);
    const facts = { kind: 'reading' } as Parameters<typeof bank.judge>[0];
    try {
      bank.judge(facts, []);
      expect.unreachable();
    } catch (error) {
      expect(isDetectorFailure(error)).toBe(true);
      expect(error).toMatchObject({ detector: 'stopped', cause: expect.any(RangeError) });
    }
  });
});
