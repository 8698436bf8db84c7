import type { EnergySpan, HourMap, PadEnergy, PumpEnergy } from '#shared/contract/http/energy.ts';
import type { EnergyFigures, Saved } from '#shared/contract/http/energy-figures.ts';
import type { FleetEnergy, PadMonth } from '#shared/contract/http/energy-fleet.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import type { FakePump } from './fake-fleet.ts';
import type { FakeState } from './fake-state.ts';

const ZONE = 'America/Los_Angeles';
const PERIODS = ['Peak', 'Off-peak'];
const CENTS_PER_KWH = [42, 24] as const;

const money = (cents: number) => (Math.round(cents) / 100).toFixed(2);
const epochDay = (day: string) => Date.parse(`${day}T00:00:00Z`) / DAY_MS;
const textOf = (day: number) => new Date(day * DAY_MS).toISOString().slice(0, 10);
/** Every day is a little unlike the one before, and the same each time it is asked for. */
const kwhOf = (day: number, mark: number) => 6 + ((day * 7 + mark * 3) % 11) / 2;

function figuresOf(days: readonly number[], mark: number, { money: shown = true, flow = true } = {}): EnergyFigures {
  const kwh = days.reduce((sum, day) => sum + kwhOf(day, mark), 0);
  const [peak, rest] = [kwh * 0.3, kwh * 0.7];
  const seconds = days.length * 86_400;
  const gallons = days.length * 26_000;
  return {
    seconds,
    coveredSeconds: seconds * 0.97,
    onSeconds: seconds * 0.6,
    kwh,
    kwhByPeriod: [peak, rest],
    cost: shown ? money(peak * CENTS_PER_KWH[0] + rest * CENTS_PER_KWH[1]) : null,
    water: flow ? { gallons, sigmaGallons: gallons * 0.08, unknownSeconds: mark % 2 === 0 ? 0 : 3600 } : null,
    turnovers: flow ? gallons / 24_000 : null,
    secondsBySource: { program: seconds * 0.5, input: seconds * 0.1, off: seconds * 0.4 },
    meanRpm: 1720,
    leastRpm: 0,
    mostRpm: 3450,
    meanWatts: 410,
    mostWatts: 1450,
  };
}

const SAVED: Saved = {
  baselineKwh: 980,
  actualKwh: 320,
  savedKwh: 660,
  sigmaKwh: 55,
  saved: '181.50',
  sigma: '15.10',
  method: 'A',
  stipulated: ['baseline-hours'],
  coverage: 0.97,
  baseline: { kind: 'nameplate', basis: 'same-hours', watts: 1650, sigmaWatts: 247 },
  carbon: null,
};

type Asked = { readonly from?: string | undefined; readonly until?: string | undefined; readonly by: 'day' | 'month' };

const startOf = (day: number) => instantOf(ZONE, day, 0) ?? 0;

function listSpans(days: readonly number[], by: 'day' | 'month', mark: number, shown: object): EnergySpan[] {
  const keyOf = (day: number) => textOf(day).slice(0, by === 'day' ? 10 : 7);
  return [...new Set(days.map(keyOf))].map((label) => {
    const ours = days.filter((day) => keyOf(day) === label);
    const [first, last] = [ours[0] ?? 0, ours.at(-1) ?? 0];
    return { ...figuresOf(ours, mark, shown), label, from: startOf(first), to: startOf(last + 1) };
  });
}

/** What both answers share; `mark` makes one pump unlike another. */
function answerOf(state: FakeState, { from, until, by }: Asked, mark: number, pump: FakePump | undefined) {
  const today = epochDay(textOf(Math.floor(state.now() / DAY_MS - 1 / 3)));
  const first = from === undefined ? epochDay(`${textOf(today).slice(0, 7)}-01`) : epochDay(from);
  const end = Math.min(until === undefined ? today + 1 : epochDay(until), today + 1);
  const days = Array.from({ length: Math.max(0, end - first) }, (_, index) => first + index);
  const shown = { money: state.energy.money, flow: pump?.detail.wetEndModel !== null };
  const totals = figuresOf(days, mark, shown);
  return {
    zone: ZONE,
    from: textOf(first),
    until: textOf(end),
    by,
    upTo: state.now() - 60_000,
    money: state.energy.money ? ('shown' as const) : ('no-tariff' as const),
    currency: state.energy.money ? 'USD' : null,
    tariffs: state.energy.money
      ? [{ id: '01890000-0000-7000-8000-000000000001', name: 'Coast residential', from: null, to: null }]
      : [],
    periods: PERIODS.map((name, index) => ({
      name,
      kwh: totals.kwhByPeriod[index] ?? 0,
      cost: state.energy.money ? money((totals.kwhByPeriod[index] ?? 0) * (CENTS_PER_KWH[index] ?? 0)) : null,
    })),
    totals,
    spans: listSpans(days, by, mark, shown),
    saved: state.energy.money ? SAVED : null,
    savedMissing: state.energy.money ? null : ('no-baseline' as const),
    carbon: null,
    serverNow: state.now(),
  };
}

export function fakePumpEnergy(state: FakeState, pump: FakePump, asked: Asked): PumpEnergy {
  const mark = state.pumps.indexOf(pump);
  return {
    ...answerOf(state, asked, mark, pump),
    pumpId: pump.detail.pumpId,
    gaps: [{ from: state.now() - 2 * DAY_MS, to: state.now() - 2 * DAY_MS + 2_400_000 }],
    gapCount: 1,
  };
}

export function fakePadEnergy(state: FakeState, pumps: readonly FakePump[], asked: Asked): PadEnergy {
  const [first] = pumps;
  const answer = answerOf(state, asked, first === undefined ? 0 : state.pumps.indexOf(first), first);
  return {
    ...answer,
    padId: first?.detail.padId ?? '',
    padName: first?.detail.padName ?? '',
    poolGallons: 24_000,
    turnoversPerDay: 1,
    fixedCharge: state.energy.money ? { days: 1, cost: '0.49' } : null,
    pumps: pumps.map(({ detail }) => ({
      pumpId: detail.pumpId,
      pumpName: detail.pumpName,
      totals: answer.totals,
      saved: answer.saved,
    })),
  };
}

/** Days by hours: on from 8 to 20, the rest standby; the second day has an hour that nobody read. */
export function fakeHours(state: FakeState, month: string | undefined): HourMap {
  const first = epochDay(`${month ?? textOf(Math.floor(state.now() / DAY_MS - 1 / 3)).slice(0, 7)}-01`);
  const days = Array.from({ length: 28 }, (_, index) => ({
    day: textOf(first + index),
    wattHours: Array.from({ length: 24 }, (_hour, hour) =>
      index === 1 && hour === 4 ? null : hour >= 8 && hour < 20 ? 500 + ((index * 37 + hour * 53) % 900) : 12,
    ),
  }));
  const weekday = Array.from({ length: 24 }, (_, hour) => (hour >= 16 && hour < 21 ? '0.42' : '0.24'));
  const prices = { currency: 'USD', weekday, weekend: weekday.map(() => '0.24') };
  return { days, prices: state.energy.money ? prices : null, serverNow: state.now() };
}

export function fakeFleetEnergy(state: FakeState, asked: string | undefined): FleetEnergy {
  const today = Math.floor(state.now() / DAY_MS - 1 / 3);
  const month = asked ?? textOf(today).slice(0, 7);
  const first = epochDay(`${month}-01`);
  const days = Array.from({ length: 31 }, (_, index) => first + index).filter(
    (day) => day <= today && textOf(day).startsWith(month),
  );
  const pumps = state.pumps.length;
  const totals = figuresOf(days, 1, { money: state.energy.money });
  return {
    month,
    upTo: state.now() - 60_000,
    currency: state.energy.money ? 'USD' : null,
    pumps,
    priced: state.energy.money ? pumps - 1 : 0,
    otherCurrencies: 0,
    pending: 2,
    kwh: totals.kwh * pumps,
    cost: state.energy.money ? money(Number(totals.cost) * 100 * pumps) : null,
    seconds: totals.seconds * pumps,
    coveredSeconds: totals.coveredSeconds * pumps,
    onSeconds: totals.onSeconds * pumps,
    gallons: 812_000,
    saved: state.energy.money
      ? { pumps: 12, savedKwh: 4100, sigmaKwh: 230, saved: '1127.40', sigma: '63.20', carbon: null }
      : null,
    carbon: {
      kilograms: 912.4,
      factor: { region: 'US', year: 2023, gas: 'CO2e', rate: 'average', kilogramsPerKwh: 0.34967 },
    },
    periods: state.energy.money
      ? PERIODS.map((name, index) => ({
          name,
          kwh: (totals.kwhByPeriod[index] ?? 0) * pumps,
          cost: money((totals.kwhByPeriod[index] ?? 0) * pumps * (CENTS_PER_KWH[index] ?? 0)),
        }))
      : [],
    days: days.map((day) => ({ day: textOf(day), kwh: kwhOf(day, 1) * pumps, pumps })),
    previous: { month: '2026-10', kwh: totals.kwh * pumps * 1.1, cost: null },
    firstMonth: '2026-10',
    serverNow: state.now(),
  };
}

export function fakePadMonths(state: FakeState): PadMonth[] {
  const pads = new Map(state.pumps.map((pump) => [pump.detail.padId, pump]));
  return [...pads.values()].map(({ detail }, index) => ({
    padId: detail.padId,
    padName: detail.padName,
    customerName: detail.customerName,
    area: detail.area,
    pumps: 1,
    kwh: 300 - index,
    currency: state.energy.money ? 'USD' : null,
    cost: state.energy.money ? money((300 - index) * 29) : null,
    previousKwh: index % 5 === 4 ? null : 280,
    gallons: 780_000,
    kwhPerThousandGallons: index % 4 === 3 ? null : 0.38,
    turnoversPerDay: index % 4 === 3 ? null : 1.08,
    wantedTurnoversPerDay: 1,
    savedKwh: index % 2 === 0 ? 660 : null,
    saved: index % 2 === 0 && state.energy.money ? '181.50' : null,
    coverage: 0.97,
  }));
}
