import type { Equipment, PumpContext } from '../control/pump-context.ts';
import { recordedWindows } from '../control/window-spans.ts';
import type { Tariff } from '../energy/tariff.ts';
import { fitWetEnd } from '../hydraulics/fit-wet-end.ts';
import { accepted, type Outcome, type Refusal, refused } from '../refusal/refusal.ts';
import type { AdviceRequest } from './advice-request.ts';
import type { WindowNeed } from './pad-needs.ts';

/** What is not recorded of a pump, and without which no program can be advised. */
export type MissingFact = 'no-tariff' | 'no-wet-end' | 'no-system-curve' | 'no-pool-volume' | 'no-turnovers';

/** Motors hold at least this many entries; common practice. A motor whose program has more holds those. */
const USUAL_ENTRIES = 4;

export type AdviceTerms = {
  readonly tariff: Tariff | undefined;
  /** 0 = January. */
  readonly month: number;
  readonly otherKwhByPeriod?: readonly number[] | undefined;
};

/** Equipment that a clock also feeds must have its flow in every window of that clock. */
function windowsOf(context: PumpContext, { kind, input, minimumGpm }: Equipment): WindowNeed[] {
  const wired = context.inputs.find(({ number }) => number === input);
  if (minimumGpm === undefined || !(minimumGpm > 0) || wired === undefined) return [];
  return wired.windows.map(({ days, onMinute, offMinute }) => ({
    kind,
    days,
    fromMinute: onMinute,
    toMinute: offMinute,
    minimumGpm,
  }));
}

/**
 * Draws up what the advisor is asked for a pump, from what is commissioned: the pool's turnovers, the flow of equipment in
 * its clock's windows, the wet end and the system curve of start-up. Refuses with everything that is missing, by name.
 *
 * @example requestOfPump(context, { tariff, month: 6 }) // { ok: true, value: { needs: { gallonsPerDay: 18_000, … }, … } }
 */
export function requestOfPump(context: PumpContext, terms: AdviceTerms): Outcome<AdviceRequest, MissingFact> {
  const { wetEnd, systemK, poolGallons, turnoversPerDay, settings, traits } = context;
  const missing: Refusal<MissingFact>[] = [];
  const miss = (reason: MissingFact, field: string, allowed: string): void => {
    missing.push({ reason, field, allowed });
  };
  const curve = wetEnd === undefined ? undefined : fitWetEnd(wetEnd);
  if (terms.tariff === undefined) miss('no-tariff', 'tariff', 'terms that say which tariff holds at the pad now');
  if (curve?.ok !== true) miss('no-wet-end', 'wetEnd', 'a wet-end model whose points can be fitted');
  if (systemK === undefined || !(systemK > 0)) miss('no-system-curve', 'systemK', 'a system curve found at start-up');
  if (poolGallons === undefined || !(poolGallons > 0)) miss('no-pool-volume', 'poolGallons', 'the pool’s volume');
  if (turnoversPerDay === undefined) miss('no-turnovers', 'turnoversPerDay', 'the turnovers wanted a day');
  if (curve?.ok !== true || terms.tariff === undefined || missing.length > 0) return refused(missing);
  return accepted({
    settings,
    traits,
    windows: recordedWindows(context.inputs),
    curve: curve.value,
    system: { staticFeet: 0, k: systemK ?? 0 },
    needs: {
      gallonsPerDay: (poolGallons ?? 0) * (turnoversPerDay ?? 0),
      windows: context.equipment.flatMap((one) => windowsOf(context, one)),
      quiet: [],
    },
    entryLimit: Math.max(USUAL_ENTRIES, settings.program.length),
    tariff: terms.tariff,
    month: terms.month,
    otherKwhByPeriod: terms.otherKwhByPeriod,
  });
}
