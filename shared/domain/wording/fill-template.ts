import type { Evidence } from '../detectors/detector.ts';
import { bothDegrees } from './both-degrees.ts';
import { formatDuration } from './format-duration.ts';

const PLACE = /\{(\w+)(?::(\w+)|#([^{}|]*)\|([^{}|]*))?\}/g;

const formatNumber = (value: number) =>
  new Intl.NumberFormat('en-US', { maximumFractionDigits: Math.abs(value) < 10 ? 1 : 0 }).format(value);

const formatPlace = (value: number | string, form: string | undefined): string | undefined => {
  if (typeof value === 'string') return value === '' ? undefined : value;
  if (!Number.isFinite(value)) return undefined;
  if (form === 'duration') return formatDuration(value);
  if (form === 'temperature') return bothDegrees(value);
  if (form === 'percent') return `${Math.round(value * 100)} %`;
  return formatNumber(value);
};

/**
 * Fills the `{places}` of a sentence from an alarm's evidence; undefined when one of them has nothing to show.
 * `{name:duration}` takes minutes, `{name:temperature}` degrees Celsius, `{name:percent}` a share of 1, `{name#pad has|pads have}` a count with what goes with
 * one and with many.
 *
 * @example fillTemplate('Load down {drop:percent}', { drop: 0.41 }) // 'Load down 41 %'
 * @example fillTemplate('Did not prime, {tries#try|tries}', { tries: 1 }) // 'Did not prime, 1 try'
 * @example fillTemplate('Did not prime, {tries#try|tries}', {}) // undefined
 */
export function fillTemplate(template: string, evidence: Evidence): string | undefined {
  let complete = true;
  const filled = template.replaceAll(PLACE, (_, name: string, form?: string, one?: string, many?: string) => {
    const value = evidence[name];
    const text = typeof value === 'number' || typeof value === 'string' ? formatPlace(value, form) : undefined;
    if (text === undefined) complete = false;
    const counted = text === '1' ? one : many;
    return counted === undefined ? (text ?? '') : `${text} ${counted}`;
  });
  return complete ? filled : undefined;
}
