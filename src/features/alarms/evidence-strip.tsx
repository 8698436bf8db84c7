import { type ComponentType, type ReactNode, useMemo } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { StripAxis } from '#src/components/charts/strip/strip-axis.tsx';
import { StripCanvas } from '#src/components/charts/strip/strip-canvas.tsx';
import { USUAL_TOP_RPM } from '#src/components/charts/strip/strip-metrics.ts';
import type { StripState, StripWindow } from '#src/components/charts/strip/strip-run.ts';
import { withSilence } from '#src/components/charts/strip/with-silence.ts';
import { useElementWidth } from '#src/hooks/use-element-width.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { unprimedSince } from '#src/lib/unprimed-since.ts';
import { whereOf } from './alarm-names.ts';
import { ALARM_TONE } from './alarm-tone.ts';
import { evidenceWindow } from './alarm-view.ts';

/** Brings the runs of one pump; given by the page, since runs belong to another feature. */
export type StripSource = ComponentType<{
  readonly pumpId: string;
  readonly window: StripWindow;
  readonly children: (strip: StripState) => ReactNode;
}>;

export type EvidenceStripProps = {
  readonly pumpId: string;
  readonly alarm: Alarm;
  readonly now: number;
  readonly StripSource: StripSource;
};

/** A day of the pump around the alarm, its beginning marked. */
export function EvidenceStrip({ pumpId, alarm, now, StripSource }: EvidenceStripProps) {
  const format = useFormat();
  const [track, width] = useElementWidth<HTMLDivElement>();
  const { from, until } = evidenceWindow(alarm, now);
  const window = useMemo(() => ({ from, until }), [from, until]);
  const share = (alarm.from - from) / (until - from);
  return (
    <div ref={track} role="img" aria-label={t('alarm.strip', { where: whereOf(alarm) })} className="relative">
      <StripSource pumpId={pumpId} window={window}>
        {(strip) => (
          <StripCanvas
            size="row"
            width={width}
            runs={withSilence(strip.runs, alarm.detector === 'silent' && alarm.returnedAt === null ? alarm.from : null)}
            planned={strip.planned}
            window={window}
            now={now}
            tone={alarm.priority}
            unprimedSince={unprimedSince(alarm)}
            topRpm={USUAL_TOP_RPM}
            zone={alarm.zone}
          />
        )}
      </StripSource>
      {share < 0 || share > 1 ? null : (
        <div
          className={`absolute top-0 h-16 border-l-2 border-dotted ${ALARM_TONE[alarm.priority].border}`}
          style={{ left: `${share * 100}%` }}
        />
      )}
      <div className="h-6">
        <StripAxis window={window} zone={alarm.zone} width={width} />
      </div>
      {now < until ? null : (
        <p className="text-13 text-ink-2">
          {t('alarm.stripDays', { from: format.day(from, alarm.zone), to: format.day(until - 1, alarm.zone) })}
        </p>
      )}
    </div>
  );
}
