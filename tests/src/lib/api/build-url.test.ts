import { expect, it } from 'vitest';
import { buildUrl } from '#src/lib/api/build-url.ts';

it('fills an endpoint’s path, escaping what does not belong in one', () => {
  expect(buildUrl('/api/pumps/:pumpId/runs', { pumpId: 'a/b c' }, {})).toBe('/api/pumps/a%2Fb%20c/runs');
});

it('joins lists by commas and leaves out what is undefined or empty', () => {
  expect(buildUrl('/api/strips', {}, { pumps: ['a', 'b'], from: 0, q: '', area: undefined })).toBe(
    '/api/strips?pumps=a%2Cb&from=0',
  );
});
