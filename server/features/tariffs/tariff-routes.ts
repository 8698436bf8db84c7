import type { Mount } from '#server/http/mount.ts';
import { tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { createTariff, removeTariff, replaceTariff } from './change-tariff.ts';
import { readCompanyTerms, readPadTerms, replaceCompanyTerms, replacePadTerms } from './change-terms.ts';
import { checkTariffDraft } from './check-tariff-draft.ts';
import { chooseCarbon, readCarbon } from './choose-carbon.ts';
import { getTariff, listTariffs } from './get-tariff.ts';
import { listPadsWithTerms } from './list-pads-with-terms.ts';

/** Tariffs, which of them holds when, and the grid's emission factors over HTTP. */
export function mountTariffRoutes(mount: Mount): void {
  mount.person(tariffEndpoints.list, (context) => listTariffs(context));
  mount.person(tariffEndpoints.check, async (_context, { body }) => checkTariffDraft(body));
  mount.person(tariffEndpoints.create, (context, { body }) => createTariff(context, body));
  mount.person(tariffEndpoints.read, (context, { params }) => getTariff(context, params.tariffId));
  mount.person(tariffEndpoints.replace, (context, { params, body, ifMatch }) =>
    replaceTariff(context, { ...params, ifMatch, shape: body }),
  );
  mount.person(tariffEndpoints.remove, (context, { params }) => removeTariff(context, params.tariffId));
  mount.person(tariffEndpoints.companyTerms, (context) => readCompanyTerms(context));
  mount.person(tariffEndpoints.replaceCompanyTerms, (context, { body, ifMatch }) =>
    replaceCompanyTerms(context, { ...body, ifMatch }),
  );
  mount.person(tariffEndpoints.padsWithTerms, (context) => listPadsWithTerms(context));
  mount.person(tariffEndpoints.padTerms, (context, { params }) => readPadTerms(context, params.padId));
  mount.person(tariffEndpoints.replacePadTerms, (context, { params, body, ifMatch }) =>
    replacePadTerms(context, { ...params, ...body, ifMatch }),
  );
  mount.person(tariffEndpoints.carbon, (context) => readCarbon(context));
  mount.person(tariffEndpoints.replaceCarbon, (context, { body, ifMatch }) =>
    chooseCarbon(context, { ...body, ifMatch }),
  );
}
