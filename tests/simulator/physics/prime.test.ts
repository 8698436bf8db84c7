import { describe, expect, it } from 'vitest';
import {
  aimWater,
  createSuctionTrouble,
  loadShare,
  type Suction,
  type Water,
  waterFill,
} from '#simulator/physics/prime.ts';

const SUCTION: Suction = { primeSeconds: 40, restFill: 0.33, drainHours: 6 };
const HOUR = 3_600_000;
const rested = (): Water => ({ fill: 0.33, since: 0, target: 0.33, tauMs: 1 });

function fillAfter(
  seconds: number,
  change: Partial<ReturnType<typeof createSuctionTrouble>> = {},
  rpm = 3450,
  primeSeconds = 40,
): number {
  const water = rested();
  aimWater(water, { ...SUCTION, primeSeconds }, { ...createSuctionTrouble(), ...change }, rpm, 0, 1);
  return waterFill(water, seconds * 1000);
}

describe('a pump that primes', () => {
  it('fills from a third in its prime time, and is then full', () => {
    expect(fillAfter(20)).toBeLessThan(0.9);
    expect(fillAfter(40)).toBeCloseTo(0.98, 2);
    expect(fillAfter(60)).toBe(1);
  });

  it('carries little load for a while and then catches', () => {
    expect(loadShare(fillAfter(4))).toBeLessThan(0.15);
    expect(loadShare(fillAfter(40))).toBeGreaterThan(0.9);
  });

  it('takes longer with a higher lift, and longer at a lower speed', () => {
    expect(fillAfter(30, {}, 3450, 80)).toBeLessThan(fillAfter(30));
    expect(fillAfter(30, {}, 2400)).toBeLessThan(fillAfter(30));
  });

  it.each([
    ['a lid that leaks', { airLeak: 0.9 }],
    ['a pool below the skimmer', { waterLow: true }],
    ['a plugged line', { blocked: true }],
    ['a skimmer that swallows air', { gulps: 'sudden' }],
  ] as const)('never primes with %s', (_, trouble) => {
    expect(loadShare(fillAfter(3600, trouble))).toBeLessThan(0.5);
  });

  it('primes at last when the line has drained back, long after its usual time', () => {
    expect(fillAfter(120, { drainsBack: true })).toBeLessThan(0.7);
    expect(fillAfter(1800, { drainsBack: true })).toBe(1);
  });

  it('drains slowly while it stands, and fast where the check valve does not hold', () => {
    const full = (): Water => ({ fill: 1, since: 0, target: 1, tauMs: 1 });
    const healthy = full();
    const leaking = full();
    aimWater(healthy, SUCTION, createSuctionTrouble(), 0, 0, 1);
    aimWater(leaking, SUCTION, { ...createSuctionTrouble(), drainsBack: true }, 0, 0, 1);

    expect(waterFill(healthy, HOUR)).toBeGreaterThan(0.85);
    expect(waterFill(healthy, 100 * HOUR)).toBeCloseTo(0.33, 2);
    expect(waterFill(leaking, HOUR)).toBeCloseTo(0, 2);
  });

  it('does not depend on how often somebody looks', () => {
    const seldom = rested();
    const often = rested();
    aimWater(seldom, SUCTION, createSuctionTrouble(), 3450, 0, 1);
    for (let at = 0; at < 30_000; at += 1000) aimWater(often, SUCTION, createSuctionTrouble(), 3450, at, 1);

    expect(waterFill(often, 30_000)).toBeCloseTo(waterFill(seldom, 30_000), 9);
  });
});
