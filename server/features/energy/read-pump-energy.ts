import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import type { EnergyQuery, PumpEnergy } from '#shared/contract/http/energy.ts';
import { findEnergyPump, listGaps } from './energy-read-model.ts';
import { windowOf } from './energy-window.ts';
import { presentEnergy, spanOf } from './present-energy.ts';
import { knownTo, readEnergy, seesMoney } from './read-energy.ts';
import { presentCarbon, reckonSavings } from './reckon-savings.ts';

/** Gaps that an answer lists. */
const MOST_GAPS = 50;

const NOTHING = { days: [], baseline: undefined, compared: [] };

type Asked = EnergyQuery & { readonly pumpId: string };

/** What a pump used, by local day or month. */
export async function readPumpEnergy(context: Context, { pumpId, by, ...asked }: Asked): Promise<PumpEnergy> {
  const { db, actor, now } = context;
  const pump = await findEnergyPump(db, pumpId);
  if (pump === undefined) throw notFound('pump');
  const window = windowOf(asked, pump.zone, now);
  const { pumps, prices } = await readEnergy(context, pump.padId, [pump], window);
  const [reckoning = NOTHING] = pumps;
  const { days } = reckoning;
  const known = knownTo([pump], now);
  const shown = presentEnergy(days, {
    window,
    by,
    zone: pump.zone,
    prices,
    poolGallons: pump.purpose === 'filter' ? pump.poolGallons : null,
    showsMoney: seesMoney(actor.role),
    knownTo: known,
  });
  const span = spanOf(window, pump.zone);
  const { gaps, count } = await listGaps(db, pumpId, { from: span.from, to: Math.min(span.to, known) }, MOST_GAPS);
  const money = { currency: shown.currency ?? undefined, shows: shown.money === 'shown' };
  return {
    pumpId,
    zone: pump.zone,
    from: window.from,
    until: window.until,
    by,
    upTo: pump.rolledTo,
    ...shown,
    ...reckonSavings(reckoning, { money, region: pump.region, knownTo: known }),
    carbon: presentCarbon(shown.totals.kwh, 'consumption', pump.region),
    gaps,
    gapCount: count,
    serverNow: now,
  };
}
