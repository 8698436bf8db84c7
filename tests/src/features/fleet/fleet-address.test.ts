import { describe, expect, it } from 'vitest';
import { changeFleetAddress, isNarrowed, parseFleetAddress } from '#src/features/fleet/fleet-address.ts';

const parse = (query: string) => parseFleetAddress(new URLSearchParams(query));

describe('the wall’s address', () => {
  it('holds the whole state of the wall', () => {
    expect(parse('q=weir&area=North&filter=silent&priority=urgent&sort=name&range=7d&day=2026-12-01')).toEqual({
      filter: { q: 'weir', area: 'North', filter: 'silent', priority: 'urgent', sort: 'name' },
      range: '7d',
      day: 20_788,
    });
  });

  it('leaves out what makes no sense', () => {
    const view = parse('filter=everything&priority=9&sort=upwards&range=90d&day=tomorrow&q=%20');
    expect(view).toMatchObject({ range: '24h', day: undefined });
    expect(isNarrowed(view)).toBe(false);
  });

  it('says nothing of what is usual', () => {
    const search = new URLSearchParams('sort=name&range=7d&day=2026-12-01&q=weir');
    expect(changeFleetAddress(search, { sort: 'worst', range: '24h', day: undefined }).toString()).toBe('q=weir');
  });

  it('keeps the day when something else changes', () => {
    const search = new URLSearchParams('day=2026-12-01');
    expect(changeFleetAddress(search, { filter: 'running' }).toString()).toBe('day=2026-12-01&filter=running');
    expect(changeFleetAddress(search, { day: 20_787 }).toString()).toBe('day=2026-11-30');
  });
});
