/**
 * What a job at the pad involves, from the least to the most dangerous. Every list of things to look at names one.
 * Common practice in the trade; lock-out order after OSHA 1910.147(d), test for no voltage after 1910.333(b)(2).
 */
export const TASKS = ['look', 'lid', 'wiring'] as const;
export type Task = (typeof TASKS)[number];

/** Cautions by task, shown after arriving and looking: the power stays on until the evidence is read. */
export const CAUTIONS: Readonly<Record<Task, { readonly title: string; readonly lines: readonly string[] }>> = {
  look: {
    title: 'Look only, power stays on',
    lines: [
      'Read the drive, the clocks and the gauge before anything is switched off: the evidence goes with the power.',
      'Keep clear of the filter lid while the pump runs. Another clock, freeze protection or the program can start it at any moment.',
      'If water has frozen in the pump, do not start it.',
    ],
  },
  lid: {
    title: 'Before a lid or filter is opened',
    lines: [
      'Lock out the breakers and put every clock at off. The keypad’s stop, or one clock at off, is not isolation: another clock, freeze protection or the program can start the pump. Booster, heater and clocks may be on other breakers.',
      'Let the pressure off. A pump that ran against a closed valve holds scalding water under pressure: let it cool before the lid is touched.',
      'At restart open the air relief until it runs a steady stream, and stand clear of the filter lid.',
      'Never run a suction outlet without its cover.',
    ],
  },
  wiring: {
    title: 'Before any wire is touched',
    lines: [
      'Lock out and tag every breaker that feeds the pad. Test for no voltage with a tester proved before and after.',
      'Wait out the drive’s capacitor discharge as its label says.',
      'Speed inputs are low voltage only. A fireman switch already in a heater’s circuit must not also carry the motor’s supply.',
      'Bonding and ground-fault protection stay in place.',
      'Work on supply wiring belongs to a licensed electrician. Local codes, the maker’s manual and the electrician decide.',
    ],
  },
};

/** What Millrace is not; at the foot of every alarm and mail. */
export const DISCLAIMER =
  'Millrace only watches: it never starts, stops or sets a motor, and nothing it shows is isolation. It is no freeze protection, no entrapment device and no electrical certificate. Local codes, the maker’s manual and a licensed electrician decide.';
