import { createPumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import {
  CONTEXT,
  clocks,
  createRandom,
  MINUTE,
  MONDAY,
  primedWatts,
  SETTINGS,
} from '#tests/shared/domain/detectors/pump-player.ts';

/*
 * How many readings a second the whole fold takes on one core: control, runs and every detector, 10 s cadence, all
 * optional fields present, over pumps that take turns as on a server. Counted in
 * processor time, so that other work on the machine does not change the answer. Run: npx tsx tests/bench/fold-speed.ts [million]
 */
const PUMPS = 50;
const millions = Number(process.argv[2] ?? 2);
const perPump = Math.round((millions * 1_000_000) / PUMPS);

const closedAt = clocks();
const random = createRandom(7);

function event(step: number): PumpEvent {
  const at = MONDAY + step * 10_000;
  const minute = ((at - MONDAY) / MINUTE) % 1440;
  const closedInputs = closedAt(at);
  const inputRpm = (closedInputs & 1) !== 0 ? 2850 : (closedInputs & 2) !== 0 ? 2400 : 0;
  const programmed = minute >= 360 && minute < 1200;
  const priming = minute >= 360 && minute < 363;
  const rpm = priming ? 3450 : inputRpm > 0 ? inputRpm : programmed ? 1700 : 0;
  const activeInput = (closedInputs & 1) !== 0 ? 1 : (closedInputs & 2) !== 0 ? 2 : 0;
  return {
    kind: 'reading',
    receivedAt: at + 300,
    single: true,
    reading: {
      at,
      rpm: rpm === 0 ? 0 : rpm + (random() - 0.5) * 10,
      closedInputs,
      activeInput,
      watts: primedWatts(rpm) * (1 + (random() - 0.5) * 0.05),
      reportedSource: priming ? 'prime' : activeInput > 0 ? 'input' : programmed ? 'program' : 'off',
      volts: 238 + random() * 4,
      driveCelsius: 48 + random() * 4,
      ambientCelsius: 24 + random() * 2,
      motorClockMinute: Math.floor(minute),
    },
  };
}

const DAY_STEPS = 8640;
const BATCH = 360;
const folds = Array.from({ length: PUMPS }, (_, index) =>
  createPumpFold({ ...CONTEXT, pumpId: `pump-${index}`, settings: SETTINGS }),
);
let spentMs = 0;
let folded = 0;
let signals = 0;
const dayEvents: PumpEvent[] = [];
for (let step = 0; step < perPump; step += BATCH) {
  // Making events costs more than folding them, so it stays outside the clock.
  dayEvents.length = 0;
  for (let index = 0; index < BATCH && step + index < perPump; index += 1) dayEvents.push(event(step + index));
  const from = process.cpuUsage();
  for (const fold of folds) {
    for (const one of dayEvents) fold.push(one);
    signals += fold.take().signals.length;
  }
  const { user, system } = process.cpuUsage(from);
  spentMs += (user + system) / 1000;
  folded += dayEvents.length * PUMPS;
}
const perSecond = Math.round((folded / spentMs) * 1000);
const saved = folds[0]?.save();
console.log(
  JSON.stringify({
    readings: folded,
    days: Math.round((perPump / DAY_STEPS) * 10) / 10,
    readingsPerSecond: perSecond,
    microsecondsEach: Math.round((spentMs / folded) * 1_000_000) / 1000,
    signals,
    hotBytes: JSON.stringify(saved?.hot).length,
    learntBytes: JSON.stringify(saved?.learnt).length,
  }),
);
