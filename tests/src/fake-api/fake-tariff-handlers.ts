import { checkTariffDraft } from '#server/features/tariffs/check-tariff-draft.ts';
import { type TariffRow, tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { type FakeHandler, FakeRefusal, handle } from './fake-handler.ts';
import { fakeId } from './fake-id.ts';
import type { FakeState } from './fake-state.ts';
import { makeRow, planOf, withUsers } from './fake-tariffs.ts';

const findTariff = ({ tariffs }: FakeState, tariffId: string): TariffRow => {
  const row = tariffs.rows.find(({ id }) => id === tariffId);
  if (row === undefined) throw new FakeRefusal('not-found');
  return withUsers(tariffs, row);
};

const requireFreeName = ({ tariffs }: FakeState, name: string, but?: string): void => {
  if (tariffs.rows.some(({ id, tariff }) => id !== but && tariff.name === name)) throw new FakeRefusal('conflict');
};

const requireVersion = (ifMatch: number | undefined, version: number): void => {
  if (ifMatch !== version) throw new FakeRefusal('precondition-failed');
};

const padTerms = ({ tariffs }: FakeState, padId: string) => {
  const own = planOf(tariffs, padId);
  const inherited = own.terms.length === 0;
  return { ...own, terms: inherited ? planOf(tariffs, 'company').terms : own.terms, inherited };
};

let made = 100;

export const FAKE_TARIFF_HANDLERS: readonly FakeHandler[] = [
  handle(tariffEndpoints.list, ({ tariffs }) => ({ items: tariffs.rows.map((row) => withUsers(tariffs, row)) })),
  handle(tariffEndpoints.check, (_, { body }) => checkTariffDraft(body)),
  handle(tariffEndpoints.create, (state, { body }) => {
    requireFreeName(state, body.name);
    made += 1;
    const row = makeRow(fakeId('tariff', made), body, state.now());
    state.tariffs.rows = [...state.tariffs.rows, row];
    return row;
  }),
  handle(tariffEndpoints.read, (state, { params }) => findTariff(state, params.tariffId)),
  handle(tariffEndpoints.replace, (state, { params, body, ifMatch }) => {
    const known = findTariff(state, params.tariffId);
    requireVersion(ifMatch, known.version);
    requireFreeName(state, body.name, known.id);
    const row = { ...known, tariff: body, version: known.version + 1 };
    state.tariffs.rows = state.tariffs.rows.map((each) => (each.id === row.id ? row : each));
    return row;
  }),
  handle(tariffEndpoints.remove, (state, { params }) => {
    const { id } = findTariff(state, params.tariffId);
    state.tariffs.rows = state.tariffs.rows.filter((row) => row.id !== id);
    return undefined;
  }),
  handle(tariffEndpoints.companyTerms, ({ tariffs }) => planOf(tariffs, 'company')),
  handle(tariffEndpoints.replaceCompanyTerms, ({ tariffs }, { body, ifMatch }) => {
    const known = planOf(tariffs, 'company');
    requireVersion(ifMatch, known.version);
    const plan = { ...known, terms: body.terms, version: known.version + 1 };
    tariffs.plans.set('company', plan);
    return plan;
  }),
  handle(tariffEndpoints.padsWithTerms, ({ tariffs, pumps }) => {
    const items = [...new Map(pumps.map(({ detail }) => [detail.padId, detail])).values()].flatMap((pad) => {
      const { terms } = planOf(tariffs, pad.padId);
      const { padId, padName, customerName, zone } = pad;
      return terms.length === 0
        ? []
        : [{ padId, padName, customerName, zone, tariffId: terms.at(-1)?.tariffId ?? null, terms: terms.length }];
    });
    return { items, count: items.length };
  }),
  handle(tariffEndpoints.padTerms, (state, { params }) => padTerms(state, params.padId)),
  handle(tariffEndpoints.replacePadTerms, (state, { params, body, ifMatch }) => {
    const known = planOf(state.tariffs, params.padId);
    requireVersion(ifMatch, known.version);
    state.tariffs.plans.set(params.padId, { ...body, version: known.version + 1 });
    return padTerms(state, params.padId);
  }),
  handle(tariffEndpoints.carbon, ({ tariffs }) => ({ ...tariffs.carbon, regions: ['US', 'AZNM'] })),
  handle(tariffEndpoints.replaceCarbon, ({ tariffs }, { body, ifMatch }) => {
    requireVersion(ifMatch, tariffs.carbon.version);
    tariffs.carbon = { region: body.region, version: tariffs.carbon.version + 1 };
    return { ...tariffs.carbon, regions: ['US', 'AZNM'] };
  }),
];
