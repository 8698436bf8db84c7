import type { Detector } from '#shared/domain/detectors/detector.ts';

/**
 * Since when an alarm says that a pump does not prime, ms; undefined for any other alarm.
 *
 * @example unprimedSince({ detector: 'failed-prime', from: 5 }) // 5
 */
export const unprimedSince = (
  alarm: { readonly detector: Detector; readonly from: number } | null,
): number | undefined => (alarm?.detector === 'failed-prime' ? alarm.from : undefined);
