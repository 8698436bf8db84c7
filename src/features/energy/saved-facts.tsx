import type { z } from 'zod';
import type { Carbon, Saved, SavedMissing } from '#shared/contract/http/energy-figures.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { CarbonLine } from './carbon-line.tsx';
import { savedLine, savedMethod } from './saved-view.ts';

export type SavedFactsProps = {
  readonly saved: Saved | null;
  readonly missing: z.infer<typeof SavedMissing> | null;
  readonly currency: string | null;
  /** Of what was used. */
  readonly carbon: Carbon | null;
};

/** What was saved, how sure that is and how it was worked out; or why nothing can be said. */
export function SavedFacts({ saved, missing, currency, carbon }: SavedFactsProps) {
  const format = useFormat();
  return (
    <div className="flex max-w-prose flex-col gap-1.5">
      {saved === null ? (
        <p>{t(`energy.saved.missing.${missing ?? 'nothing-yet'}`)}</p>
      ) : (
        <>
          <p className="text-17">
            <Figures text={savedLine(saved, currency, format)} />
          </p>
          {savedMethod(saved, format).map((sentence) => (
            <p key={sentence} className="text-ink-2">
              <Figures text={sentence} />
            </p>
          ))}
          {saved.carbon === null ? null : <CarbonLine carbon={saved.carbon} saved />}
        </>
      )}
      {carbon === null ? null : <CarbonLine carbon={carbon} />}
    </div>
  );
}
