import { DETECTORS, PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { changeSearch, readOneOf, readText } from '#src/lib/read-search.ts';
import type { AlarmFilter } from './alarm-queries.ts';

export const ALARM_SHOWS = ['open', 'unacknowledged', 'shelved', 'history'] as const;
export const ALARM_SORTS = ['worst', 'newest', 'oldest', 'name'] as const;

const USUAL = { show: 'open', sort: 'worst' };

/** What the alarms page is narrowed to, as its address says; what makes no sense there is left out. */
export function parseAlarmsAddress(search: URLSearchParams): { readonly filter: AlarmFilter } {
  return {
    filter: {
      show: readOneOf(ALARM_SHOWS, search.get('show')),
      priority: readOneOf(PRIORITIES, search.get('priority')),
      detector: readOneOf(DETECTORS, search.get('detector')),
      area: readText(search.get('area'), 60),
      q: readText(search.get('q'), 100),
      sort: readOneOf(ALARM_SORTS, search.get('sort')),
    },
  };
}

export const changeAlarmsAddress = (search: URLSearchParams, change: AlarmFilter): URLSearchParams =>
  changeSearch(search, { ...change }, USUAL);

/** Whether anything but the state narrows the list. */
export const isNarrowed = ({ priority, detector, area, q }: AlarmFilter): boolean =>
  [priority, detector, area, q].some((part) => part !== undefined);
