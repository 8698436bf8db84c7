import type { z } from 'zod';
import type { TariffShape, tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { checkTariff } from '#shared/domain/energy/check-tariff.ts';
import { parseRateSchedule } from '#shared/domain/energy/parse-rate-schedule.ts';
import { presentTariff, toTariff } from './tariff-shape.ts';

type Draft = z.output<(typeof tariffEndpoints)['check']['body']>;
type Checked = {
  faults: { field: string; reason: string; allowed: string }[];
  tariff: TariffShape | null;
  unused: string[];
};

/** Every fault of a tariff that is being written, or of a file in the open rate-schedule shape; nothing is stored. */
export function checkTariffDraft(draft: Draft): Checked {
  if ('tariff' in draft)
    return { faults: checkTariff(toTariff(draft.tariff)).map((one) => ({ ...one })), tariff: draft.tariff, unused: [] };
  const read = parseRateSchedule(draft.rateSchedule);
  if (!read.ok) return { faults: read.refusals.map((one) => ({ ...one })), tariff: null, unused: [] };
  return { faults: [], tariff: presentTariff(read.value.tariff), unused: [...read.value.unused] };
}
