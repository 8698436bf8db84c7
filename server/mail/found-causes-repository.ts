import type pg from 'pg';
import type { FoundCounts } from '#shared/domain/causes/rank-causes.ts';

type Row = { readonly company_id: string; readonly detector: string; readonly cause: string; readonly times: number };

/** How often each cause was found where cases of some detectors were worked off, by `company detector`. */
export async function listFoundCauses(
  database: Pick<pg.ClientBase, 'query'>,
  cases: readonly { readonly companyId: string; readonly detector: string }[],
): Promise<Map<string, FoundCounts>> {
  const { rows } = await database.query<Row>(
    `select company_id, detector, done_cause as cause, count(*)::int as times from alarms
     where done_cause is not null and company_id = any($1::uuid[]) and detector = any($2::text[])
     group by company_id, detector, done_cause`,
    [cases.map(({ companyId }) => companyId), cases.map(({ detector }) => detector)],
  );
  const found = new Map<string, Record<string, number>>();
  for (const { company_id, detector, cause, times } of rows) {
    const key = foundKey(company_id, detector);
    found.set(key, { ...found.get(key), [cause]: times });
  }
  return found;
}

export const foundKey = (companyId: string, detector: string): string => `${companyId} ${detector}`;
