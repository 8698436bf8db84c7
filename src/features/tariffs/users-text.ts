import type { CompanyTerms, TariffRow } from '#shared/contract/http/tariffs.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';

/** The company's terms and the local day it is now, `2026-12-01`. */
export type TermsToday = { readonly terms: CompanyTerms['terms']; readonly today: string };

/** For whom a tariff holds, held or will hold. @example usersText(row, now, format) // 'the company until Wed, Apr 1, 2026' */
export function usersText({ id, pads }: Pick<TariffRow, 'id' | 'pads'>, now: TermsToday, format: Format): string {
  const ofPads = pads === 0 ? undefined : t('tariffs.users.pads', { count: pads });
  const company = companyText(id, now, format);
  if (company === undefined) return ofPads ?? t('tariffs.users.none');
  return ofPads === undefined ? company : t('tariffs.users.and', { company, pads: ofPads });
}

function companyText(tariffId: string, { terms, today }: TermsToday, format: Format): string | undefined {
  const own = terms.filter((term) => term.tariffId === tariffId);
  if (own.some(({ from, to }) => from <= today && (to === null || to > today))) return t('tariffs.users.company');
  const dayText = (day: string) => format.dayWithYear(Date.parse(`${day}T12:00:00Z`), 'UTC');
  const next = own.find(({ from }) => from > today);
  if (next !== undefined) return t('tariffs.users.companyFrom', { day: dayText(next.from) });
  const past = own.at(-1)?.to ?? null;
  return past === null ? undefined : t('tariffs.users.companyUntil', { day: dayText(past) });
}
