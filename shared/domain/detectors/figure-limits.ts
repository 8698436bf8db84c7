import { DETECTOR_DEFAULTS, type FoldedDetector } from './detector-defaults.data.ts';

export const FIGURE_UNITS = ['s', 'min', 'h', 'd', '°C', 'rpm', 'share', 'times'] as const;
export type FigureUnit = (typeof FIGURE_UNITS)[number];

/** What a figure of a rule may be set to. */
export type FigureLimits = {
  readonly unit: FigureUnit;
  readonly least: number;
  readonly most: number;
  /** Only whole numbers mean anything. */
  readonly whole: boolean;
};

const LIMITS: readonly (readonly [RegExp, FigureLimits])[] = [
  [/Seconds$/, { unit: 's', least: 0, most: 604_800, whole: true }],
  [/Minutes$/, { unit: 'min', least: 0, most: 10_080, whole: false }],
  [/Hours$/, { unit: 'h', least: 0, most: 720, whole: false }],
  [/^(days|.*Days)$/, { unit: 'd', least: 1, most: 30, whole: true }],
  [/^dueDaysThatMatter$/, { unit: 'd', least: 1, most: 30, whole: true }],
  [/Celsius$/, { unit: '°C', least: 0, most: 60, whole: false }],
  [/Rpm$/, { unit: 'rpm', least: 0, most: 5000, whole: true }],
  // A deadband as wide as its threshold would never let an alarm return.
  [/^deadbandShare$/, { unit: 'share', least: 0, most: 0.9, whole: false }],
  [/Share$/, { unit: 'share', least: 0, most: 3, whole: false }],
  [/Usual$/, { unit: 'times', least: 1, most: 20, whole: false }],
];
const COUNT: FigureLimits = { unit: 'times', least: 1, most: 100, whole: true };

/** Figures that a rule needs above nothing: without them it would speak at every reading. */
const ABOVE_ZERO = /^(offMinutes|shiftMinutes|lateMinutes|offShare|withinSeconds|sagSeconds|meanMinutes)$/;

/**
 * The unit of a figure, which its name ends in, and the values that make sense of it.
 *
 * @example limitsOfFigure('delaySeconds') // { unit: 's', least: 0, most: 604800, whole: true }
 */
export function limitsOfFigure(figure: string): FigureLimits {
  const limits = LIMITS.find(([name]) => name.test(figure))?.[1] ?? COUNT;
  if (!ABOVE_ZERO.test(figure)) return limits;
  return { ...limits, least: limits.unit === 'share' ? 0.01 : 1 };
}

/** The detectors whose rules can be set, in the order of their defaults. */
export const FOLDED_DETECTORS = Object.keys(DETECTOR_DEFAULTS) as readonly FoldedDetector[];

/** The figures of a rule with their defaults. */
export const listFigures = (detector: FoldedDetector): readonly (readonly [string, number])[] =>
  Object.entries(DETECTOR_DEFAULTS[detector]);
