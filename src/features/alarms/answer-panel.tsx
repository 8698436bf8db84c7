import type { Alarm } from '#shared/contract/http/alarms.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { AcknowledgePanel } from './acknowledge-panel.tsx';
import { ActButtons } from './act-buttons.tsx';
import { listOffered } from './offered-acts.ts';

/** Everything one may do about an alarm on its page, as large as a gloved hand needs. */
export function AnswerPanel({ alarm }: { readonly alarm: Alarm }) {
  const { user } = useSession();
  const [first, ...rest] = listOffered(alarm, user.role);
  const isNote = alarm.alarmClass === 'note';
  return (
    <section aria-label={t('alarm.actions')} data-print="never" className="flex flex-col gap-2">
      {isNote ? null : <AcknowledgePanel alarm={alarm} />}
      {first === undefined ? null : (
        <div className="grid grid-cols-2 gap-2 max-sm:*:px-2">
          <ActButtons alarms={[alarm]} kinds={[first]} look={isNote ? 'main' : 'plain'} touch />
          <ActButtons alarms={[alarm]} kinds={rest} touch />
        </div>
      )}
    </section>
  );
}
