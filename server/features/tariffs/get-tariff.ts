import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import type { TariffRow } from '#shared/contract/http/tariffs.ts';
import { listTariffRows, type TariffRecord } from './tariff-read-model.ts';
import { presentTariff } from './tariff-shape.ts';

const present = ({ tariff, ...row }: TariffRecord): TariffRow => ({ ...row, tariff: presentTariff(tariff) });

/** One tariff. */
export async function getTariff({ db, actor }: Context, tariffId: string): Promise<TariffRow> {
  const [row] = await listTariffRows(db, actor.companyId, tariffId);
  if (row === undefined) throw notFound('tariff');
  return present(row);
}

/** The company's tariffs by name. */
export const listTariffs = async ({ db, actor }: Context): Promise<{ items: TariffRow[] }> => ({
  items: (await listTariffRows(db, actor.companyId)).map(present),
});
