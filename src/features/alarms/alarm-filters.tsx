import { useSearchParams } from 'react-router-dom';
import { PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { Chip } from '#src/components/ui/chip.tsx';
import { Folded } from '#src/components/ui/folded.tsx';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { SearchField } from '#src/components/ui/search-field.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import type { AlarmFilter } from './alarm-queries.ts';
import { ALARM_SHOWS, ALARM_SORTS, changeAlarmsAddress, parseAlarmsAddress } from './alarms-address.ts';

/** Search, state, priority and order. Each stands in the address. */
export function AlarmFilters() {
  const [search, setSearch] = useSearchParams();
  const { filter } = parseAlarmsAddress(search);
  const change = (next: AlarmFilter, replace = false) =>
    setSearch((current) => changeAlarmsAddress(current, next), { replace, preventScrollReset: true });
  return (
    <search data-print="never" className="flex flex-wrap items-center gap-2">
      <SearchField value={filter.q ?? ''} onSearch={(q) => change({ q }, true)} />
      <Folded label={t('fleet.filters')} count={[filter.show, filter.priority, filter.sort].filter(Boolean).length}>
        <fieldset className="contents">
          <legend className="sr-only">{t('alarms.show')}</legend>
          {ALARM_SHOWS.map((show) => (
            <Chip key={show} on={(filter.show ?? 'open') === show} onClick={() => change({ show })}>
              {t(`alarms.show.${show}`)}
            </Chip>
          ))}
        </fieldset>
        <fieldset className="contents">
          <legend className="sr-only">{t('alarms.priority')}</legend>
          {PRIORITIES.map((priority) => (
            <Chip
              key={priority}
              on={filter.priority === priority}
              onClick={() => change({ priority: filter.priority === priority ? undefined : priority })}
            >
              <PriorityMark kind={priority} acknowledged decorative />
              {t(`alarms.priority.${priority}`)}
            </Chip>
          ))}
        </fieldset>
        <Select
          quiet
          label={t('alarms.sort')}
          value={filter.sort ?? 'worst'}
          onChange={(sort) => change({ sort })}
          options={ALARM_SORTS.map((sort) => ({ value: sort, label: t(`alarms.sort.${sort}`) }))}
        />
      </Folded>
    </search>
  );
}
