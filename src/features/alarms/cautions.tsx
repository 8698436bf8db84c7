import { CAUTIONS, DISCLAIMER, TASKS, type Task } from '#shared/domain/wording/cautions.data.ts';
import { t } from '#src/lib/messages/page-words.ts';

/** The tasks up to and including one: whoever touches a wire also opens things and looks. */
const tasksUpTo = (task: Task): readonly Task[] => TASKS.slice(0, TASKS.indexOf(task) + 1);

/** What makes each task safe, the alarm's own first; and what Millrace is not. */
export function Cautions({ task }: { readonly task: Task }) {
  return (
    <section aria-label={t('alarm.cautions')} className="flex flex-col gap-2.5">
      {[...tasksUpTo(task)].reverse().map((each) => (
        <details
          key={each}
          className={`bg-sheet ${each === task ? 'border-2 border-ink' : 'border border-rule-strong'}`}
        >
          <summary className="flex min-h-touch items-center justify-center px-4 py-2 text-center text-17 font-semibold">
            {CAUTIONS[each].title}
          </summary>
          <ul className="list-disc border-t border-rule py-3 pr-4 pl-9 text-17">
            {CAUTIONS[each].lines.map((line) => (
              <li key={line} className="py-1">
                {line}
              </li>
            ))}
          </ul>
        </details>
      ))}
      <p className="text-13 text-ink-2">{DISCLAIMER}</p>
    </section>
  );
}
