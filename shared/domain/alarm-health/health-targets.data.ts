const MINUTE_MS = 60_000;

/** Where the targets come from: read in secondary pages that quote the standard's § 16.4, not in the standard itself. */
export const HEALTH_SOURCE = 'ANSI/ISA-18.2-2016 § 16.4 (IEC 62682), as quoted in public secondary sources';
/** Same subject, an older and much quoted guideline; also from a digest. */
export const FLOOD_SOURCE = 'ANSI/ISA-18.2-2016 § 16.4 and EEMUA 191, as quoted in public secondary sources';
/** Three times in a minute: a starting rule quoted beside the standard, which sets no single number. */
export const CHATTER_SOURCE = 'a starting rule quoted for ISA-18.2, which sets no single number';

/**
 * What an operator can be asked to look after. Rates are per operator; the 80/15/5 are the standard's low, medium and
 * high, here note, soon and urgent. Figures need at least 30 days.
 */
export const HEALTH_TARGETS = {
  leastDays: 30,
  /** About 6 an hour is acceptable, about 12 the most that can be managed: 144 and 288 a day by times 24. */
  perHour: { acceptable: 6, most: 12 },
  perDay: { acceptable: 144, most: 288 },
  perTenMinutes: { acceptable: 1, most: 2 },
  /** Of all 10-minute periods, those with more than 10. */
  peak: { intervalMs: 10 * MINUTE_MS, above: 10, mostShare: 0.01 },
  /** A flood begins above 10 in 10 minutes and ends below 5. */
  flood: { beginsAbove: 10, endsBelow: 5, mostShare: 0.01 },
  topTen: { count: 10, mostShare: 0.05 },
  chattering: { returns: 3, withinMs: MINUTE_MS, most: 0 },
  /** Shorter than this and not coming back at once: fleeting. */
  fleeting: { belowMs: 10_000, most: 0 },
  stale: { afterMs: 24 * 60 * MINUTE_MS, fewerThan: 5 },
  priorities: { urgent: 0.05, soon: 0.15, note: 0.8 },
  unexplained: { most: 0 },
} as const;
