import { DETECTORS, PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { changeSearch, readOneOf, readText } from '#src/lib/read-search.ts';
import type { AlarmFilter } from './alarm-queries.ts';

export const ALARM_TABS = ['open', 'unacknowledged', 'shelved', 'suppressed', 'out-of-service', 'history'] as const;
export const ALARM_VIEWS = ['rows', 'table'] as const;
export type AlarmView = (typeof ALARM_VIEWS)[number];
export const ALARM_SORTS = ['worst', 'newest', 'oldest', 'name'] as const;

const USUAL = { show: 'open', sort: 'worst', view: 'rows' };

/** What the alarms page is narrowed to, as its address says; what makes no sense there is left out. */
export function parseAlarmsAddress(search: URLSearchParams): {
  readonly filter: AlarmFilter;
  readonly view: AlarmView;
} {
  return {
    view: readOneOf(ALARM_VIEWS, search.get('view')) ?? 'rows',
    filter: {
      show: readOneOf(ALARM_TABS, search.get('show')),
      priority: readOneOf(PRIORITIES, search.get('priority')),
      detector: readOneOf(DETECTORS, search.get('detector')),
      area: readText(search.get('area'), 60),
      whose: readOneOf(['mine'], search.get('whose')),
      q: readText(search.get('q'), 100),
      sort: readOneOf(ALARM_SORTS, search.get('sort')),
    },
  };
}

export const changeAlarmsAddress = (
  search: URLSearchParams,
  change: AlarmFilter & { readonly view?: AlarmView },
): URLSearchParams => changeSearch(search, { ...change }, USUAL);

/** Whether anything but the state narrows the list. */
export const isNarrowed = ({ priority, detector, area, whose, q }: AlarmFilter): boolean =>
  [priority, detector, area, whose, q].some((part) => part !== undefined);

/** The alarms of a list. */
export const alarmListFilter = (filter: AlarmFilter): AlarmFilter => ({ ...filter, alarmClass: 'alarm' });

/** The notes beside it: always by pad, and all of them where only what waits is wanted, since a note waits for nobody. */
export const workListFilter = ({ priority: _, ...filter }: AlarmFilter): AlarmFilter => ({
  ...filter,
  show: filter.show === 'unacknowledged' ? 'open' : filter.show,
  sort: 'name',
  alarmClass: 'note',
});
