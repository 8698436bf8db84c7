import type { LiveLine } from './scenario.ts';

/** The live lines come round again after three hours. */
export const LIVE_ROUND_MINUTES = 180;

/** What happens while somebody watches: something within the first two minutes, and something new now and again. */
export const LARKMOOR_LIVE: readonly LiveLine[] = [
  // The basket was cleaned and the lid not seated: three tries to prime, each of half a minute. Cured after 25 minutes.
  { afterMinutes: 0.1, forMinutes: 25, pad: 'Tern Court 4', fault: 'air-leak-at-restart' },
  // Somebody turns the clock's lever, and the motor does not notice: the wire is loose.
  { afterMinutes: 0.5, forMinutes: 52, pad: 'Quarry Lane 18', fault: 'ignores-input' },
  { afterMinutes: 0.6, forMinutes: 50, pad: 'Quarry Lane 18', leverOfInput: 1 },
  // Leads on the wrong terminals: input 2 closes, and the motor says 1.
  { afterMinutes: 0.9, forMinutes: 38, pad: 'Old Ferry Lane 47', fault: 'swapped-leads' },
  { afterMinutes: 1, forMinutes: 36, pad: 'Old Ferry Lane 47', leverOfInput: 2 },
  // Nothing wrong: the timed high-speed run of somebody who expects guests.
  { afterMinutes: 1.6, forMinutes: 46, pad: 'Orchard Parade 5', timedRun: true },
  { afterMinutes: 8, forMinutes: 95, pad: 'Arbor Mews 31', fault: 'silent-link' },
  { afterMinutes: 20, forMinutes: 12, pad: 'Mesquite Circle 38', fault: 'drive-fault' },
  { afterMinutes: 38, forMinutes: 30, pad: 'Marram Avenue 15', fault: 'settings-changed' },
  { afterMinutes: 58, forMinutes: 45, pad: 'Dunlin Court 5', fault: 'plugged-basket' },
  { afterMinutes: 78, forMinutes: 1.5, pad: 'Harbour Steps 12', fault: 'supply-sag' },
  { afterMinutes: 97, forMinutes: 22, pad: 'Coppice Row 22', fault: 'valve-shut' },
  { afterMinutes: 121, forMinutes: 25, pad: 'Ocotillo Bend 17', fault: 'loss-of-prime-sudden' },
  { afterMinutes: 142, forMinutes: 35, pad: 'Pebble Drive 90', fault: 'pumping-to-waste' },
];
