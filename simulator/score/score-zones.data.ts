/** Where the pads of an invented fleet lie: both hemispheres, with and without daylight saving. Means and swings, °C. */
export const SCORE_ZONES = [
  { zone: 'America/Los_Angeles', area: 'West', meanCelsius: 17, seasonCelsius: 5, dayCelsius: 5, frontCelsius: 2 },
  { zone: 'America/Phoenix', area: 'Desert', meanCelsius: 23, seasonCelsius: 8, dayCelsius: 7, frontCelsius: 2 },
  { zone: 'America/Chicago', area: 'Gulf', meanCelsius: 21, seasonCelsius: 6, dayCelsius: 5, frontCelsius: 3 },
  { zone: 'America/New_York', area: 'East', meanCelsius: 17, seasonCelsius: 7, dayCelsius: 4, frontCelsius: 2.5 },
  { zone: 'Australia/Sydney', area: 'Harbour', meanCelsius: 18, seasonCelsius: -5, dayCelsius: 4, frontCelsius: 2 },
  { zone: 'Europe/Madrid', area: 'Meseta', meanCelsius: 18, seasonCelsius: 7, dayCelsius: 5, frontCelsius: 2 },
] as const;
