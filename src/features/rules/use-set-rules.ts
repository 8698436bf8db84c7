import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type RuleLayer, ruleEndpoints, type StoredRules } from '#shared/contract/http/rules.ts';
import { call } from '#src/lib/api/api-client.ts';
import { isApiError } from '#src/lib/api/api-error.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/rules-words.ts';
import { showNotice } from '#src/lib/notices.ts';

type Change = { readonly layer: RuleLayer; readonly rules: StoredRules; readonly isUndo?: boolean };

function send({ layer: { scope, version }, rules }: Change): Promise<RuleLayer> {
  const body = { rules };
  if (scope.kind === 'company') return call(ruleEndpoints.setCompany, { body, version });
  if (scope.kind === 'model')
    return call(ruleEndpoints.setModel, { params: { modelId: scope.modelId }, body, version });
  return call(ruleEndpoints.setPump, { params: { pumpId: scope.pumpId }, body, version });
}

/** Sets the rules of a scope; the way back stands at the foot of the page. */
export function useSetRules() {
  const client = useQueryClient();
  const mutation = useMutation({
    mutationFn: send,
    onSuccess: (saved, { layer, isUndo = false }) => {
      const back = () => mutation.mutate({ layer: saved, rules: layer.rules, isUndo: true });
      showNotice(
        isUndo
          ? { text: t('rules.undone', { name: saved.name }) }
          : {
              text: t('rules.saved', { name: saved.name }),
              action: { label: t('rules.undo'), name: t('rules.undoNamed'), run: back },
            },
      );
    },
    onError: (error) =>
      showNotice({
        text: isApiError(error, 'precondition-failed')
          ? t('rules.conflict')
          : t('rules.notSaved', { reason: describeError(error).title }),
        trouble: true,
      }),
    onSettled: () => client.invalidateQueries({ queryKey: ['rules'] }),
  });
  return mutation;
}
