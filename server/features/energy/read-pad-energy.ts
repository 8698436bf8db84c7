import type { z } from 'zod';
import type { Context } from '#server/context.ts';
import type { PadPrices } from '#server/db/tariffs-in-force.ts';
import { notFound } from '#server/errors.ts';
import type { EnergyQuery, PadEnergy } from '#shared/contract/http/energy.ts';
import type { FixedCharge } from '#shared/contract/http/energy-figures.ts';
import { toMinorUnits } from '#shared/domain/energy/money.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import { termOn } from '#shared/domain/energy/price-days.ts';
import { priceFixed } from '#shared/domain/energy/price-fixed.ts';
import { localDays } from '#shared/domain/time/local-days.ts';
import { addSavings } from './add-savings.ts';
import { findEnergyPad, listEnergyPumps } from './energy-read-model.ts';
import { type EnergyWindow, windowOf } from './energy-window.ts';
import { presentEnergy, spanOf } from './present-energy.ts';
import { knownTo, readEnergy, seesMoney } from './read-energy.ts';
import { listPeriodNames } from './reckon-days.ts';
import { presentCarbon, reckonSavings } from './reckon-savings.ts';
import { sumFigures } from './sum-figures.ts';

type Asked = EnergyQuery & { readonly padId: string };

/** What a pad used, all its pumps together and one by one. */
export async function readPadEnergy(context: Context, { padId, by, ...asked }: Asked): Promise<PadEnergy> {
  const { db, actor, now } = context;
  const pad = await findEnergyPad(db, padId);
  if (pad === undefined) throw notFound('pad');
  const own = await listEnergyPumps(db, padId);
  const window = windowOf(asked, pad.zone, now);
  const { pumps, prices } = await readEnergy(context, padId, own, window);
  const showsMoney = seesMoney(actor.role);
  const known = knownTo(own, now);
  const days = pumps.flatMap((one) => one.days);
  const { zone, poolGallons } = pad;
  const shown = presentEnergy(days, { window, by, zone, prices, poolGallons, showsMoney, knownTo: known });
  const region = own[0]?.region ?? null;
  const money = { currency: shown.currency ?? undefined, shows: shown.money === 'shown' };
  const terms = { periods: listPeriodNames(days.flatMap(({ settled }) => settled ?? [])), showsMoney, knownTo: known };
  const parts = pumps.map((reckoning) => {
    const { pump, days: ownDays } = reckoning;
    const saved = reckonSavings(reckoning, { money, region, knownTo: known });
    const ownPool = pump.purpose === 'filter' ? poolGallons : null;
    const totals = sumFigures(ownDays, { ...terms, poolGallons: ownPool });
    return { pumpId: pump.pumpId, pumpName: pump.pumpName, totals, ...saved };
  });
  const saved = addSavings(parts.flatMap((part) => part.saved ?? []));
  return {
    padId,
    padName: pad.padName,
    zone,
    from: window.from,
    until: window.until,
    by,
    upTo: own.length === 0 ? null : Math.max(...own.map(({ rolledTo }) => rolledTo ?? 0)) || null,
    poolGallons,
    turnoversPerDay: pad.turnoversPerDay,
    ...shown,
    saved,
    savedMissing:
      saved === null ? (parts.find((part) => part.savedMissing !== null)?.savedMissing ?? 'nothing-yet') : null,
    carbon: presentCarbon(shown.totals.kwh, 'consumption', region),
    fixedCharge: showsMoney ? findFixedCharge(window, zone, prices, known) : null,
    pumps: parts.map(({ savedMissing: _, ...part }) => part),
    serverNow: now,
  };
}

/** The meter's fixed charge over the days that have passed; it is the pad's only where nothing else hangs on the meter. */
function findFixedCharge(
  window: EnergyWindow,
  zone: string,
  { ownMeter, terms }: PadPrices,
  known: number,
): z.infer<typeof FixedCharge> | null {
  const { from, to } = spanOf(window, zone);
  if (!ownMeter || from >= Math.min(to, known)) return null;
  const days = localDays(zone, from, Math.min(to, known));
  let micros = 0;
  let currency: string | undefined;
  for (const day of days) {
    const term = termOn(terms, day.epochDay);
    if (term === undefined) return null;
    currency = term.tariff.currency;
    for (const line of priceFixed(term.tariff, [day])) micros += line.micros;
  }
  const units = currency === undefined ? undefined : toMinorUnits(micros, currency);
  if (units === undefined || currency === undefined) return null;
  return { days: days.length, cost: formatMinor(units, currency) };
}
