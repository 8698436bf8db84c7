import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import { conflict, notFound } from '#server/errors.ts';
import { type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { TariffRow, TariffShape } from '#shared/contract/http/tariffs.ts';
import { getTariff } from './get-tariff.ts';
import { markCompanyPrices, pumpsOfTariff } from './price-marks-repository.ts';
import { requireSound } from './require-sound.ts';
import {
  addTariff,
  deleteTariff,
  findTariffForUpdate,
  isNameTaken,
  lockTariffNames,
  saveTariff,
} from './tariff-repository.ts';
import { toTariff } from './tariff-shape.ts';

const taken = (name: string) => conflict(`A tariff named “${name}” is there already. Choose another name.`);

/** Stores a tariff that is free of faults. */
export async function createTariff(context: Context, shape: TariffShape): Promise<TariffRow> {
  const tariff = toTariff(shape);
  requireSound(tariff);
  await lockTariffNames(context);
  const id = await addTariff(context, tariff);
  if (id === undefined) throw taken(tariff.name);
  await recordAct(context, { action: 'tariff.added', subjectKind: 'tariff', subjectId: id });
  return getTariff(context, id);
}

type Change = { readonly tariffId: string; readonly ifMatch: ExpectedVersion; readonly shape: TariffShape };

/** Corrects a tariff; what was priced by it is priced anew. */
export async function replaceTariff(context: Context, { tariffId, ifMatch, shape }: Change): Promise<TariffRow> {
  const known = await findTariffForUpdate(context, tariffId);
  if (known === undefined) throw notFound('tariff');
  requireVersion(ifMatch, known.version);
  const tariff = toTariff(shape);
  requireSound(tariff);
  await lockTariffNames(context);
  if (await isNameTaken(context, tariff.name, tariffId)) throw taken(tariff.name);
  await saveTariff(context, tariffId, tariff, known.version + 1);
  await markCompanyPrices(context, pumpsOfTariff(tariffId));
  await recordAct(context, { action: 'tariff.changed', subjectKind: 'tariff', subjectId: tariffId });
  return getTariff(context, tariffId);
}

/** Deletes a tariff that nothing was ever priced by. */
export async function removeTariff(context: Context, tariffId: string): Promise<undefined> {
  const known = await findTariffForUpdate(context, tariffId);
  if (known === undefined) throw notFound('tariff');
  const { pads, isCompanys } = await getTariff(context, tariffId);
  if (pads > 0 || isCompanys)
    throw conflict(
      `“${known.name}” is among the terms of ${isCompanys ? 'the company' : `${pads} pads`}. Take it out there first.`,
    );
  await deleteTariff(context, tariffId);
  await recordAct(context, { action: 'tariff.removed', subjectKind: 'tariff', subjectId: tariffId });
  return undefined;
}
