import { readOneOf } from '#src/lib/read-search.ts';

/** How many days back the page looks. */
export const HEALTH_RANGES = ['30', '90', '365'] as const;
export type HealthRange = (typeof HEALTH_RANGES)[number];

/** The page's state as its address says it. `who` = a technician; undefined = all alarms, as one desk. */
export type HealthView = { readonly range: HealthRange; readonly who: string | undefined };

export const HEALTH_USUAL = { range: '30' };

export const parseHealthAddress = (search: URLSearchParams): HealthView => ({
  range: readOneOf(HEALTH_RANGES, search.get('range')) ?? '30',
  who: search.get('who') ?? undefined,
});
