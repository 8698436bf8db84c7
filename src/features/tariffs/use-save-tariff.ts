import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type TariffRow, type TariffShape, tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { call } from '#src/lib/api/api-client.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { showNotice } from '#src/lib/notices.ts';
import { TARIFFS_KEY, tariffQueries } from './tariff-queries.ts';
import { tellTrouble } from './tell-trouble.ts';

/** `before` is the tariff that is replaced; without it a new one is made. */
type Saving = { readonly before: TariffRow | undefined; readonly shape: TariffShape; readonly isUndo?: boolean };

const send = ({ before, shape }: Saving): Promise<TariffRow> =>
  before === undefined
    ? call(tariffEndpoints.create, { body: shape })
    : call(tariffEndpoints.replace, { params: { tariffId: before.id }, body: shape, version: before.version });

/** Saves a tariff; the way back from a change stands at the foot of the page. Refusals of fields are the form's to say. */
export function useSaveTariff() {
  const client = useQueryClient();
  const mutation = useMutation({
    mutationFn: send,
    onSuccess: (saved, { before, isUndo = false }) => {
      client.setQueryData(tariffQueries.read(saved.id).queryKey, saved);
      const back = () => before !== undefined && mutation.mutate({ before: saved, shape: before.tariff, isUndo: true });
      showNotice(
        isUndo
          ? { text: t('tariffs.undone') }
          : {
              text: t('tariff.saved', { name: saved.tariff.name }),
              ...(before === undefined
                ? {}
                : { action: { label: t('tariffs.undo'), name: t('tariffs.undoNamed'), run: back } }),
            },
      );
    },
    onError: tellTrouble,
    onSettled: () => client.invalidateQueries({ queryKey: [TARIFFS_KEY] }),
  });
  return mutation;
}
