import type { ReactNode } from 'react';
import type { AlarmDetail } from '#shared/contract/http/alarms.ts';
import type { AlarmWords } from '#shared/domain/wording/alarm-words.ts';
import { FactList } from '#src/components/ui/fact-list.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { ALARM_TONE } from './alarm-tone.ts';
import { describeSpan, describeState, isWaiting } from './alarm-view.ts';
import { EvidenceStrip, type StripSource } from './evidence-strip.tsx';
import { listEvidence, listLikelyCauses } from './evidence-view.ts';

export type EvidenceSheetProps = {
  readonly alarm: AlarmDetail;
  readonly words: AlarmWords;
  readonly now: number;
  readonly StripSource: StripSource;
  /** A chart of the readings, given by the page. */
  readonly chart: ReactNode;
};

/** What is wrong and how one knows: title, the day around it, what it means, the numbers. */
export function EvidenceSheet({ alarm, words, now, StripSource, chart }: EvidenceSheetProps) {
  const format = useFormat();
  const tone = ALARM_TONE[alarm.priority];
  const causes = listLikelyCauses(alarm.evidence);
  return (
    <section aria-labelledby="what" className={`border bg-sheet ${tone.border}`}>
      <h2
        id="what"
        className={`flex items-center gap-3 border-b border-rule px-4 py-3 text-17 font-semibold ${tone.text}`}
      >
        <PriorityMark kind={alarm.priority} acknowledged={!isWaiting(alarm)} />
        {words.title}
      </h2>
      <div className="flex flex-col gap-3 px-4 py-3">
        <EvidenceStrip alarm={alarm} now={now} StripSource={StripSource} />
        {chart}
        <p className="text-17">
          <Figures text={words.meaning} />
        </p>
        {causes.length === 0 ? null : (
          <div>
            <h3 className="text-ink-2">{t('alarm.likely')}</h3>
            <ol className="list-decimal pl-6 marker:font-figures">
              {causes.map(({ cause, reason }) => (
                <li key={cause}>
                  <span className="font-medium">{cause}</span>
                  <span className="text-ink-2">: {reason}</span>
                </li>
              ))}
            </ol>
          </div>
        )}
        <p className="text-ink-2">
          {describeSpan(alarm, format, now)} · {describeState(alarm, format, now)}
        </p>
        {alarm.acknowledgementNote === null ? null : (
          <blockquote className="border-l-2 border-ink pl-3">{alarm.acknowledgementNote}</blockquote>
        )}
        <details>
          <summary className="inline-flex min-h-6 items-center text-ink-2 underline underline-offset-2">
            {t('alarm.evidence')}
          </summary>
          <div className="figures pt-2 text-13">
            <FactList facts={listEvidence(alarm.evidence, format)} />
          </div>
        </details>
      </div>
    </section>
  );
}
