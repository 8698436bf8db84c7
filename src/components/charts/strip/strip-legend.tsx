import type { ReactNode } from 'react';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { t } from '#src/lib/messages/t.ts';
import type { Swatch } from './strip-swatch.ts';
import { SwatchCanvas } from './swatch-canvas.tsx';

const LegendSwatch = ({ swatch }: { readonly swatch: Swatch }) => (
  <SwatchCanvas swatch={swatch} width={30} height={16} />
);

const Entry = ({ mark, children }: { readonly mark: ReactNode; readonly children: ReactNode }) => (
  <li className="flex items-center gap-2">
    {mark}
    {children}
  </li>
);

/** What the textures and pen strokes mean, drawn by the strip's own pen. `inputs` = the most inputs a shown motor has. */
export function StripLegend({ inputs }: { readonly inputs: number }) {
  const numbers = Array.from({ length: Math.max(1, inputs) }, (_, index) => index + 1);
  return (
    <ul aria-label={t('legend.title')} className="flex flex-wrap items-center gap-x-5 gap-y-2 text-13 text-ink-2">
      <Entry mark={<LegendSwatch swatch="wash" />}>{t('legend.program')}</Entry>
      {numbers.map((input) => (
        <Entry key={input} mark={<LegendSwatch swatch={input} />}>
          {t('legend.input', { input })}
        </Entry>
      ))}
      <Entry mark={<LegendSwatch swatch="cross" />}>{t('legend.cross')}</Entry>
      <Entry mark={<LegendSwatch swatch="dots" />}>{t('legend.dots')}</Entry>
      <Entry mark={<LegendSwatch swatch="prime" />}>{t('legend.prime')}</Entry>
      <Entry mark={<LegendSwatch swatch="dashes" />}>{t('legend.freeze')}</Entry>
      <Entry mark={<LegendSwatch swatch="gap" />}>{t('legend.gap')}</Entry>
      <Entry mark={<LegendSwatch swatch="planned" />}>{t('legend.planned')}</Entry>
      <Entry mark={<LegendSwatch swatch="off" />}>{t('legend.off')}</Entry>
      <Entry mark={<PriorityMark kind="urgent" acknowledged decorative />}>{t('legend.urgent')}</Entry>
      <Entry mark={<PriorityMark kind="soon" acknowledged decorative />}>{t('legend.soon')}</Entry>
      <Entry mark={<PriorityMark kind="note" acknowledged decorative />}>{t('legend.note')}</Entry>
      <Entry mark={<PriorityMark kind="silent" acknowledged decorative />}>{t('legend.silent')}</Entry>
      <Entry mark={<PriorityMark kind="urgent" acknowledged={false} decorative />}>{t('legend.block')}</Entry>
    </ul>
  );
}
