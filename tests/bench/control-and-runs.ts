import { type Control, createControl } from '#shared/domain/control/create-control.ts';
import { plan } from '#shared/domain/control/plan.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { createRunFold } from '#shared/domain/runs/create-run-fold.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import { entry, inventedPump, wall } from '#tests/shared/domain/control/invented-pump.ts';
import { perfectReadings } from '#tests/shared/domain/runs/invented-readings.ts';

/*
 * How many readings a second of processor time control and the run fold take in on one core:
 * `npx tsx tests/bench/control-and-runs.ts`. One pump's days at 10 s with program, prime, an input, some noise and
 * everything a motor can say. Informative, no limit.
 */
const DAYS = 100;
const PROGRAM = [entry('06:00', '09:00', 1700), entry('09:00', '17:00', 1400), entry('17:00', '22:00', 1700)];
const CONTEXT = inventedPump({ settings: { program: PROGRAM } });
const WINDOW = { days: Array(7).fill(true), onMinute: 600, offMinute: 840, opensEarlyMinutes: 20 };

/** One day; the zone knows no daylight saving, so that every other day is the same. */
function dayOfReadings(): Reading[] {
  const from = wall(CONTEXT.zone, '2025-07-01 00:00');
  const where = { zone: CONTEXT.zone, motorClockOffsetMinutes: 0 };
  const runs = plan(CONTEXT.settings, CONTEXT.traits, where, from, from + DAY_MS, [{ input: 1, window: WINDOW }]);
  return perfectReadings(runs, CONTEXT, 0);
}

type Push = (reading: Reading) => void;

function measure(name: string, day: readonly Reading[], chatty: boolean, start: (control: Control) => Push): void {
  let best = 0;
  for (let round = 0; round < 5; round += 1) {
    const push = start(createControl(CONTEXT));
    const began = process.cpuUsage();
    for (let number = 0; number < DAYS; number += 1) {
      for (const { at, rpm, closedInputs, activeInput, watts, motorClockMinute } of day) {
        push({
          at: at + number * DAY_MS,
          rpm: rpm === 0 ? 0 : rpm + (at % 7),
          closedInputs,
          activeInput,
          watts: watts + (at % 5),
          reportedSource: undefined,
          volts: chatty ? 231 : undefined,
          driveCelsius: chatty ? 45.5 : undefined,
          ambientCelsius: chatty ? 20.5 : undefined,
          motorClockMinute: chatty ? motorClockMinute : undefined,
          fault: undefined,
        });
      }
    }
    best = Math.max(best, (DAYS * day.length) / (process.cpuUsage(began).user / 1e6));
  }
  console.log(`${name.padEnd(40)} ${Math.round(best).toLocaleString('en-US').padStart(12)} readings/s`);
}

const day = dayOfReadings();
for (const chatty of [false, true]) {
  const what = chatty ? 'everything told' : 'the least told';
  measure(`making the readings, ${what}`, day, chatty, () => () => undefined);
  measure(`control, ${what}`, day, chatty, (control) => (reading) => void control.push(reading));
  measure(`control and runs, ${what}`, day, chatty, (control) => {
    const runs = createRunFold(CONTEXT);
    return (reading) => runs.push(reading, control.push(reading), { gpm: 30, sigmaShare: 0.1 });
  });
}
