import { useMutation, useQueryClient } from '@tanstack/react-query';
import { tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { call } from '#src/lib/api/api-client.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { showNotice } from '#src/lib/notices.ts';
import { tariffQueries } from './tariff-queries.ts';
import { tellTrouble } from './tell-trouble.ts';

type Choice = {
  readonly region: string | null;
  readonly before: string | null;
  readonly version: number;
  readonly isUndo?: boolean;
};

/** Chooses the grid whose emission factors are shown, with the way back. */
export function useChooseCarbon() {
  const client = useQueryClient();
  const mutation = useMutation({
    mutationFn: ({ region, version }: Choice) => call(tariffEndpoints.replaceCarbon, { body: { region }, version }),
    onSuccess: (saved, { region, before, isUndo = false }) => {
      client.setQueryData(tariffQueries.carbon().queryKey, saved);
      const back = () => mutation.mutate({ region: before, before: region, version: saved.version, isUndo: true });
      showNotice(
        isUndo
          ? { text: t('tariffs.undone') }
          : { text: t('carbon.saved'), action: { label: t('tariffs.undo'), name: t('tariffs.undoNamed'), run: back } },
      );
    },
    onError: tellTrouble,
    onSettled: () => client.invalidateQueries({ queryKey: tariffQueries.carbon().queryKey }),
  });
  return mutation;
}
