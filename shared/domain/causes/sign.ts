/**
 * What can be known about an alarm besides its readings, and what its readings show. Each is true, false, or not known;
 * what is not known counts neither for nor against a cause.
 */
export const SIGNS = [
  'lid-opened',
  'our-visit',
  'filter-cleaned',
  'power-cut',
  'clocks-shifted',
  'neighbours-too',
  'wind',
  'heavy-rain',
  'frost',
  'heat',
  'water-low-reported',
  'psi-high',
  'psi-low',
  'air-from-the-start',
  'load-comes-and-goes',
  'some-load',
  'load-of-a-shut-valve',
  'slower-each-start',
  'ragged-load',
  'sudden',
  'slow',
  'far-over-usual',
  'all-inputs',
  'at-night-only',
  'drive-hot',
  'low-voltage',
  'high-voltage',
  'new-boot',
  'fault-code',
  'same-time-each-day',
  'standing',
  'flow-too-low',
] as const;
export type Sign = (typeof SIGNS)[number];

export type Signs = Readonly<Partial<Record<Sign, boolean>>>;
