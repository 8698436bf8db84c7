import { FLEET_FILTERS, FLEET_SORTS } from '#shared/contract/http/pumps.ts';
import { PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { formatDayParam, parseDayParam } from '#src/lib/day-param.ts';
import { changeSearch, readOneOf, readText } from '#src/lib/read-search.ts';
import type { FleetFilter } from './fleet-queries.ts';

/** How long the strips are. */
export type FleetRange = '24h' | '7d';

/** The whole state of the wall, as it stands in the page's address: a link to it shows the same to a colleague. */
export type FleetView = {
  readonly filter: FleetFilter;
  readonly range: FleetRange;
  /** The last calendar day shown, in the company's zone; undefined = live. */
  readonly day: number | undefined;
};

/** Reads the wall's state from an address; what makes no sense there is left out. */
export function parseFleetAddress(search: URLSearchParams): FleetView {
  return {
    filter: {
      q: readText(search.get('q'), 100),
      area: readText(search.get('area'), 60),
      filter: readOneOf(FLEET_FILTERS, search.get('filter')),
      priority: readOneOf(PRIORITIES, search.get('priority')),
      sort: readOneOf(FLEET_SORTS, search.get('sort')),
    },
    range: search.get('range') === '7d' ? '7d' : '24h',
    day: parseDayParam(search.get('day')),
  };
}

/** A change to the wall's state; `undefined` takes a part away. */
export type FleetChange = FleetFilter & {
  readonly range?: FleetRange | undefined;
  readonly day?: number | undefined;
};

const USUAL = { sort: 'worst', range: '24h' };

/** The address after a change. */
export function changeFleetAddress(search: URLSearchParams, change: FleetChange): URLSearchParams {
  const { day, ...rest } = change;
  const days = 'day' in change ? { day: day === undefined ? undefined : formatDayParam(day) } : {};
  return changeSearch(search, { ...rest, ...days }, USUAL);
}

export const isNarrowed = ({ filter }: FleetView): boolean =>
  [filter.q, filter.area, filter.filter, filter.priority].some((part) => part !== undefined);
