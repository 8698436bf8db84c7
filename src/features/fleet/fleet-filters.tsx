import { useSearchParams } from 'react-router-dom';
import { FLEET_FILTERS, FLEET_SORTS } from '#shared/contract/http/pumps.ts';
import { Chip } from '#src/components/ui/chip.tsx';
import { Folded } from '#src/components/ui/folded.tsx';
import { SearchField } from '#src/components/ui/search-field.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { t } from '#src/lib/messages/t.ts';
import { changeFleetAddress, type FleetChange, parseFleetAddress } from './fleet-address.ts';

const NO_AREA = '';

/** Search, filters and order. Each stands in the address. */
export function FleetFilters({ areas }: { readonly areas: readonly string[] }) {
  const [search, setSearch] = useSearchParams();
  const { filter } = parseFleetAddress(search);
  const change = (next: FleetChange, replace = false) =>
    setSearch((current) => changeFleetAddress(current, next), { replace, preventScrollReset: true });
  return (
    <search className="flex w-full sm:w-auto flex-wrap items-center gap-1.5">
      <SearchField value={filter.q ?? ''} onSearch={(q) => change({ q }, true)} />
      <Folded label={t('fleet.filters')} count={[filter.filter, filter.area, filter.sort].filter(Boolean).length}>
        <fieldset className="contents">
          <legend className="sr-only">{t('fleet.filters')}</legend>
          {FLEET_FILTERS.map((name) => (
            <Chip
              key={name}
              on={filter.filter === name}
              onClick={() => change({ filter: filter.filter === name ? undefined : name })}
            >
              {t(`fleet.filter.${name}`)}
            </Chip>
          ))}
        </fieldset>
        {areas.length < 2 ? null : (
          <Select
            quiet
            label={t('fleet.area')}
            value={filter.area ?? NO_AREA}
            onChange={(area) => change({ area })}
            options={[
              { value: NO_AREA, label: t('fleet.area.all') },
              ...areas.map((area) => ({ value: area, label: area })),
            ]}
          />
        )}
        <Select
          quiet
          label={t('fleet.sort')}
          value={filter.sort ?? 'worst'}
          onChange={(sort) => change({ sort })}
          options={FLEET_SORTS.map((sort) => ({ value: sort, label: t(`fleet.sort.${sort}`) }))}
        />
      </Folded>
    </search>
  );
}
