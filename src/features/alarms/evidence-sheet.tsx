import type { ReactNode } from 'react';
import type { AlarmDetail } from '#shared/contract/http/alarms.ts';
import type { AlarmWords } from '#shared/domain/wording/alarm-words.ts';
import { FactList } from '#src/components/ui/fact-list.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { ALARM_TONE } from './alarm-tone.ts';
import { describeGroup, describeSpan, describeState, isWaiting } from './alarm-view.ts';
import { EvidenceStrip, type StripSource } from './evidence-strip.tsx';
import { listEvidence } from './evidence-view.ts';

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
        {alarm.pumpId === null ? null : (
          <EvidenceStrip pumpId={alarm.pumpId} alarm={alarm} now={now} StripSource={StripSource} />
        )}
        {chart}
        <p className="text-17">
          <Figures text={words.meaning} />
        </p>
        <p className="text-ink-2">
          {[describeSpan(alarm, format, now), describeGroup(alarm), describeState(alarm, format, now)]
            .filter((part) => part !== '')
            .join(' · ')}
        </p>
        {alarm.acknowledgementNote === null ? null : (
          <blockquote className="border-l-2 border-ink pl-3">{alarm.acknowledgementNote}</blockquote>
        )}
        {alarm.done?.found == null ? null : (
          <blockquote className="border-l-2 border-ink pl-3">
            {t('alarm.found', { found: alarm.done.found })}
          </blockquote>
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
