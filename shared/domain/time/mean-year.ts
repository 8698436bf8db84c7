/** Weeks of a mean year of 365.25 days. */
export const WEEKS_PER_YEAR = 365.25 / 7;

/** Weeks of a mean month: a twelfth of that year. */
export const WEEKS_PER_MONTH = WEEKS_PER_YEAR / 12;
