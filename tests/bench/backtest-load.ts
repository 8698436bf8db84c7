import { createRandom } from '#tests/shared/domain/detectors/pump-player.ts';

const FROM = Date.UTC(2026, 4, 4);
const CADENCE_MS = 10_000;
const MINUTE_MS = 60_000;
/** So many steps of all pads are handed over at once. */
const STEPS = 200;

const serialOf = (pad: number): string => `BT-${String(pad).padStart(6, '0')}`;

/** Pads with everything recorded, so that every detector has its work. */
export function backtestPads(count: number): unknown[] {
  const everyDay = '1111111';
  return Array.from({ length: count }, (_, pad) => ({
    serial: serialOf(pad),
    timezone: 'America/Phoenix',
    area: pad % 2 === 0 ? 'North' : 'South',
    settings: {
      inputs: [2850, 2400, null],
      program: [{ days: everyDay, from: '06:00', to: '20:00', rpm: 1700 }],
      prime: { rpm: 3450, s: 180 },
      timed: { rpm: 3200, min: 45 },
      freeze: { c: 4.4, rpm: 1150 },
      max: 3450,
      min: 600,
    },
    inputs: [
      { n: 1, kind: 'clock', windows: [{ days: everyDay, on: '10:00', off: '14:00' }], drives: 'cleaner' },
      { n: 2, kind: 'clock', windows: [{ days: everyDay, on: '13:00', off: '17:00' }], drives: 'heater' },
    ],
    equipment: [{ kind: 'heater', input: 2, minGpm: 30, interlock: 'flow-switch' }],
    model: {
      refRpm: 3450,
      points: [
        { gpm: 0, ft: 84, w: 980 },
        { gpm: 40, ft: 79, w: 1420 },
        { gpm: 80, ft: 62, w: 1790 },
        { gpm: 110, ft: 40, w: 1980 },
      ],
      standbyW: 8,
    },
    system: { k: 0.0095 },
    pool: { gal: 15_200 },
    turnoversPerDay: 1,
    nominalV: 230,
    intervalS: 10,
  }));
}

type Moment = { readonly rpm: number; readonly closed: number; readonly active: number; readonly source: string };

function momentAt(minute: number): Moment {
  const closed = (minute >= 600 && minute < 840 ? 1 : 0) | (minute >= 780 && minute < 1020 ? 2 : 0);
  const active = closed === 0 ? 0 : (closed & 1) === 1 ? 1 : 2;
  if (minute < 360 || minute >= 1200) return { rpm: 0, closed, active, source: 'off' };
  if (minute < 363) return { rpm: 3450, closed, active, source: 'prime' };
  if (active !== 0) return { rpm: active === 1 ? 2850 : 2400, closed, active, source: 'input' };
  return { rpm: 1700, closed, active, source: 'program' };
}

/** Readings of well pumps as lines of a file, in order of arrival, some steps at a time. */
export function* backtestLines(
  pads: number,
  readings: number,
): Generator<{ readonly text: string; readonly count: number }> {
  const random = createRandom(7);
  let made = 0;
  for (let step = 0; made < readings; ) {
    let text = '';
    let count = 0;
    for (const end = step + STEPS; step < end && made + count < readings; step += 1) {
      const t = FROM + step * CADENCE_MS;
      // Phoenix is seven hours behind all year.
      const minute = (((t / MINUTE_MS - 420) % 1440) + 1440) % 1440;
      const { rpm, closed, active, source } = momentAt(minute);
      const usual = 8 + 1600 * (rpm / 3450) ** 3;
      for (let pad = 0; pad < pads; pad += 1) {
        const measured = rpm === 0 ? 0 : rpm + Math.round((random() - 0.5) * 10);
        const watts = Math.round(usual * (1 + (random() - 0.5) * 0.05) * 10) / 10;
        text += `{"s":"${serialOf(pad)}","t":${t},"rpm":${measured},"in":${closed},"act":${active},"w":${watts},"src":"${source}","v":238.4,"td":48.5,"ta":25.5}\n`;
        count += 1;
      }
    }
    made += count;
    yield { text, count };
  }
}
