import type { TariffRow } from '#shared/contract/http/tariffs.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';

/** For whom a tariff holds. @example usersText({ isCompanys: true, pads: 2 }) // 'the company and 2 pads' */
export function usersText({ isCompanys, pads }: Pick<TariffRow, 'isCompanys' | 'pads'>): string {
  if (isCompanys) return pads === 0 ? t('tariffs.users.company') : t('tariffs.users.both', { count: pads });
  return pads === 0 ? t('tariffs.users.none') : t('tariffs.users.pads', { count: pads });
}
