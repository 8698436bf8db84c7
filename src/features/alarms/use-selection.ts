import { useMemo, useState } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';

/** Which alarms of a list are selected; what leaves the list is no longer selected. */
export function useSelection(alarms: readonly Alarm[]) {
  const [ids, setIds] = useState<ReadonlySet<string>>(new Set());
  const selected = useMemo(() => alarms.filter(({ id }) => ids.has(id)), [alarms, ids]);
  return {
    selected,
    isSelected: ({ id }: Alarm) => ids.has(id),
    select: ({ id }: Alarm, on: boolean) =>
      setIds((before) => new Set(on ? [...before, id] : [...before].filter((each) => each !== id))),
    selectAll: (on: boolean) => setIds(new Set(on ? alarms.map(({ id }) => id) : [])),
    clear: () => setIds(new Set()),
  };
}
