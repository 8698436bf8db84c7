import { presentTariff } from '#server/features/tariffs/tariff-shape.ts';
import type { PadTerms, TariffRow, TariffShape } from '#shared/contract/http/tariffs.ts';
import { TIME_OF_USE, TWO_TIER } from '#tests/shared/domain/energy/sample-tariffs.ts';
import { fakeId } from './fake-id.ts';

type Plan = Pick<PadTerms, 'terms' | 'ownMeter' | 'otherKwhByPeriod' | 'version'>;

/** What the company's tariffs are, and which of them holds where: by pad, `company` for all others. */
export type FakeTariffs = {
  rows: TariffRow[];
  plans: Map<string, Plan>;
  carbon: { region: string | null; version: number };
};

const NOTHING: Plan = { terms: [], ownMeter: false, otherKwhByPeriod: [], version: 0 };

export const planOf = ({ plans }: FakeTariffs, key: string): Plan => plans.get(key) ?? NOTHING;

/** A tariff with who goes by it, as the server counts. */
export function withUsers(tariffs: FakeTariffs, row: TariffRow): TariffRow {
  const names = (plan: Plan) => plan.terms.some(({ tariffId }) => tariffId === row.id);
  const pads = [...tariffs.plans].filter(([key, plan]) => key !== 'company' && names(plan)).length;
  return { ...row, pads, isCompanys: names(planOf(tariffs, 'company')) };
}

export const makeRow = (id: string, tariff: TariffShape, at: number): TariffRow => ({
  id,
  tariff,
  pads: 0,
  isCompanys: false,
  changedAt: at,
  version: 1,
});

export function createFakeTariffs(at: number): FakeTariffs {
  const [tiers, hours] = [fakeId('tariff', 1), fakeId('tariff', 2)];
  return {
    rows: [
      makeRow(tiers, presentTariff({ ...TWO_TIER, name: 'Tarnwick tiers' }), at),
      makeRow(hours, presentTariff({ ...TIME_OF_USE, name: 'Tarnwick by the hour' }), at),
    ],
    plans: new Map([
      ['company', { ...NOTHING, terms: [{ tariffId: hours, from: '2024-01-01', to: null }], version: 1 }],
    ]),
    carbon: { region: 'US', version: 1 },
  };
}
