import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type TariffRow, tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { call } from '#src/lib/api/api-client.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { showNotice } from '#src/lib/notices.ts';
import { TARIFFS_KEY } from './tariff-queries.ts';
import { tellTrouble } from './tell-trouble.ts';

/** Deletes a tariff that no terms name; undo makes it again as it was. */
export function useDeleteTariff() {
  const client = useQueryClient();
  const refresh = () => client.invalidateQueries({ queryKey: [TARIFFS_KEY] });
  const restore = useMutation({
    mutationFn: ({ tariff }: TariffRow) => call(tariffEndpoints.create, { body: tariff }),
    onSuccess: (_, { tariff }) => showNotice({ text: t('tariffs.restored', { name: tariff.name }) }),
    onError: tellTrouble,
    onSettled: refresh,
  });
  return useMutation({
    mutationFn: ({ id }: TariffRow) => call(tariffEndpoints.remove, { params: { tariffId: id } }),
    onSuccess: (_, row) =>
      showNotice({
        text: t('tariffs.deleted', { name: row.tariff.name }),
        action: { label: t('tariffs.undo'), name: t('tariffs.undoNamed'), run: () => restore.mutate(row) },
      }),
    onError: tellTrouble,
    onSettled: refresh,
  });
}
