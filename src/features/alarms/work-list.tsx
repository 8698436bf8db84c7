import type { Alarm } from '#shared/contract/http/alarms.ts';
import { PRIORITIES, type Priority } from '#shared/domain/detectors/detector.ts';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { AlarmList } from './alarm-list.tsx';
import type { AlarmFilter } from './alarm-queries.ts';
import { describeNextStop } from './alarm-view.ts';
import { workListFilter } from './alarms-address.ts';
import { groupByPad } from './group-by-pad.ts';
import { NoteRow } from './note-row.tsx';

const worstOf = (notes: readonly Alarm[]): Priority =>
  PRIORITIES.find((priority) => notes.some((note) => note.priority === priority)) ?? 'note';

/** Things worth doing at the next stop, by pad. */
export function WorkList({ filter, now }: { readonly filter: AlarmFilter; readonly now: number }) {
  const format = useFormat();
  return (
    <AlarmList
      filter={workListFilter(filter)}
      empty={{ title: t('alarms.emptyNotes'), detail: t('alarms.emptyNotes.detail') }}
    >
      {(notes) =>
        groupByPad(notes).map(({ pad, notes: ofPad }) => (
          <section
            key={pad.id}
            aria-label={pad.padName}
            className="grid grid-cols-[26px_minmax(0,1fr)] gap-x-3 border-t border-rule px-4 py-3 first:border-0 sm:px-5"
          >
            <PriorityMark kind={worstOf(ofPad)} acknowledged decorative />
            <div className="min-w-0">
              <h3 className="text-17 font-semibold">{pad.padName}</h3>
              <p className="text-13 text-ink-2">
                {[describeNextStop(pad, format), pad.technicianName].filter((part) => part !== null).join(' · ')}
              </p>
              {ofPad.map((note) => (
                <NoteRow key={note.id} alarm={note} now={now} />
              ))}
            </div>
          </section>
        ))
      }
    </AlarmList>
  );
}
