import type { CompanyTerms } from '#shared/contract/http/tariffs.ts';

type Term = CompanyTerms['terms'][number];

/** From which day which tariff holds; `day` is '' until one is chosen. */
export type TermDraft = { readonly id: number; readonly tariffId: string; readonly day: string };

export const termDrafts = (terms: readonly Term[]): TermDraft[] =>
  terms.map(({ tariffId, from }, index) => ({ id: index + 1, tariffId, day: from }));

/** Each ends where the next begins, the last one never: no hole can be written. */
export const termsOf = (drafts: readonly TermDraft[]): Term[] =>
  drafts.map(({ tariffId, day }, index) => ({ tariffId, from: day, to: drafts[index + 1]?.day ?? null }));

/** Places whose day is missing or not after the one before it. */
export const faultyDays = (drafts: readonly TermDraft[]): ReadonlyMap<number, 'day' | 'order'> =>
  new Map(
    drafts.flatMap(({ id, day }, index): (readonly [number, 'day' | 'order'])[] => {
      if (!/^\d{4}-\d\d-\d\d$/.test(day)) return [[id, 'day']];
      const before = drafts[index - 1]?.day;
      return before !== undefined && before !== '' && day <= before ? [[id, 'order']] : [];
    }),
  );

/** A further term after the last: the tariff that was not the last one, where there is another. */
export function addTerm(drafts: readonly TermDraft[], tariffIds: readonly string[], today: string): TermDraft[] {
  const last = drafts.at(-1);
  const tariffId = tariffIds.find((id) => id !== last?.tariffId) ?? tariffIds[0] ?? '';
  const day = last === undefined ? today : last.day < today ? today : '';
  return [...drafts, { id: Math.max(0, ...drafts.map(({ id }) => id)) + 1, tariffId, day }];
}

export const isSameTerms = (one: readonly TermDraft[], other: readonly TermDraft[]): boolean =>
  JSON.stringify(termsOf(one)) === JSON.stringify(termsOf(other));
