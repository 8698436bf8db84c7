import type { DearHours, ProgramAdvice, ProgramFigures, ProgramRow } from '#shared/contract/http/energy-programs.ts';
import type { ProgramPlan } from '#shared/domain/advisor/advise-program.ts';
import type { PadNeeds } from '#shared/domain/advisor/pad-needs.ts';
import { type Micros, toMinorUnits } from '#shared/domain/energy/money.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import { ORDINARY_WEEK } from '#shared/domain/energy/plan-week.ts';
import type { TimeOfUseFinding } from '#shared/domain/energy/time-of-use-check.ts';
import { WEEKS_PER_MONTH } from '#shared/domain/time/mean-year.ts';
import type { ProgramRecord } from './program-read-model.ts';

const moneyText = (micros: Micros, currency: string): string =>
  formatMinor(toMinorUnits(micros, currency) ?? 0, currency);

function presentPlan(plan: ProgramPlan, currency: string): ProgramFigures {
  return {
    program: plan.program.map((entry) => ({ ...entry, days: [...entry.days] })),
    week: plan.week.map(({ from, to, source, closedInputs, activeInput, rpm }) => ({
      from: from - ORDINARY_WEEK.from,
      to: to - ORDINARY_WEEK.from,
      source,
      closedInputs,
      activeInput,
      rpm,
    })),
    kwhPerMonth: plan.kwhPerWeek * WEEKS_PER_MONTH,
    costPerMonth: formatMinor(plan.minorUnitsPerMonth, currency),
    gallonsPerDay: plan.gallonsPerWeek / 7,
    shortfalls: plan.shortfalls.map(({ need, weekdays, short }) => ({ need, weekdays: [...weekdays], short })),
  };
}

const presentDear = ({ caller, months, extraMicrosPerYear }: TimeOfUseFinding, currency: string): DearHours => ({
  caller: { ...caller },
  months: months.map(({ month, dearMinutesPerWeek, extraMicrosPerWeek }) => ({
    month,
    minutesPerWeek: dearMinutesPerWeek,
    extraPerWeek: moneyText(extraMicrosPerWeek, currency),
  })),
  extraPerYear: moneyText(extraMicrosPerYear, currency),
});

/** Advice with its before and after, as a row of the list. */
export function presentProgram(record: ProgramRecord): ProgramRow {
  const { advice, basis } = record;
  const currency = basis.currency ?? 'USD';
  const before = advice.kind === 'refused' ? undefined : advice.before;
  const after = advice.kind === 'advice' || advice.kind === 'keep' ? advice.after : undefined;
  const micros = record.savedMicrosPerMonth;
  return {
    pumpId: record.pumpId,
    padId: record.padId,
    padName: record.padName,
    pumpName: record.pumpName,
    customerName: record.customerName,
    area: record.area,
    kind: advice.kind,
    madeAt: record.madeAt,
    month: basis.month,
    tariffName: basis.tariffName ?? null,
    currency: basis.currency ?? null,
    savedShare: record.savedShare,
    savedPerMonth: micros === null ? null : moneyText(micros, currency),
    savedKwhPerMonth:
      before === undefined || after === undefined ? null : (before.kwhPerWeek - after.kwhPerWeek) * WEEKS_PER_MONTH,
    before: before === undefined ? null : presentPlan(before, currency),
    after: after === undefined ? null : presentPlan(after, currency),
    dearHours: record.dearHours.map((finding) => presentDear(finding, currency)),
  };
}

const presentNeeds = ({ gallonsPerDay, windows }: PadNeeds): NonNullable<ProgramAdvice['needs']> => ({
  gallonsPerDay,
  windows: windows.map(({ kind, days, fromMinute, toMinute, minimumRpm, minimumGpm }) => ({
    kind,
    days: [...days],
    fromMinute,
    toMinute,
    minimumRpm: minimumRpm ?? null,
    minimumGpm: minimumGpm ?? null,
  })),
});

/** All of an advice, with what it was asked and what stands against it. */
export function presentAdvice(record: ProgramRecord): ProgramAdvice {
  const { advice, basis } = record;
  return {
    ...presentProgram(record),
    unmet: advice.kind === 'infeasible' ? advice.unmet.map((need) => ({ ...need, weekdays: [...need.weekdays] })) : [],
    reasons: advice.kind === 'refused' ? advice.refusals.map((refusal) => ({ ...refusal })) : [],
    needs: basis.needs === undefined ? null : presentNeeds(basis.needs),
  };
}
