import { checkMotorSettings } from '../control/check-motor-settings.ts';
import { checkTariff, type TariffFault } from '../energy/check-tariff.ts';
import { isSystemCurve } from '../hydraulics/system-curve.ts';
import { checkNumber, checkNumbers, type NumberFault } from '../refusal/check-number.ts';
import type { Refusal } from '../refusal/refusal.ts';
import type { AdviceRequest } from './advice-request.ts';
import type { DailyWindow, PadNeeds } from './pad-needs.ts';

type SettingsFault = ReturnType<typeof checkMotorSettings>[number]['reason'];

export type RequestFault = NumberFault | SettingsFault | TariffFault | 'not-a-system-curve' | 'nothing-asked';

const LARGEST_GALLONS = 1_000_000;
/** Motors hold this many entries at the most; common practice. */
const MOST_ENTRIES = 16;

function checkWindow(window: DailyWindow, field: string): Refusal<RequestFault>[] {
  const faults: Refusal<RequestFault>[] = checkNumbers([
    [window.fromMinute, { field: `${field}.fromMinute`, unit: 'min', least: 0, most: 1439, whole: true }],
    [window.toMinute, { field: `${field}.toMinute`, unit: 'min', least: 0, most: 1440, whole: true }],
  ]);
  if (window.days.length !== 7)
    faults.push({ reason: 'not-seven-days', field: `${field}.days`, allowed: 'seven flags, Monday first' });
  if (window.fromMinute === window.toMinute)
    faults.push({ reason: 'no-length', field: `${field}.toMinute`, allowed: 'another time than fromMinute' });
  return faults;
}

function checkNeeds(needs: PadNeeds): Refusal<RequestFault>[] {
  const windows = needs.windows.flatMap((need, index): Refusal<RequestFault>[] => {
    const field = `needs.windows[${index}]`;
    const { minimumRpm, minimumGpm } = need;
    const asks = minimumRpm !== undefined || minimumGpm !== undefined;
    return [
      ...checkWindow(need, field),
      ...checkNumbers([
        [minimumRpm ?? 1, { field: `${field}.minimumRpm`, unit: 'rpm', above: 0, most: 4000 }],
        [minimumGpm ?? 1, { field: `${field}.minimumGpm`, unit: 'gpm', above: 0, most: 500 }],
      ]),
      ...(asks ? [] : [{ reason: 'nothing-asked' as const, field, allowed: 'a minimumRpm or a minimumGpm' }]),
    ];
  });
  const quiet = needs.quiet.flatMap((one, index) => [
    ...checkWindow(one, `needs.quiet[${index}]`),
    ...checkNumber(one.maximumRpm, { field: `needs.quiet[${index}].maximumRpm`, unit: 'rpm', least: 0, most: 4000 }),
  ]);
  return [
    ...checkNumber(needs.gallonsPerDay, {
      field: 'needs.gallonsPerDay',
      unit: 'gallons',
      least: 0,
      most: LARGEST_GALLONS,
    }),
    ...windows,
    ...checkNumbers([
      [needs.hours?.hours ?? 0, { field: 'needs.hours.hours', unit: 'h', least: 0, most: 24 }],
      [needs.hours?.minimumGpm ?? 1, { field: 'needs.hours.minimumGpm', unit: 'gpm', above: 0, most: 500 }],
    ]),
    ...quiet,
  ];
}

/**
 * Every fault of what an advisor is asked, by field, each with what is allowed: settings, needs, entries, month,
 * system curve and tariff. None means that it can be answered.
 *
 * @example checkAdviceRequest({ …request, month: 12 }) // [{ reason: 'too-large', field: 'month', allowed: 'a whole number from 0 up to 11' }]
 */
export function checkAdviceRequest(request: AdviceRequest): Refusal<RequestFault>[] {
  const system = isSystemCurve(request.system)
    ? []
    : [{ reason: 'not-a-system-curve' as const, field: 'system', allowed: 'static head -100 to 300 ft and k above 0' }];
  return [
    ...checkMotorSettings(request.settings, request.traits),
    ...checkNumbers([
      [request.entryLimit, { field: 'entryLimit', unit: 'entries', least: 0, most: MOST_ENTRIES, whole: true }],
      [request.speedStepRpm ?? 50, { field: 'speedStepRpm', unit: 'rpm', least: 10, most: 500, whole: true }],
      [request.month, { field: 'month', unit: '', least: 0, most: 11, whole: true }],
    ]),
    ...system,
    ...checkNeeds(request.needs),
    ...(request.otherKwhByPeriod ?? []).flatMap((kwh, period) =>
      checkNumber(kwh, { field: `otherKwhByPeriod[${period}]`, unit: 'kWh', least: 0 }),
    ),
    ...checkTariff(request.tariff),
  ];
}
