import { describe, expect, it } from 'vitest';
import { ERROR_CODES } from '#shared/contract/errors.ts';
import { checkSignIn, describeSignInError } from '#src/features/session/sign-in-view.ts';
import { ApiError } from '#src/lib/api/api-error.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { liveLink } from '#src/lib/live/live-link.ts';

describe('signing in', () => {
  it('asks for what is missing before it asks the server', () => {
    expect(Object.keys(checkSignIn('', ''))).toEqual(['email', 'password']);
    expect(checkSignIn('manager@larkmoor.example', 'x')).toEqual({});
    expect(Object.keys(checkSignIn('manager@larkmoor', 'x'))).toEqual(['email']);
  });

  it('never tells which of the two was wrong', () => {
    const words = ['unauthenticated', 'validation'].map((code) =>
      describeSignInError(new ApiError(code as 'validation', '')),
    );
    expect(new Set(words).size).toBe(1);
  });
});

describe('an error in words', () => {
  it('has a title and what to do, whatever the code', () => {
    for (const code of [...ERROR_CODES, 'unreachable', 'unreadable'] as const) {
      const { title, detail } = describeError(new ApiError(code, 'x'));
      expect(title, code).toMatch(/\.$/);
      expect(detail, code).toMatch(/\.$/);
    }
  });

  it('names every field that was refused, and the request', () => {
    const error = new ApiError('validation', 'x', {
      requestId: 'r-7',
      issues: [{ path: 'note', message: 'too long' }],
    });
    expect(describeError(error)).toMatchObject({
      detail: expect.stringContaining('note: too long'),
      requestId: 'r-7',
      retryable: false,
    });
  });

  it('sees a page that is older than the server', () => {
    expect(describeError(new TypeError('Failed to fetch dynamically imported module: /assets/x.js')).title).toBe(
      'Millrace has been updated.',
    );
  });

  it('does not show what a program says to itself', () => {
    expect(describeError(new Error('undefined is not a function')).detail).not.toContain('undefined');
  });
});

it('blames no update for a page that did not come while the server was away', () => {
  const missing = new TypeError('Failed to fetch dynamically imported module: /assets/energy-page.js');
  liveLink.set({ phase: 'broken', heardAt: 0 });
  expect(describeError(missing)).toMatchObject({ title: 'The server cannot be reached.', retryable: true });
  liveLink.set({ phase: 'live', heardAt: 0 });
  expect(describeError(missing).title).toBe('Millrace has been updated.');
  liveLink.set({ phase: 'connecting', heardAt: undefined });
});
