import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/t.ts';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';

export type ErrorNoticeProps = {
  readonly error: unknown;
  /** Asks again; without it the page can only be loaded anew. */
  readonly onRetry?: (() => void) | undefined;
};

/** What went wrong and what to do about it, for any place that could not be filled. */
export function ErrorNotice({ error, onRetry }: ErrorNoticeProps) {
  const { title, detail, requestId, retryable } = describeError(error);
  const again = onRetry !== undefined && retryable;
  return (
    <Notice
      kind="trouble"
      title={title}
      actions={
        <Button onClick={() => (again ? onRetry() : location.reload())}>
          {again ? t('error.retry') : t('error.reload')}
        </Button>
      }
    >
      <p>{detail}</p>
      {requestId === undefined ? null : <p className="text-13">{t('error.request', { id: requestId })}</p>}
    </Notice>
  );
}
