import type { Aside, LifeStory } from './life-story.ts';

/** How often alarms were set aside in a stretch, how many are at its end, and how many without a name and a reason. */
export type AsideFigures = {
  readonly shelved: { readonly begun: number; readonly now: number };
  readonly suppressed: { readonly begun: number; readonly now: number };
  readonly outOfService: { readonly begun: number; readonly now: number };
  readonly unexplained: number;
};

export function asideFigures(stories: readonly LifeStory[], from: number, until: number): AsideFigures {
  const asides = stories.flatMap((story) => story.asides);
  const begun = asides.filter((aside) => aside.from >= from && aside.from < until);
  const count = (kind: Aside['kind']) => ({
    begun: begun.filter((aside) => aside.kind === kind).length,
    now: asides.filter((aside) => aside.kind === kind && aside.from < until && (aside.to ?? until) >= until).length,
  });
  return {
    shelved: count('shelved'),
    suppressed: count('suppressed'),
    outOfService: count('out-of-service'),
    unexplained: begun.filter(({ explained }) => !explained).length,
  };
}
