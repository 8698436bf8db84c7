import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { STANDSTILL_RPM } from '#shared/domain/control/speed-tolerance.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';

/** What is known of the flow this instant, with its uncertainty, or why nobody can tell; undefined while it is silent. */
export function flowWords(
  { now, silentSince, wetEndModel }: Pick<PumpDetail, 'now' | 'silentSince' | 'wetEndModel'>,
  format: Format,
): string | undefined {
  if (now === null || silentSince !== null) return undefined;
  const { flow, rpm } = now;
  if (flow === null) return wetEndModel === null ? t('pump.flow.noCurve') : t('pump.flow.cannot');
  if (flow.gpm === 0) return rpm <= STANDSTILL_RPM ? t('pump.flow.standing') : t('pump.flow.unloaded');
  return t('pump.flow', {
    flow: format.quantity(flow.gpm, 'flow'),
    sigma: format.quantity(flow.sigmaGpm, 'flow'),
  });
}
