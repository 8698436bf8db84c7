import { isApiError } from '#src/lib/api/api-error.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { showNotice } from '#src/lib/notices.ts';

/** Says at the foot of the page why something was not done; that nothing is lost where somebody else was first. */
export function tellTrouble(error: unknown): void {
  const text = isApiError(error, 'precondition-failed')
    ? t('tariffs.conflict')
    : t('tariffs.notDone', { reason: describeError(error).title });
  showNotice({ text, trouble: true });
}
