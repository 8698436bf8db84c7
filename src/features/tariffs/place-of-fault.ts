import { t } from '#src/lib/messages/tariffs-words.ts';
import { periodName } from './period-words.ts';
import type { PeriodDraft, TariffDraft } from './tariff-draft.ts';

type Part = 'energy' | 'demand' | 'flatDemand';

const PARTS: Readonly<Record<Part, () => string>> = {
  energy: () => t('tariff.energy'),
  demand: () => t('tariff.demand'),
  flatDemand: () => t('tariff.flat'),
};
const FIELDS: Readonly<Record<string, () => string>> = {
  name: () => t('tariff.name'),
  currency: () => t('tariff.currency'),
  fixedMicrosPerMonth: () => t('tariff.fixed'),
};

const periodsOf = (draft: TariffDraft, part: Part): readonly PeriodDraft[] => draft[part]?.periods ?? [];

/** A fault with the name of the place it belongs to, for a list far from that place. */
export function placeOfFault(field: string, fault: string, draft: TariffDraft): string {
  const [, part, index] = /^(energy|demand|flatDemand)\.periods\[(\d+)]/.exec(field) ?? [];
  if (part !== undefined && index !== undefined) {
    const known = part as Part;
    const place = `${PARTS[known]()}, ${periodName(periodsOf(draft, known), Number(index))}`;
    return t('fault.at', { place, fault });
  }
  const named = FIELDS[field]?.() ?? (field.startsWith('monthly') ? t('tariff.monthly') : undefined);
  return named === undefined ? fault : t('fault.at', { place: named, fault });
}
