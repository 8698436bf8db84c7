import { type ReactNode, useEffect, useRef } from 'react';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useStore } from '#src/hooks/use-store.ts';
import { t } from '#src/lib/messages/t.ts';
import { themeStore } from '#src/lib/theme.ts';
import { readStripColours } from './strip-colours.ts';
import { paintSwatch, type Swatch } from './strip-swatch.ts';

const WIDTH = 30;
const HEIGHT = 16;

function SwatchCanvas({ swatch }: { readonly swatch: Swatch }) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const theme = useStore(themeStore);
  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (element === null || context === null || context === undefined) return;
    const density = devicePixelRatio;
    element.width = WIDTH * density;
    element.height = HEIGHT * density;
    context.setTransform(density, 0, 0, density, 0, 0);
    paintSwatch(context, readStripColours(theme), density, swatch, WIDTH, HEIGHT);
  }, [swatch, theme]);
  return <canvas ref={canvas} className="shrink-0" style={{ width: WIDTH, height: HEIGHT }} />;
}

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
      <Entry mark={<SwatchCanvas swatch="wash" />}>{t('legend.program')}</Entry>
      {numbers.map((input) => (
        <Entry key={input} mark={<SwatchCanvas swatch={input} />}>
          {t('legend.input', { input })}
        </Entry>
      ))}
      <Entry mark={<SwatchCanvas swatch="cross" />}>{t('legend.cross')}</Entry>
      <Entry mark={<SwatchCanvas swatch="dots" />}>{t('legend.dots')}</Entry>
      <Entry mark={<SwatchCanvas swatch="prime" />}>{t('legend.prime')}</Entry>
      <Entry mark={<SwatchCanvas swatch="dashes" />}>{t('legend.freeze')}</Entry>
      <Entry mark={<SwatchCanvas swatch="gap" />}>{t('legend.gap')}</Entry>
      <Entry mark={<SwatchCanvas swatch="planned" />}>{t('legend.planned')}</Entry>
      <Entry mark={<SwatchCanvas swatch="off" />}>{t('legend.off')}</Entry>
      <Entry mark={<PriorityMark kind="urgent" acknowledged decorative />}>{t('legend.urgent')}</Entry>
      <Entry mark={<PriorityMark kind="soon" acknowledged decorative />}>{t('legend.soon')}</Entry>
      <Entry mark={<PriorityMark kind="note" acknowledged decorative />}>{t('legend.note')}</Entry>
      <Entry mark={<PriorityMark kind="silent" acknowledged decorative />}>{t('legend.silent')}</Entry>
      <Entry mark={<PriorityMark kind="urgent" acknowledged={false} decorative />}>{t('legend.block')}</Entry>
    </ul>
  );
}
