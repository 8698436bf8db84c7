import { FLEET_FILTERS, FLEET_SORTS } from '#shared/contract/http/pumps.ts';
import { PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { formatDayParam, parseDayParam } from '#src/lib/day-param.ts';
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

const oneOf = <Value extends string>(values: readonly Value[], text: string | null): Value | undefined =>
  values.find((value) => value === text);

const textOf = (text: string | null, longest: number): string | undefined => {
  const trimmed = text?.trim().slice(0, longest);
  return trimmed === undefined || trimmed === '' ? undefined : trimmed;
};

/** Reads the wall's state from an address; what makes no sense there is left out. */
export function parseFleetAddress(search: URLSearchParams): FleetView {
  return {
    filter: {
      q: textOf(search.get('q'), 100),
      area: textOf(search.get('area'), 60),
      filter: oneOf(FLEET_FILTERS, search.get('filter')),
      priority: oneOf(PRIORITIES, search.get('priority')),
      sort: oneOf(FLEET_SORTS, search.get('sort')),
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

/** The address after a change. What stands for the usual is left out, so that links stay short. */
export function changeFleetAddress(search: URLSearchParams, change: FleetChange): URLSearchParams {
  const next = new URLSearchParams(search);
  for (const [name, value] of Object.entries(change)) {
    const text = name === 'day' && typeof value === 'number' ? formatDayParam(value) : value;
    if (text === undefined || text === '' || text === '24h' || (name === 'sort' && text === 'worst')) next.delete(name);
    else next.set(name, String(text));
  }
  return next;
}

export const isNarrowed = ({ filter }: FleetView): boolean =>
  [filter.q, filter.area, filter.filter, filter.priority].some((part) => part !== undefined);
