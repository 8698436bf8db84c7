import { useSearchParams } from 'react-router-dom';
import type { AlarmPage } from '#shared/contract/http/alarms.ts';
import { PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { Chip } from '#src/components/ui/chip.tsx';
import { Folded } from '#src/components/ui/folded.tsx';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { SearchField } from '#src/components/ui/search-field.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import { ALARM_SORTS, ALARM_TABS, changeAlarmsAddress, parseAlarmsAddress } from './alarms-address.ts';

export type AlarmFiltersProps = { readonly totals: AlarmPage['totals'] | undefined };

/** How many each state holds, where that asks for a look: what was set aside must not be forgotten. */
const countOf = (totals: AlarmPage['totals'] | undefined, show: (typeof ALARM_TABS)[number]): number =>
  ({
    open: 0,
    history: 0,
    unacknowledged: totals?.unacknowledged ?? 0,
    shelved: totals?.shelved ?? 0,
    suppressed: totals?.suppressed ?? 0,
    'out-of-service': totals?.outOfService ?? 0,
  })[show];

/** Search, state, priority and order. Each stands in the address. */
export function AlarmFilters({ totals }: AlarmFiltersProps) {
  const [search, setSearch] = useSearchParams();
  const { filter } = parseAlarmsAddress(search);
  const wordsOf = (show: (typeof ALARM_TABS)[number]) => {
    const [what, count] = [t(`alarms.show.${show}`), countOf(totals, show)];
    return count === 0 ? what : t('alarms.show.counted', { what, count });
  };
  const change = (next: Parameters<typeof changeAlarmsAddress>[1], replace = false) =>
    setSearch((current) => changeAlarmsAddress(current, next), { replace, preventScrollReset: true });
  return (
    <search data-print="never" className="flex flex-wrap items-center gap-2">
      <SearchField value={filter.q ?? ''} onSearch={(q) => change({ q }, true)} />
      <Folded
        label={t('fleet.filters')}
        count={[filter.show, filter.priority, filter.whose, filter.sort].filter(Boolean).length}
      >
        <fieldset className="contents">
          <legend className="sr-only">{t('alarms.show')}</legend>
          {ALARM_TABS.map((show) => (
            <Chip key={show} on={(filter.show ?? 'open') === show} onClick={() => change({ show })}>
              {wordsOf(show)}
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
        <Chip
          on={filter.whose === 'mine'}
          onClick={() => change({ whose: filter.whose === 'mine' ? undefined : 'mine' })}
        >
          {t('alarms.mine')}
        </Chip>
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
