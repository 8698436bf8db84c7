import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { type CompanyTerms, type PadTermsShape, tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { call } from '#src/lib/api/api-client.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { showNotice } from '#src/lib/notices.ts';
import { TARIFFS_KEY } from './tariff-queries.ts';
import { tellTrouble } from './tell-trouble.ts';

/** What a pad's terms say; the company's say the first alone. */
export type TermsBody = z.output<typeof PadTermsShape>;

/** Of the company without a pad. `before` is what stood there, for the way back. */
type Saving = {
  readonly padId: string | undefined;
  readonly body: TermsBody;
  readonly before: TermsBody;
  readonly version: number;
  readonly isUndo?: boolean;
};

function send({ padId, body, version }: Saving): Promise<Pick<CompanyTerms, 'version'>> {
  if (padId === undefined) return call(tariffEndpoints.replaceCompanyTerms, { body: { terms: body.terms }, version });
  return call(tariffEndpoints.replacePadTerms, { params: { padId }, body, version });
}

/** Says which tariff holds when, for the company or a pad, with the way back. */
export function useSaveTerms() {
  const client = useQueryClient();
  const mutation = useMutation({
    mutationFn: send,
    onSuccess: ({ version }, { isUndo = false, ...saved }) => {
      const back = () => mutation.mutate({ ...saved, body: saved.before, before: saved.body, version, isUndo: true });
      showNotice(
        isUndo
          ? { text: t('tariffs.undone') }
          : {
              text: t('terms.saved'),
              action: { label: t('tariffs.undo'), name: t('tariffs.undoNamed'), run: back },
            },
      );
    },
    onError: tellTrouble,
    onSettled: () => client.invalidateQueries({ queryKey: [TARIFFS_KEY] }),
  });
  return mutation;
}
