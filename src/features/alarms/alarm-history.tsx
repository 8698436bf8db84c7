import type { AlarmDetail } from '#shared/contract/http/alarms.ts';
import { alarmTitle } from '#shared/domain/wording/alarm-title.ts';
import { FactList } from '#src/components/ui/fact-list.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { isPlainKey, t } from '#src/lib/messages/page-words.ts';
import { listEvidence } from './evidence-view.ts';

const wordOf = (kind: string): string => {
  const key = `transition.${kind}`;
  return isPlainKey(key) ? t(key) : kind;
};

/** How the alarm's figures stood at a step, for whoever wants to check it. */
function FiguresThen({ evidence }: { readonly evidence: AlarmDetail['evidence'] }) {
  const facts = listEvidence(evidence, useFormat());
  if (facts.length === 0) return null;
  return (
    <details>
      <summary className="inline-flex min-h-6 items-center text-13 text-ink-2 underline underline-offset-2">
        {t('transition.figures')}
      </summary>
      <div className="figures pt-1 text-13">
        <FactList facts={facts} />
      </div>
    </details>
  );
}

/** Every step of the alarm with who and when, and what became of its mails. */
export function AlarmHistory({ alarm, now }: { readonly alarm: AlarmDetail; readonly now: number }) {
  const format = useFormat();
  const moment = (at: number) => format.moment(at, alarm.zone, now);
  const item = 'grid grid-cols-[minmax(7.5rem,auto)_minmax(0,1fr)] gap-x-4 border-t border-rule py-2 first:border-0';
  return (
    <>
      <Sheet id="history" title={t('alarm.history')}>
        <ol className="px-4 sm:px-5">
          {[...alarm.transitions].reverse().map(({ at, kind, by, note, cause, evidence }) => (
            <li key={`${at} ${kind}`} className={item}>
              <span className="figures">{moment(at)}</span>
              <div>
                <p>{by === null ? wordOf(kind) : t('transition.by', { what: wordOf(kind), name: by })}</p>
                {kind === 'raised' || kind === 'changed' ? (
                  <p className="text-13 text-ink-2">{alarmTitle(alarm.detector, cause, {})}</p>
                ) : null}
                {note === null || kind === 'suppressed' ? null : <p className="text-ink-2">{note}</p>}
                <FiguresThen evidence={evidence} />
              </div>
            </li>
          ))}
        </ol>
      </Sheet>
      <Sheet id="mails" title={t('alarm.mails')}>
        <ul className="px-4 sm:px-5">
          {alarm.mails.length === 0 ? <li className="py-2 text-ink-2">{t('alarm.mails.none')}</li> : null}
          {alarm.mails.map(({ to, subject, queuedAt, sentAt, attempts }) => (
            <li key={`${queuedAt} ${to}`} className={item}>
              <span className="figures">{moment(sentAt ?? queuedAt)}</span>
              <div>
                <p>{subject}</p>
                <p className="text-13 text-ink-2">
                  {sentAt === null
                    ? t('alarm.mail.waiting', { to, attempts })
                    : t('alarm.mail.sent', { to, time: moment(sentAt) })}
                </p>
              </div>
            </li>
          ))}
        </ul>
      </Sheet>
    </>
  );
}
