import { PAD_ENERGY_SORTS, type PadMonthQuery } from '#shared/contract/http/energy-fleet.ts';
import type { ProgramsQuery } from '#shared/contract/http/energy-programs.ts';
import { readOneOf, readText } from '#src/lib/read-search.ts';
import { type MonthText, parseMonth } from './local-month.ts';

export const PROGRAM_SHOWS = ['costly', 'dear-hours', 'all'] as const;
export const PROGRAM_SORTS = ['saved', 'share', 'name'] as const;

/** What the energy page is turned to, as its address says; `month` undefined = the usual one. */
export type EnergyView = {
  readonly month: MonthText | undefined;
  readonly sort: PadMonthQuery['sort'];
  readonly q: string | undefined;
  readonly show: ProgramsQuery['show'];
  readonly order: ProgramsQuery['sort'];
};

/** What need not stand in an address. */
export const ENERGY_USUAL = { sort: 'cost', show: 'costly', order: 'saved', by: 'day' };

export const parseEnergyAddress = (search: URLSearchParams): EnergyView => ({
  month: parseMonth(search.get('month')),
  sort: readOneOf(PAD_ENERGY_SORTS, search.get('sort')) ?? 'cost',
  q: readText(search.get('q'), 100),
  show: readOneOf(PROGRAM_SHOWS, search.get('show')) ?? 'costly',
  order: readOneOf(PROGRAM_SORTS, search.get('order')) ?? 'saved',
});
