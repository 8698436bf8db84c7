import { describe, expect, it } from 'vitest';
import { createRandom, hashText } from '#simulator/random.ts';

const take = (count: number, next: () => number) => Array.from({ length: count }, next);

describe('createRandom', () => {
  it('gives the same numbers for the same seed and others for another', () => {
    expect(take(5, createRandom('a').next)).toEqual(take(5, createRandom('a').next));
    expect(take(5, createRandom('a').next)).not.toEqual(take(5, createRandom('b').next));
  });

  it('is uniform enough in [0, 1)', () => {
    const numbers = take(20_000, createRandom('uniform').next);

    expect(Math.min(...numbers)).toBeGreaterThanOrEqual(0);
    expect(Math.max(...numbers)).toBeLessThan(1);
    expect(numbers.reduce((sum, value) => sum + value, 0) / numbers.length).toBeCloseTo(0.5, 1);
  });

  it('has a normal stream of mean 0 and deviation 1', () => {
    const numbers = take(20_000, createRandom('normal').normal);
    const mean = numbers.reduce((sum, value) => sum + value, 0) / numbers.length;
    const variance = numbers.reduce((sum, value) => sum + (value - mean) ** 2, 0) / numbers.length;

    expect(mean).toBeCloseTo(0, 1);
    expect(variance).toBeCloseTo(1, 1);
  });

  it('does not move when a fork is used', () => {
    const plain = createRandom('a');
    const forked = createRandom('a');
    take(10, forked.fork('b').next);

    expect(forked.next()).toBe(plain.next());
  });

  it('picks whole numbers with both ends', () => {
    const random = createRandom('integers');
    const numbers = new Set(take(200, () => random.integer(1, 3)));

    expect([...numbers].sort()).toEqual([1, 2, 3]);
  });
});

describe('hashText', () => {
  // Published test vectors of 32-bit FNV-1a.
  it.each([
    ['', 0x811c9dc5],
    ['a', 0xe40c292c],
    ['foobar', 0xbf9cf968],
  ])('hashes %j as published', (text, hash) => {
    expect(hashText(text)).toBe(hash);
  });
});
