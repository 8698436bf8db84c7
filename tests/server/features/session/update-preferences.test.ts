import { beforeAll, describe, expect, it } from 'vitest';
import { openSignInDesk, type SignInDesk } from '#tests/support/sign-in-desk.ts';

let desk: SignInDesk;
beforeAll(async () => {
  desk = await openSignInDesk();
});

describe('preferences', () => {
  const change = (body: unknown) =>
    desk.server.ask('PATCH', '/api/session/preferences', { as: desk.company.homeowner, body });

  it('are changed one by one, for oneself', async () => {
    expect((await change({ units: 'si' })).body.preferences).toEqual({ units: 'si', theme: 'system', clock: 'locale' });
    expect((await change({ theme: 'dark' })).body.preferences).toEqual({ units: 'si', theme: 'dark', clock: 'locale' });
    const { body } = await desk.server.ask('GET', '/api/session', { as: desk.company.manager });
    expect(body.preferences.units).toBe('us');
  });

  it('are refused where they are none, every one of them named', async () => {
    const { status, body } = await change({ units: 'cubits', theme: 'pink' });
    expect(status).toBe(400);
    expect(body.issues.map(({ path }: { path: string }) => path)).toEqual(['units', 'theme']);
  });
});
