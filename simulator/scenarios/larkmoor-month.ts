import type { HistoryLine } from './scenario.ts';

/**
 * The month before the demo: every detector has something to say once, somewhere, and most pads are well on most days.
 * A line reads: so many days before the end, at that local time, this happens at that pad and stands for so many hours.
 */
export const LARKMOOR_MONTH: readonly HistoryLine[] = [
  // Prime.
  { daysBefore: 25, at: '10:10', pad: 'Coppice Row 22', fault: 'blocked-suction', hours: 5 },
  { daysBefore: 19, at: '09:40', pad: 'Old Ferry Lane 47', fault: 'water-low', hours: 6 },
  { daysBefore: 12, at: '07:30', pad: 'Sagebrush Loop 204', fault: 'drained-back', hours: 5 },
  { daysBefore: 8, at: '11:15', pad: 'Kelp Street 33', fault: 'valve-shut', hours: 4 },
  { daysBefore: 4, at: '08:05', pad: 'Tern Court 4', fault: 'air-leak', hours: 2.5 },
  { daysBefore: 14, at: '12:00', pad: 'Sluice Walk 8', fault: 'slow-prime', hours: 220 },
  { daysBefore: 16, at: '09:20', pad: 'Marram Avenue 15', fault: 'loss-of-prime-sudden', hours: 3 },
  { daysBefore: 22, at: '10:30', pad: 'Heron Close 2', fault: 'loss-of-prime-ragged', hours: 7 },

  // Flow and load. Fennel Street's filter is what the demo opens with.
  { daysBefore: 13, at: '06:00', pad: 'Fennel Street 9', fault: 'dirty-filter', hours: 400, everyDays: 26 },
  { daysBefore: 6, at: '14:00', pad: 'Beacon Terrace 64', fault: 'plugged-basket', hours: 22 },
  { daysBefore: 13, at: '05:00', pad: 'Dunlin Court 5', fault: 'rubbing-impeller', hours: 80 },
  { daysBefore: 12, at: '13:00', pad: 'Pebble Drive 90', fault: 'bypass-open', hours: 50 },
  { daysBefore: 17, at: '11:00', pad: 'Pebble Drive 90', fault: 'pumping-to-waste', hours: 3 },

  // Speed, inputs and wires.
  { daysBefore: 22, at: '06:00', pad: 'Cistern Lane 29', fault: 'ignores-input', hours: 60 },
  { daysBefore: 7, at: '06:30', pad: 'Mesquite Circle 38', fault: 'runs-input-open', hours: 14 },
  { daysBefore: 18, at: '09:00', pad: 'Ocotillo Bend 17', fault: 'unknown-speed', hours: 30 },
  { daysBefore: 11, at: '16:00', pad: 'Old Ferry Lane 47', fault: 'swapped-leads', hours: 70 },
  { daysBefore: 9, at: '08:00', pad: 'Juniper Trace 9', fault: 'strange-active-input', hours: 50 },
  { daysBefore: 14, at: '06:00', pad: 'Thornapple Gate 11', fault: 'missing-input', hours: 110 },
  { daysBefore: 24, at: '05:00', pad: 'Sluice Walk 8', fault: 'missing-inputs-all', hours: 90 },
  { daysBefore: 20, at: '07:00', pad: 'Gorse Point 6', fault: 'tripper-missing', hours: 60 },
  { daysBefore: 15, at: '08:00', pad: 'Copperfield 140', fault: 'switch-welded', hours: 70 },
  { daysBefore: 4, at: '15:00', pad: 'Orchard Parade 5', fault: 'lever-left-on', hours: 8 },
  { daysBefore: 26, at: '08:10', pad: 'Dunlin Court 5', fault: 'loose-wire', hours: 28 },
  { daysBefore: 11, at: '06:00', pad: 'Arbor Mews 31', fault: 'switch-failing', hours: 130 },

  // Stopped, or running when nothing is due.
  { daysBefore: 12, at: '13:00', pad: 'Beacon Terrace 64', fault: 'stopped-by-keypad', hours: 26 },
  { daysBefore: 16, at: '10:00', pad: 'Paddock View 56', fault: 'stopped-by-fault', hours: 5 },
  { daysBefore: 23, at: '10:30', pad: 'Juniper Trace 9', fault: 'dead-shaft', hours: 4 },
  { daysBefore: 27, at: '12:00', pad: 'Mesquite Circle 38', fault: 'program-changed', hours: 60 },
  { daysBefore: 3, at: '12:00', pad: 'Sluice Walk 8', fault: 'unasked-run', hours: 26 },
  { daysBefore: 20, at: '10:00', pad: 'Kelp Street 33', fault: 'keypad-hold', hours: 40 },
  { daysBefore: 9, at: '10:00', pad: 'Marram Avenue 15', fault: 'settings-changed', hours: 60 },
  { daysBefore: 6, at: '06:30', pad: 'Lantern Hill 3', fault: 'energized-without-flow', hours: 9 },

  // Clocks. Millbank Rise and Heron Close are still wrong when the demo opens.
  { daysBefore: 5, at: '02:10', pad: 'Millbank Rise 77', fault: 'clock-stopped-by-cut', hours: 190, everyDays: 21 },
  { daysBefore: 14, at: '03:00', pad: 'Cistern Lane 29', fault: 'clock-drifts', hours: 210 },
  { daysBefore: 17, at: '12:30', pad: 'Coppice Row 22', fault: 'trippers-moved', hours: 170 },
  { daysBefore: 8, at: '03:00', pad: 'Heron Close 2', fault: 'motor-clock-drifts', hours: 300, everyDays: 30 },
  { daysBefore: 14, at: '12:00', pad: 'Samphire Road 71', fault: 'fed-through-clock', hours: 120 },

  // Supply, drive, cold.
  { daysBefore: 19, at: '15:00', pad: 'Dunlin Court 5', fault: 'supply-standing', hours: 20 },
  { daysBefore: 2, at: '17:45', pad: 'Harbour Steps 12', fault: 'supply-sag', hours: 0.04 },
  { daysBefore: 23, at: '13:20', pad: 'Pebble Drive 90', fault: 'drive-fault', hours: 2 },
  { daysBefore: 5, at: '11:40', pad: 'Ocotillo Bend 17', fault: 'drive-fault', hours: 0.4 },
  { daysBefore: 21, at: '09:00', pad: 'Windmill Yard 1', fault: 'drive-hot', hours: 40 },
  { daysBefore: 10, at: '07:00', pad: 'Windmill Yard 1', fault: 'derating-drive', hours: 32 },
  { daysBefore: 8, at: '14:00', pad: 'Weir House', fault: 'freezing-pad', hours: 26 },

  // Silence, and a street without power.
  { daysBefore: 17, at: '20:00', pad: 'Arbor Mews 31', fault: 'silent-link', hours: 7 },
  { daysBefore: 9, at: '04:00', pad: 'Gorse Point 6', fault: 'silent-device', hours: 20 },
  { daysBefore: 7, at: '16:00', pad: 'Orchard Parade 5', pump: 1, fault: 'skewed-device', hours: 20 },
  { daysBefore: 15, at: '14:02', pad: 'Heron Close 2', fault: 'silent-power', hours: 1.7 },
  { daysBefore: 15, at: '14:02', pad: 'Saltern Way 12', fault: 'silent-power', hours: 1.7 },
  { daysBefore: 15, at: '14:02', pad: 'Orchard Parade 5', fault: 'silent-power', hours: 1.7 },
  { daysBefore: 15, at: '14:02', pad: 'Orchard Parade 5', pump: 1, fault: 'silent-power', hours: 1.7 },
  { daysBefore: 15, at: '14:02', pad: 'Old Ferry Lane 47', fault: 'silent-power', hours: 1.7 },
  { daysBefore: 15, at: '14:02', pad: 'Kelp Street 33', fault: 'silent-power', hours: 1.7 },
];
