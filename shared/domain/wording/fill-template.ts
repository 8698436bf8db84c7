import type { Evidence } from '../detectors/detector.ts';
import { formatDuration } from './format-duration.ts';

const PLACE = /\{(\w+)(?::(\w+))?\}/g;

const formatPlace = (value: number | string, form: string | undefined): string | undefined => {
  if (typeof value === 'string') return value === '' ? undefined : value;
  if (!Number.isFinite(value)) return undefined;
  if (form === 'duration') return formatDuration(value);
  if (form === 'percent') return `${Math.round(value * 100)} %`;
  return new Intl.NumberFormat('en-US', { maximumFractionDigits: Math.abs(value) < 10 ? 1 : 0 }).format(value);
};

/**
 * Fills the `{places}` of a sentence from an alarm's evidence; undefined when one of them has nothing to show.
 * `{name:duration}` takes minutes, `{name:percent}` a share of 1.
 *
 * @example fillTemplate('Load down {drop:percent}', { drop: 0.41 }) // 'Load down 41 %'
 * @example fillTemplate('Did not prime, {tries} tries', {}) // undefined
 */
export function fillTemplate(template: string, evidence: Evidence): string | undefined {
  let complete = true;
  const filled = template.replaceAll(PLACE, (_, name: string, form: string | undefined) => {
    const value = evidence[name];
    const text = typeof value === 'number' || typeof value === 'string' ? formatPlace(value, form) : undefined;
    if (text === undefined) complete = false;
    return text ?? '';
  });
  return complete ? filled : undefined;
}
