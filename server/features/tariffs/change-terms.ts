import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import { notFound } from '#server/errors.ts';
import { type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { CompanyTerms, PadTerms } from '#shared/contract/http/tariffs.ts';
import { checkTariffTerms } from '#shared/domain/energy/tariff-history.ts';
import { findPlan, hasPad, type Plan, savePlan, type Term } from './plan-repository.ts';
import { markCompanyPrices, pumpsOfCompanyPlan, pumpsOfPad } from './price-marks-repository.ts';
import { refuse } from './require-sound.ts';
import { listTariffRows } from './tariff-read-model.ts';

type TermsInput = { readonly terms: readonly Term[]; readonly ifMatch: ExpectedVersion };
type PadInput = TermsInput & {
  readonly padId: string;
  readonly ownMeter: boolean;
  readonly otherKwhByPeriod: readonly number[];
};

const presentTerms = (plan: Plan | undefined) => (plan?.terms ?? []).map((term) => ({ ...term }));

/** Which tariff holds when for every pad without terms of its own. */
export async function readCompanyTerms(context: Context): Promise<CompanyTerms> {
  const plan = await findPlan(context, undefined);
  return { terms: presentTerms(plan), version: plan?.version ?? 0 };
}

/** Which tariff holds when at a pad: its own terms, else the company's. */
export async function readPadTerms(context: Context, padId: string): Promise<PadTerms> {
  if (!(await hasPad(context, padId))) throw notFound('pad');
  const own = await findPlan(context, padId);
  const inherited = own === undefined || own.terms.length === 0;
  const plan = inherited ? await findPlan(context, undefined) : own;
  return {
    terms: presentTerms(plan),
    ownMeter: own?.ownMeter ?? false,
    otherKwhByPeriod: [...(own?.otherKwhByPeriod ?? [])],
    version: own?.version ?? 0,
    inherited,
  };
}

/** Refuses terms that name no tariff of the company, or leave a stretch of time between two of them without one. */
async function requireSoundTerms({ db, actor }: Context, terms: readonly Term[]): Promise<void> {
  const known = new Map((await listTariffRows(db, actor.companyId)).map(({ id, tariff }) => [id, tariff]));
  const unknown = terms.flatMap(({ tariffId }, index) =>
    known.has(tariffId)
      ? []
      : [{ reason: 'unknown-tariff', field: `terms[${index}].tariffId`, allowed: 'a tariff of this company' }],
  );
  if (unknown.length > 0) throw refuse('The terms name a tariff that is not there.', unknown);
  const dated = terms.flatMap(({ tariffId, from, to }) => {
    const tariff = known.get(tariffId);
    return tariff === undefined
      ? []
      : [{ from: Date.parse(from), to: to === null ? undefined : Date.parse(to), tariff }];
  });
  const faults = checkTariffTerms(dated).map((one) => ({ ...one }));
  if (dated.length > 0 && dated.at(-1)?.to !== undefined)
    faults.push({
      reason: 'hole-between-terms',
      field: `terms[${dated.length - 1}].to`,
      allowed: 'no end in the last term: what comes after it has no price',
    });
  if (faults.length > 0) throw refuse('The terms leave time without a price, or price it twice.', faults);
}

/** Says which tariff holds when for every pad without terms of its own. */
export async function replaceCompanyTerms(context: Context, { terms, ifMatch }: TermsInput): Promise<CompanyTerms> {
  const known = await findPlan(context, undefined);
  requireVersion(ifMatch, known?.version ?? 0);
  await requireSoundTerms(context, terms);
  await savePlan(context, known, { padId: undefined, terms, ownMeter: false, otherKwhByPeriod: [] });
  await markCompanyPrices(context, pumpsOfCompanyPlan);
  await recordAct(context, {
    action: 'tariff-terms.changed',
    subjectKind: 'company',
    subjectId: context.actor.companyId,
  });
  return readCompanyTerms(context);
}

/** Gives a pad terms of its own; without any the company's hold. */
export async function replacePadTerms(context: Context, input: PadInput): Promise<PadTerms> {
  const { padId, terms, ifMatch, ownMeter, otherKwhByPeriod } = input;
  if (!(await hasPad(context, padId))) throw notFound('pad');
  const known = await findPlan(context, padId);
  requireVersion(ifMatch, known?.version ?? 0);
  await requireSoundTerms(context, terms);
  await savePlan(context, known, { padId, terms, ownMeter, otherKwhByPeriod });
  await markCompanyPrices(context, pumpsOfPad(padId));
  await recordAct(context, { action: 'tariff-terms.changed', subjectKind: 'pad', subjectId: padId });
  return readPadTerms(context, padId);
}
