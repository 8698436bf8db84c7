import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compareCursors } from '#src/lib/live/compare-cursors.ts';
import { judgeSilence } from '#src/lib/live/link-state.ts';
import { reconnectDelay } from '#src/lib/live/reconnect-delay.ts';
import { createWatchRegistry } from '#src/lib/live/watch-registry.ts';

describe('the wait before another try', () => {
  it('never lies outside half a second and fifteen, and never shrinks with the tries', () => {
    fc.assert(
      fc.property(fc.nat(100), fc.double({ min: 0, max: 1, noNaN: true }), (attempt, chance) => {
        const wait = reconnectDelay(attempt, chance);
        expect(wait).toBeGreaterThanOrEqual(250);
        expect(wait).toBeLessThanOrEqual(15_000);
        expect(reconnectDelay(attempt + 1, chance)).toBeGreaterThanOrEqual(wait);
      }),
    );
  });
});

it('calls one missed heartbeat stale and two dead', () => {
  expect([9_000, 14_999, 15_000, 24_999, 25_000].map(judgeSilence)).toEqual(['live', 'live', 'stale', 'stale', 'dead']);
});

it('orders cursors as numbers however long they are', () => {
  expect(compareCursors('99', '100')).toBeLessThan(0);
  expect(compareCursors('18446744073709551615', '18446744073709551614')).toBeGreaterThan(0);
  expect(compareCursors('007', '7')).toBe(0);
});

describe('what is watched', () => {
  it('is what all of the page’s watchers ask for, once each, and ends with them', () => {
    const registry = createWatchRegistry();
    const wall = Symbol('wall');
    const page = Symbol('page');
    registry.watch(wall, ['b', 'a']);
    registry.watch(page, ['a', 'c']);
    expect(registry.watched.get()).toEqual(['a', 'b', 'c']);
    registry.release(wall);
    expect(registry.watched.get()).toEqual(['a', 'c']);
  });

  it('is never more than the contract takes', () => {
    const registry = createWatchRegistry();
    registry.watch(
      Symbol('wall'),
      Array.from({ length: 700 }, (_, index) => `p${index}`),
    );
    expect(registry.watched.get()).toHaveLength(500);
  });
});
