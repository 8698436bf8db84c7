import type { ProgramAdvice, ProgramFigures } from '#shared/contract/http/energy-programs.ts';
import type { PlannedRun } from '#shared/contract/http/runs.ts';
import { DAY_MS, HOUR_MS } from '#shared/domain/time/local-time.ts';
import type { FakePump } from './fake-fleet.ts';
import type { FakeState } from './fake-state.ts';

const EVERY_DAY = [true, true, true, true, true, true, true];
const DAYS = [0, 1, 2, 3, 4, 5, 6];

type Stretch = readonly [from: number, to: number, rpm: number, source: PlannedRun['source']];

const weekOf = (stretches: readonly Stretch[]): PlannedRun[] =>
  DAYS.flatMap((day) =>
    stretches.map(([from, to, rpm, source]) => ({
      from: day * DAY_MS + from * HOUR_MS,
      to: day * DAY_MS + to * HOUR_MS,
      source,
      closedInputs: source === 'input' ? 1 : 0,
      activeInput: source === 'input' ? 1 : 0,
      rpm,
    })),
  );

const programFigures = (
  fromMinute: number,
  toMinute: number,
  rpm: number,
  kwhPerMonth: number,
  costPerMonth: string,
): ProgramFigures => ({
  program: [{ days: EVERY_DAY, fromMinute, toMinute, rpm }],
  week: weekOf([
    [9, 11, 2850, 'input'],
    [fromMinute / 60, toMinute / 60, rpm, 'program'],
  ]),
  kwhPerMonth,
  costPerMonth,
  gallonsPerDay: 25_400,
  shortfalls: [],
});

/** The advice for a pump: its program at dear hours, and the same water at night. */
export function fakeAdvice(state: FakeState, { detail }: FakePump): ProgramAdvice {
  return {
    pumpId: detail.pumpId,
    padId: detail.padId,
    padName: detail.padName,
    pumpName: detail.pumpName,
    customerName: detail.customerName,
    area: detail.area,
    kind: 'advice',
    madeAt: state.now() - 6 * HOUR_MS,
    month: 11,
    tariffName: 'Coast residential',
    currency: 'USD',
    savedShare: 0.41,
    savedPerMonth: '31.20',
    savedKwhPerMonth: 62,
    before: programFigures(720, 1320, 2400, 240, '76.10'),
    after: programFigures(720, 1440, 1500, 178, '44.90'),
    dearHours: [
      {
        caller: { kind: 'program', entry: 0 },
        months: [5, 6, 7, 11].map((month) => ({ month, minutesPerWeek: 2100, extraPerWeek: '4.20' })),
        extraPerYear: '74.30',
      },
      {
        caller: { kind: 'clock', input: 1 },
        months: [{ month: 11, minutesPerWeek: 300, extraPerWeek: '0.80' }],
        extraPerYear: '3.50',
      },
    ],
    unmet: [],
    reasons: [],
    needs: { gallonsPerDay: 24_000, windows: [] },
  };
}
